import { describe, expect, test } from 'vitest';
import { buildNode, buildPart, buildRoutine, buildStep, buildTransition } from '#test/support/build-node.ts';
import type { Node } from '../scenario/scenario.types.ts';
import { compileNode } from './compile-node.ts';
import { dutyShares, oversubscription } from './duty-shares.ts';

const radio = buildPart(
  'radio',
  { off: 0, on: 0.01 },
  { transitions: [buildTransition('off>on', 0.5), buildTransition('on>off', 0.5)] },
);
const lamp = buildPart('lamp', { off: 0, on: 0.02 });
const compile = (node: Node) => compileNode(node, { defaultReferenceVoltageV: 3 });
const named = (shares: ReturnType<typeof dutyShares>) =>
  shares.map(({ partId, stateId, fromStateId, share }) => [partId, fromStateId, stateId, Number(share.toFixed(12))]);

describe('dutyShares', () => {
  test('superposes the routines and leaves the rest to the rest state', () => {
    const routines = [
      buildRoutine('r', [buildStep('s', 1, { radio: 'on' })]),
      buildRoutine('q', [buildStep('s', 2, { radio: 'on', lamp: 'on' })]),
    ];
    expect(named(dutyShares(compile(buildNode([radio, lamp], routines)), [0.01, 0.02]))).toEqual([
      ['radio', null, 'off', 0.92],
      ['radio', 'off', 'on', 0.015],
      ['radio', null, 'on', 0.05],
      ['radio', 'on', 'off', 0.015],
      ['lamp', null, 'off', 0.96],
      ['lamp', null, 'on', 0.04],
    ]);
  });
});

describe('oversubscription', () => {
  const lit = (schedule: Parameters<typeof buildRoutine>[2], id = 'r') =>
    buildRoutine(id, [buildStep('s', 60, { lamp: 'on' })], schedule);

  test('is empty for a node with time to spare, and for one that is busy all the time', () => {
    const every = compile(buildNode([lamp], [lit({ kind: 'every', periodS: 60 })]));
    expect(oversubscription(every, [1 / 60])).toEqual({ routines: [], parts: [] });
    const always = compile(buildNode([lamp], [lit({ kind: 'always' })]));
    expect(oversubscription(always, [1 / 60])).toEqual({ routines: [], parts: [] });
  });

  test('names a routine that is longer than its period and the part that has no time', () => {
    const program = compile(buildNode([lamp], [lit({ kind: 'every', periodS: 50 })]));
    expect(oversubscription(program, [1 / 50])).toEqual({
      routines: [{ routineId: 'r', cycleS: 60, periodS: 50 }],
      parts: [{ partId: 'lamp', share: 1.2 }],
    });
  });

  test('judges a window by its period and random events by their mean', () => {
    const window = compile(buildNode([lamp], [lit({ kind: 'window', fromHour: 8, toHour: 9, periodS: 50 })]));
    expect(oversubscription(window, [72 / 86_400]).routines).toHaveLength(1);
    const random = compile(buildNode([lamp], [lit({ kind: 'random', meanPerDay: 2_000 })]));
    expect(oversubscription(random, [2_000 / 86_400]).routines).toHaveLength(1);
  });

  test('names a part that two routines together keep busy for longer than there is time', () => {
    const program = compile(
      buildNode([lamp], [lit({ kind: 'every', periodS: 100 }), lit({ kind: 'every', periodS: 100 }, 'q')]),
    );
    expect(oversubscription(program, [0.01, 0.01])).toEqual({ routines: [], parts: [{ partId: 'lamp', share: 1.2 }] });
  });

  test('asks no time for a routine that is switched off', () => {
    const program = compile(buildNode([lamp], [lit({ kind: 'every', periodS: 50 })]));
    expect(oversubscription(program, [0])).toEqual({ routines: [], parts: [] });
  });
});
