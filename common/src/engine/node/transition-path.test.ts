import { describe, expect, test } from 'vitest';
import { buildPart, buildTransition } from '#test/support/build-node.ts';
import type { Transition } from '../scenario/scenario.types.ts';
import { partModel } from './part-model.ts';
import type { PartModel, StateModel } from './part-model.ts';
import { reachableStateIds, transitionPath } from './transition-path.ts';

function modelOf(transitions: Transition[]): PartModel {
  const model = partModel(buildPart('p', { a: 0, b: 0, c: 0, d: 0 }, { transitions }), 0, 3);
  if (!model) throw new Error('The part has no rest state.');
  return model;
}

function state(model: PartModel, stateId: string): StateModel {
  const found = model.stateById.get(stateId);
  if (!found) throw new Error(`No state ${stateId}.`);
  return found;
}

/** States passed on the way from a to a state. */
function way(transitions: Transition[], to: string): string[] | null {
  const model = modelOf(transitions);
  const path = transitionPath(model, state(model, 'a'), state(model, to));
  return path && path.hops.map(({ toIndex }) => model.states[toIndex]?.stateId ?? '');
}

describe('transitionPath', () => {
  test('takes the least total duration, even over more transitions', () => {
    const direct = buildTransition('a>d', 0.005);
    expect(way([direct, buildTransition('a>b', 0.002), buildTransition('b>d', 0.002)], 'd')).toEqual(['b', 'd']);
  });

  test('takes the least charge among equal durations', () => {
    const costly = [buildTransition('a>b', 0.1, 0.002), buildTransition('b>d', 0.2, 0.002)];
    const cheap = [buildTransition('a>c', 0.2, 0.001), buildTransition('c>d', 0.1, 0.001)];
    expect(way([...costly, ...cheap], 'd')).toEqual(['c', 'd']);
  });

  test('takes the fewest transitions among equal durations and charges', () => {
    const hops = [buildTransition('a>b', 0.1, 0.001), buildTransition('b>d', 0.2, 0.001)];
    expect(way([...hops, buildTransition('a>d', 0.3, 0.001)], 'd')).toEqual(['d']);
  });

  test('is null where no way leads, and lists what is reachable', () => {
    const model = modelOf([buildTransition('a>b', 0.1), buildTransition('b>c', 0.1)]);
    expect(transitionPath(model, state(model, 'a'), state(model, 'd'))).toBeNull();
    expect(reachableStateIds(model, state(model, 'a'))).toEqual(['b', 'c']);
  });

  test('is empty without any declared transition', () => {
    expect(way([], 'd')).toEqual([]);
  });
});
