import { describe, expect, test } from 'vitest';
import { EngineErrors, InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { buildNode, buildPart, buildRoutine, buildStep, buildTransition, errorOf } from '#test/support/build-node.ts';
import type { Node, Part, Step } from '../scenario/scenario.types.ts';
import { compileNode } from './compile-node.ts';

const radio = buildPart(
  'radio',
  { off: 0, idle: 0.001, on: 0.01 },
  { transitions: [buildTransition('off>idle', 0.001)] },
);
const sensor = buildPart('sensor', { off: 0, on: 0.002 });

const errorsOf = (node: Node) => errorOf(EngineErrors, () => compileNode(node, { defaultReferenceVoltageV: 3 })).errors;
const withSteps = (steps: Step[], parts: Part[] = [radio, sensor]) =>
  buildNode(parts, [buildRoutine('first', []), buildRoutine('second', steps)]);

describe('compileNode: errors', () => {
  test('names part, states and what is reachable where no path leads', () => {
    const node = withSteps([buildStep('s', 1, {}), buildStep('t', 1, { radio: 'on' })]);
    const [error] = errorsOf(node);
    expect(error).toBeInstanceOf(InconsistentInputError);
    expect(error).toMatchObject({ code: 'no-path', field: 'node.routines[1].steps[1].states.radio', value: 'on' });
    expect(error?.message).toBe('"radio" has no transitions that lead from "off" to "on"; reachable: idle.');
  });

  test('says so where nothing is reachable on the way back', () => {
    const errors = errorsOf(withSteps([buildStep('s', 1, { radio: 'idle' })]));
    expect(errors).toHaveLength(1);
    expect(errors[0]).toMatchObject({ code: 'no-path', value: 'off', field: 'node.routines[1].steps[0].states.radio' });
    expect(errors[0]?.message).toContain('nothing is reachable');
  });

  test('names both parts of a need that is not met', () => {
    const needy = buildPart(
      'sensor',
      { off: 0, on: 0.002 },
      { states: { on: { needs: { partId: 'clock', stateIds: ['running'] } } } },
    );
    const clock = buildPart('clock', { stopped: 0, running: 0.001 });
    const [error] = errorsOf(withSteps([buildStep('s', 1, { sensor: 'on' })], [needy, clock]));
    expect(error).toMatchObject({
      code: 'need-unmet',
      field: 'node.routines[1].steps[0].states.sensor',
      relatedFields: ['node.routines[1].steps[0].states.clock'],
    });
    expect(error?.message).toMatch(/"sensor".*"clock" in running.*"stopped"/);
    const met = withSteps([buildStep('s', 1, { sensor: 'on', clock: 'running' })], [needy, clock]);
    expect(compileNode(met, { defaultReferenceVoltageV: 3 }).routines).toHaveLength(2);
  });

  const wrongParts: [string, Node, object][] = [
    [
      'a part of a step that is not there',
      withSteps([buildStep('s', 1, { lamp: 'on' })]),
      { code: 'unknown-part', field: 'node.routines[1].steps[0].states.lamp' },
    ],
    [
      'a state of a step that is not there',
      withSteps([buildStep('s', 1, { sensor: 'up' })]),
      { code: 'unknown-state', field: 'node.routines[1].steps[0].states.sensor' },
    ],
    [
      'a rest state that is not there',
      buildNode([{ ...sensor, restStateId: 'up' }], []),
      { code: 'unknown-state', field: 'node.parts[0].restStateId' },
    ],
    [
      'a transition to nowhere',
      buildNode([{ ...sensor, transitions: [buildTransition('off>up', 1)] }], []),
      { code: 'unknown-state', field: 'node.parts[0].transitions[0].toStateId' },
    ],
    [
      'a busy part that is not there',
      buildNode([{ ...sensor, transitions: [buildTransition('off>on', 1, 0, { partId: 'lamp', stateId: 'on' })] }], []),
      { code: 'unknown-part', field: 'node.parts[0].transitions[0].busy' },
    ],
    [
      'a needed state that is not there',
      buildNode([buildPart('a', { off: 0 }, { states: { off: { needs: { partId: 'a', stateIds: ['x'] } } } })], []),
      { code: 'unknown-state', field: 'node.parts[0].states[0].needs.stateIds[0]' },
    ],
    ['a part id used twice', buildNode([sensor, sensor], []), { code: 'duplicate-id', field: 'node.parts[1].id' }],
    [
      'a step id used twice',
      withSteps([buildStep('s', 1, {}), buildStep('s', 1, {})]),
      { code: 'duplicate-id', field: 'node.routines[1].steps[1].id' },
    ],
  ];
  test.each(wrongParts)('tells of %s', (_what, node, expected) => {
    expect(errorsOf(node)[0]).toMatchObject(expected);
  });

  const outOfRange: [string, Node][] = [
    ['node.parts[0].states[1].current.typical', buildNode([buildPart('a', { off: 0, on: NaN })], [])],
    ['node.parts[0].lowestVoltageV.typical', buildNode([{ ...sensor, lowestVoltageV: { typical: -1 } }], [])],
    [
      'node.parts[0].states[0].doublingK',
      buildNode([buildPart('a', { off: 0 }, { states: { off: { doublingK: 0 } } })], []),
    ],
    [
      'node.parts[0].transitions[0].durationS.typical',
      buildNode([{ ...sensor, transitions: [buildTransition('off>on', -1)] }], []),
    ],
    [
      'node.leakages[0].current.typical',
      buildNode([], [], { leakages: [{ id: 'l', name: 'L', current: { typical: Infinity } }] }),
    ],
    ['node.routines[0].schedule.periodS', buildNode([], [buildRoutine('r', [], { kind: 'every', periodS: 0 })])],
    [
      'node.routines[0].schedule.meanPerDay',
      buildNode([], [buildRoutine('r', [], { kind: 'random', meanPerDay: -1 })]),
    ],
    [
      'node.routines[0].schedule.toHour',
      buildNode([], [buildRoutine('r', [], { kind: 'window', fromHour: 0, toHour: 25, periodS: 1 })]),
    ],
    ['node.routines[1].steps[0].duration.typical', withSteps([buildStep('s', NaN, {})])],
  ];
  test.each(outOfRange)('tells of a figure out of range at %s', (field, node) => {
    const [error] = errorsOf(node);
    expect(error).toBeInstanceOf(OutOfRangeError);
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });

  test('collects every problem of the node and not only the first', () => {
    const node = withSteps([buildStep('s', 1, { lamp: 'on' }), buildStep('t', 1, { sensor: 'up' })]);
    expect(errorsOf(node).map(({ code }) => code)).toEqual(['unknown-part', 'unknown-state']);
  });

  test('checks disabled routines too', () => {
    const routine = { ...buildRoutine('r', [buildStep('s', 1, { radio: 'on' })]), enabled: false };
    expect(errorsOf(buildNode([radio], [routine]))[0]?.code).toBe('no-path');
  });

  test('tells of an exchange step whose airtime cannot be told at its path', () => {
    const exchange: Step = {
      id: 's',
      name: 'S',
      states: {},
      duration: { kind: 'exchange', pattern: 'frame', psduOctets: 5 },
    };
    expect(errorsOf(withSteps([exchange]))[0]).toMatchObject({ code: 'phy-missing', field: 'node.link.phy' });
  });
});
