import { describe, expect, test } from 'vitest';
import { buildNode, buildPart, buildRoutine, buildStep, buildTransition } from '#test/support/build-node.ts';
import type { Node } from '../scenario/scenario.types.ts';
import { compileNode } from './compile-node.ts';
import type { Activity, Interval, RoutineProgram } from './node-program.types.ts';

const compile = (node: Node) => compileNode(node, { defaultReferenceVoltageV: 3 });

/** `state`, or `from>to` on the way. */
function nameOf(activity: Activity): string {
  return activity.kind === 'state' ? activity.stateId : `${activity.fromStateId}>${activity.toStateId}`;
}

/** `start…end: part=state part=from>to` in ms, parts by index. */
function told({ kind, startS, durationS, occupants }: Interval): string {
  const from = Math.round(startS * 1e6) / 1e3;
  const to = Math.round((startS + durationS) * 1e6) / 1e3;
  const parts = occupants
    .map(({ partIndex, activity }) => `${'ABC'[partIndex] ?? '?'}=${nameOf(activity)}`)
    .sort((a, b) => a.localeCompare(b));
  return `${kind} ${from}…${to} ${parts.join(' ')}`.trim();
}

function firstRoutine(node: Node): RoutineProgram {
  const [routine] = compile(node).routines;
  if (!routine) throw new Error('The node has no enabled routine.');
  return routine;
}

const timeline = (node: Node): string[] => firstRoutine(node).intervals.map(told);

const radio = buildPart(
  'A',
  { off: 0, idle: 0.001, on: 0.01 },
  {
    transitions: [
      buildTransition('off>idle', 0.002, 0.003),
      buildTransition('idle>off', 0.001, 0.003),
      buildTransition('idle>on', 0.0005, 0.004),
      buildTransition('on>idle', 0.0005, 0.004),
    ],
  },
);
const sensor = buildPart(
  'B',
  { off: 0, on: 0.002 },
  { transitions: [buildTransition('off>on', 0.001, 0.001), buildTransition('on>off', 0.004, 0.001)] },
);
const instant = buildPart('C', { off: 0, on: 0.005 });

describe('compileNode: moves', () => {
  test('run before the step, in parallel, finishing together, and all return after the last step', () => {
    const node = buildNode([radio, sensor], [buildRoutine('r', [buildStep('s', 0.01, { A: 'on', B: 'on' })])]);
    expect(timeline(node)).toEqual([
      'move 0…1.5 A=off>idle',
      'move 1.5…2 A=off>idle B=off>on',
      'move 2…2.5 A=idle>on B=off>on',
      'step 2.5…12.5 A=on B=on',
      'return 12.5…13 A=on>idle B=on>off',
      'return 13…14 A=idle>off B=on>off',
      'return 14…16.5 B=on>off',
    ]);
  });

  test('belong to the cycle, returns do not', () => {
    const node = buildNode([radio], [buildRoutine('r', [buildStep('s', 0.01, { A: 'on' })])]);
    expect(firstRoutine(node).cycleS).toBe(0.0125);
  });

  test('leave the other parts in the state of the step before', () => {
    const steps = [buildStep('s', 0.01, { B: 'on' }), buildStep('t', 0.01, { A: 'idle', B: 'on' })];
    expect(timeline(buildNode([radio, sensor], [buildRoutine('r', steps)])).slice(2, 4)).toEqual([
      'move 11…13 A=off>idle B=on',
      'step 13…23 A=idle B=on',
    ]);
  });

  test('hold a part that moves for less long in its old state until its own way begins', () => {
    const steps = [buildStep('s', 0.01, { A: 'idle' }), buildStep('t', 0.01, { A: 'on', B: 'on' })];
    expect(timeline(buildNode([radio, sensor], [buildRoutine('r', steps)])).slice(2, 4)).toEqual([
      'move 12…12.5 A=idle B=off>on',
      'move 12.5…13 A=idle>on B=off>on',
    ]);
  });

  test('take no time for a part that declares no transition, and say so once', () => {
    const steps = [buildStep('s', 0.01, { C: 'on' }), buildStep('t', 0.01, {}), buildStep('u', 0.01, { C: 'on' })];
    const node = buildNode([radio, sensor, instant], [buildRoutine('r', steps)]);
    expect(timeline(node)).toEqual(['step 0…10 C=on', 'step 10…20', 'step 20…30 C=on']);
    expect(compile(node).remarks).toEqual([
      expect.objectContaining({ code: 'instant-moves', path: 'node.parts[2].transitions' }),
    ]);
  });

  test('are not remarked for a part that never moves', () => {
    const node = buildNode([instant], [buildRoutine('r', [buildStep('s', 0.01, {})])]);
    expect(compile(node).remarks).toEqual([]);
  });
});

describe('compileNode: returns', () => {
  const steps = (second: Record<string, string>, secondS: number) => [
    buildStep('s', 0.01, { B: 'on' }),
    buildStep('t', secondS, second),
  ];

  test('run beside the step that does not name the part, and cut it in two', () => {
    const node = buildNode([radio, sensor], [buildRoutine('r', steps({}, 0.01))]);
    expect(timeline(node).slice(2)).toEqual(['step 11…15 B=on>off', 'step 15…21']);
  });

  test('start when the step itself starts, after the moves into it', () => {
    const node = buildNode([radio, sensor], [buildRoutine('r', steps({ A: 'idle' }, 0.01))]);
    expect(timeline(node).slice(2, 5)).toEqual([
      'move 11…13 A=off>idle B=on',
      'step 13…17 A=idle B=on>off',
      'step 17…23 A=idle',
    ]);
  });

  test('outlast a short step into the next ones', () => {
    const long = [...steps({}, 0.001), buildStep('u', 0.01, {})];
    expect(timeline(buildNode([radio, sensor], [buildRoutine('r', long)])).slice(2)).toEqual([
      'step 11…12 B=on>off',
      'step 12…15 B=on>off',
      'step 15…22',
    ]);
  });

  test('count as completed when a later step names the part again meanwhile', () => {
    const again = [...steps({}, 0.001), buildStep('u', 0.01, { B: 'on' })];
    const node = buildNode([radio, sensor], [buildRoutine('r', again)]);
    expect(timeline(node).slice(2, 5)).toEqual(['step 11…12 B=on>off', 'move 12…13 B=off>on', 'step 13…23 B=on']);
    const cut = firstRoutine(node).segments.find(({ activity }) => nameOf(activity) === 'on>off');
    expect(cut?.durationTermsS).toEqual([0.001]);
  });

  test('after the last step lie beyond the cycle', () => {
    const node = buildNode([sensor], [buildRoutine('r', [buildStep('s', 0.01, { B: 'on' })])]);
    expect(firstRoutine(node).cycleS).toBe(0.011);
    expect(timeline(buildNode([radio, sensor], node.routines)).at(-1)).toBe('return 11…15 B=on>off');
  });
});

describe('compileNode: always', () => {
  test('closes the cycle: the first moves start from the states of the last step', () => {
    const steps = [buildStep('s', 0.01, { A: 'idle' }), buildStep('t', 0.01, { A: 'on' })];
    const node = buildNode([radio], [buildRoutine('r', steps, { kind: 'always' })]);
    expect(timeline(node)).toEqual([
      'move 0…0.5 A=on>idle',
      'step 0.5…10.5 A=idle',
      'move 10.5…11 A=idle>on',
      'step 11…21 A=on',
    ]);
  });

  test('never moves nor returns with a single step', () => {
    const node = buildNode([radio], [buildRoutine('r', [buildStep('s', 0.01, { A: 'on' })], { kind: 'always' })]);
    expect(timeline(node)).toEqual(['step 0…10 A=on']);
  });

  test('cuts a return that the next cycle names again where that cycle begins', () => {
    const steps = [buildStep('s', 0.01, { B: 'on' }), buildStep('t', 0.001, {})];
    const node = buildNode([radio, sensor], [buildRoutine('r', steps, { kind: 'always' })]);
    expect(timeline(node)).toEqual(['move 0…1 B=off>on', 'step 1…11 B=on', 'step 11…12 B=on>off']);
  });

  test('lets a return run over the end of the cycle until the step that names the part', () => {
    const steps = [buildStep('s', 0.002, {}), buildStep('t', 0.01, { B: 'on' }), buildStep('u', 0.001, {})];
    const node = buildNode([radio, sensor], [buildRoutine('r', steps, { kind: 'always' })]);
    expect(timeline(node).slice(-2)).toEqual(['step 13…14 B=on>off', 'return 14…16 B=on>off']);
  });
});

describe('compileNode: program', () => {
  test('gives every interval an id of its own that begins with routine and step', () => {
    const steps = [buildStep('s', 0.01, { B: 'on' }), buildStep('t', 0.01, { A: 'on' })];
    const ids = firstRoutine(buildNode([radio, sensor], [buildRoutine('r', steps)])).intervals.map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    expect(ids).toContain('r/s');
    expect(ids.every((id) => id.startsWith('r/s') || id.startsWith('r/t'))).toBe(true);
  });

  test('takes the higher of the limits of part and state, and of the rest state its own alone', () => {
    const part = buildPart(
      'A',
      { off: 0, on: 0.01 },
      {
        lowestVoltageV: { typical: 1.9 },
        states: { off: { lowestVoltageV: { typical: 1.2 } }, on: { lowestVoltageV: { typical: 2.2 } } },
      },
    );
    const program = compile(buildNode([part], [buildRoutine('r', [buildStep('s', 1, { A: 'on' })])]));
    expect(program.parts[0]?.restLowestVoltageV).toBe(1.2);
    expect(program.routines[0]?.intervals[0]?.occupants[0]?.lowestVoltageV).toBe(2.2);
  });

  test('takes the default reference voltage where a state gives none', () => {
    const part = buildPart('A', { off: 0, on: 0.01 }, { states: { on: { law: 'resistive' } } });
    const node = buildNode([part], [buildRoutine('r', [buildStep('s', 1, { A: 'on' })])]);
    const program = compileNode(node, { defaultReferenceVoltageV: 1.8 });
    expect(program.routines[0]?.segments[0]?.draw.referenceVoltageV).toBe(1.8);
  });

  test('multiplies repeats exactly', () => {
    const node = buildNode([instant], [buildRoutine('r', [buildStep('s', 0.1, { C: 'on' }, 3)])]);
    expect(firstRoutine(node).segments[0]?.durationTermsS).toEqual([0.3]);
  });

  test('leaves disabled routines and their remarks out', () => {
    const routine = { ...buildRoutine('r', [buildStep('s', 0.1, { C: 'on' })]), enabled: false };
    expect(compile(buildNode([instant], [routine]))).toMatchObject({ routines: [], remarks: [] });
  });

  test('gives a routine without steps no time and no intervals', () => {
    expect(firstRoutine(buildNode([radio], [buildRoutine('r', [])]))).toMatchObject({ cycleS: 0, intervals: [] });
  });

  test('lists a part that a step names in its rest state as resting', () => {
    const node = buildNode([radio, sensor], [buildRoutine('r', [buildStep('s', 0.01, { B: 'off' })])]);
    expect(timeline(node)).toEqual(['step 0…10']);
  });

  test('does not change the node', () => {
    const node = buildNode([radio, sensor], [buildRoutine('r', [buildStep('s', 0.01, { A: 'on', B: 'on' })])]);
    const before = structuredClone(node);
    compile(node);
    expect(node).toEqual(before);
  });
});
