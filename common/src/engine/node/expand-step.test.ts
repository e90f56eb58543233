import { describe, expect, test } from 'vitest';
import { EngineErrors } from '#common/errors.ts';
import { buildNode, buildPart, buildRoutine, buildStep, buildTransition, errorOf } from '#test/support/build-node.ts';
import type { ExchangePattern, LinkSettings, Node, Part, Schedule, State, Step } from '../scenario/scenario.types.ts';
import { linkOf } from '../link/link-of.ts';
import { exchangePlan } from '../link/exchange-plan.ts';
import { compileNode } from './compile-node.ts';
import type { Interval, NodeProgram } from './node-program.types.ts';

const link: LinkSettings = {
  phy: 'oqpsk-2450',
  busyProbability: { typical: 0.2 },
  frameErrorRate: { typical: 0.1 },
  ackErrorRate: { typical: 0.02 },
};
const unacknowledged: ExchangePattern = { pattern: 'unacknowledged', payloadOctets: 24 };

type Role = NonNullable<State['role']>;

/** A radio whose states have the id of their role; it moves instantly unless transitions are given. */
function radioWith(roles: Role[], overrides: Partial<Omit<Part, 'states'>> = {}): Part {
  const currentsA = Object.fromEntries(roles.map((role, index) => [role, index * 0.001]));
  const states = Object.fromEntries(roles.map((role) => [role, { role }]));
  return buildPart('radio', currentsA, { kind: 'radio', states, ...overrides });
}

const allRoles: Role[] = ['sleep', 'idle', 'synthesiser', 'listen', 'receive', 'transmit'];

function exchangeStep(pattern: ExchangePattern, overrides: Partial<Step> = {}): Step {
  return { id: 'send', name: 'Send', states: {}, duration: { kind: 'exchange', ...pattern }, ...overrides };
}

function nodeWith(parts: Part[], steps: Step[], overrides: Partial<Node> = {}, schedule?: Schedule): Node {
  return buildNode(parts, [buildRoutine('r', steps, schedule)], { link, ...overrides });
}

const compile = (node: Node): NodeProgram => compileNode(node, { defaultReferenceVoltageV: 3 });
const intervalsOf = (node: Node): Interval[] => compile(node).routines[0]?.intervals ?? [];

/** `phase=state of the radio`, parts by index. */
const told = ({ phase, kind, occupants }: Interval): string =>
  `${phase?.id ?? kind} ${occupants
    .map(({ activity }) =>
      activity.kind === 'state' ? activity.stateId : `${activity.fromStateId}>${activity.toStateId}`,
    )
    .join(' ')}`.trim();

describe('compileNode: phases of an exchange', () => {
  test('become intervals of their own, the radio in the state of their role', () => {
    expect(intervalsOf(nodeWith([radioWith(allRoles)], [exchangeStep(unacknowledged)])).map(told)).toEqual([
      'backoff idle',
      'assessment listen',
      'turnaround synthesiser',
      'frame transmit',
    ]);
  });

  test('have ids of routine, step and phase, and the mean, worst and longest times of the plan', () => {
    const intervals = intervalsOf(nodeWith([radioWith(allRoles)], [exchangeStep(unacknowledged)]));
    const { phases } = exchangePlan({ kind: 'exchange', ...unacknowledged }, link);
    expect(intervals.map(({ id, durationS, worstS, longestS }) => ({ id, durationS, worstS, longestS }))).toEqual(
      phases.map(({ id, meanS, worstS, longestS }) => ({ id: `r/send/${id}`, durationS: meanS, worstS, longestS })),
    );
  });

  test('start at whole microseconds, rounded half up, while segments and cycle keep the unrounded means', () => {
    const node = nodeWith([radioWith(allRoles)], [exchangeStep(unacknowledged)]);
    const [routine] = compile(node).routines;
    const { phases, meanS } = exchangePlan({ kind: 'exchange', ...unacknowledged }, link);
    for (const { startS } of routine?.intervals ?? []) expect(startS).toBe(Math.round(startS * 1e6) / 1e6);
    expect(routine?.segments.map(({ durationTermsS }) => durationTermsS)).toEqual(phases.map((phase) => [phase.meanS]));
    expect(routine?.cycleS).toBeCloseTo(meanS, 15);
  });

  test('keep the other parts in the states of the step', () => {
    const controller = buildPart('controller', { off: 0, on: 0.002 });
    const step = exchangeStep(unacknowledged, { states: { controller: 'on' } });
    expect(intervalsOf(nodeWith([radioWith(allRoles), controller], [step])).map(told)).toEqual([
      'backoff idle on',
      'assessment listen on',
      'turnaround synthesiser on',
      'frame transmit on',
    ]);
  });

  test('wait for the backoff asleep where the link says so', () => {
    const asleep = { link: { ...link, backoffIn: 'sleep' as const } };
    const [backoff] = intervalsOf(nodeWith([radioWith(allRoles)], [exchangeStep(unacknowledged)], asleep));
    expect(backoff && told(backoff)).toBe('backoff');
  });

  test('shorter than half a microsecond keep their charge, and the voltage that their worst needs', () => {
    const poll: ExchangePattern = { pattern: 'poll', pendingProbability: { typical: 1e-5 } };
    const controller = buildPart('controller', { off: 0, on: 0.002 });
    const step = exchangeStep(poll, { states: { controller: 'on' } });
    const [routine] = compile(nodeWith([radioWith(allRoles), controller], [step])).routines;
    const wait = routine?.intervals.find(({ phase }) => phase?.id === 'response-wait');
    const planned = exchangePlan({ kind: 'exchange', ...poll }, link).phases.find(({ id }) => id === 'response-wait');
    expect(wait).toMatchObject({ durationS: planned?.meanS, longestS: planned?.longestS });
    expect(wait?.durationS).toBeLessThan(0.5e-6);
    expect(wait && told(wait)).toBe('response-wait listen on');
    const listened = routine?.segments.filter(
      ({ activity }) => activity.kind === 'state' && activity.stateId === 'listen',
    );
    expect(listened?.map(({ durationTermsS }) => durationTermsS[0])).toContain(planned?.meanS);
  });

  test('take the typed state where several have the role', () => {
    const radio = radioWith(allRoles);
    const loud = { id: 'loud', name: 'Loud', role: 'transmit' as const, current: { typical: 0.03 } };
    const step = exchangeStep(unacknowledged, { states: { radio: 'loud' } });
    expect(
      intervalsOf(nodeWith([{ ...radio, states: [...radio.states, loud] }], [step]))
        .map(told)
        .at(-1),
    ).toBe('frame loud');
  });

  test('leave a frame alone in the state that the step types, as one interval', () => {
    const step = exchangeStep({ pattern: 'frame', payloadOctets: 24 }, { states: { radio: 'receive' } });
    const [interval, ...others] = intervalsOf(nodeWith([radioWith(allRoles)], [step]));
    expect(others).toEqual([]);
    expect(interval).toMatchObject({ id: 'r/send', phase: null, durationS: 0.001312, longestS: 0.001312 });
    expect(interval && told(interval)).toBe('step receive');
  });

  test('are one interval of the whole duration without a radio', () => {
    const controller = buildPart('controller', { off: 0, on: 0.002 });
    const step = exchangeStep(unacknowledged, { states: { controller: 'on' } });
    const [interval, ...others] = intervalsOf(nodeWith([controller], [step]));
    const { meanS, worstS } = exchangePlan({ kind: 'exchange', ...unacknowledged }, link);
    expect(others).toEqual([]);
    expect(interval).toMatchObject({ id: 'r/send', phase: null, durationS: meanS, worstS, longestS: worstS });
  });

  test('hold for the link of the step over that of the node', () => {
    const own: LinkSettings = { busyProbability: { typical: 0.9 } };
    const step = exchangeStep(unacknowledged, { duration: { kind: 'exchange', ...unacknowledged, link: own } });
    const { phases } = exchangePlan({ kind: 'exchange', ...unacknowledged }, linkOf(link, own));
    expect(intervalsOf(nodeWith([radioWith(allRoles)], [step]))[0]?.durationS).toBe(phases[0]?.meanS);
  });
});

describe('compileNode: moves between phases', () => {
  const ring = (durationS: number) => [
    buildTransition('sleep>idle', 0.0005),
    buildTransition('idle>synthesiser', 0.0001),
    buildTransition('synthesiser>listen', 0),
    buildTransition('synthesiser>transmit', durationS),
    buildTransition('idle>listen', 0),
    buildTransition('listen>synthesiser', 0),
    buildTransition('receive>sleep', 0),
    buildTransition('transmit>sleep', 0),
  ];

  test('take the declared transitions of the radio', () => {
    const radio = radioWith(allRoles, { transitions: ring(0) });
    expect(intervalsOf(nodeWith([radio], [exchangeStep(unacknowledged)])).map(told)).toEqual([
      'move sleep>idle',
      'backoff idle',
      'assessment listen',
      'turnaround synthesiser',
      'frame transmit',
    ]);
  });

  test('lead from listening through receiving without a declared transition, since both are the same circuit', () => {
    const radio = radioWith(allRoles, { transitions: ring(0) });
    const steps = [buildStep('hear', 0.001, { radio: 'listen' }), buildStep('take', 0.001, { radio: 'receive' })];
    expect(
      intervalsOf(nodeWith([radio], steps))
        .map(told)
        .slice(-2),
    ).toEqual(['step listen', 'step receive']);
  });

  test('take a declared transition between listening and receiving where there is one', () => {
    const radio = radioWith(allRoles, { transitions: [...ring(0), buildTransition('listen>receive', 0.0002)] });
    const steps = [buildStep('hear', 0.001, { radio: 'listen' }), buildStep('take', 0.001, { radio: 'receive' })];
    expect(intervalsOf(nodeWith([radio], steps)).map(told)).toContain('move listen>receive');
  });

  test('are cautioned where turnaround and a declared transition cover the same way', () => {
    const { remarks } = compile(
      nodeWith([radioWith(allRoles, { transitions: ring(0.00015) })], [exchangeStep(unacknowledged)]),
    );
    const caution = remarks.find(({ code }) => code === 'turnaround-and-transition');
    expect(caution?.path).toBe('node.parts[0].transitions');
    expect(caution?.message).toMatch(/from "synthesiser" to "transmit" takes 150\sµs: both count/);
  });

  test('are no caution where the transition takes no time', () => {
    const { remarks } = compile(
      nodeWith([radioWith(allRoles, { transitions: ring(0) })], [exchangeStep(unacknowledged)]),
    );
    expect(remarks).toEqual([]);
  });

  test('without a path are one error for all repeats, at the duration', () => {
    const transitions = ring(0).filter(({ toStateId }) => toStateId !== 'transmit');
    const node = nodeWith([radioWith(allRoles, { transitions })], [exchangeStep(unacknowledged, { repeats: 3 })]);
    const error = errorOf(EngineErrors, () => compile(node));
    expect(error.errors.filter(({ code }) => code === 'no-path').map(({ field }) => field)).toContain(
      'node.routines[0].steps[0].duration',
    );
  });
});

describe('compileNode: roles that the radio lacks', () => {
  const remarksOf = (roles: Role[], overrides: Partial<Step> = {}) =>
    compile(nodeWith([radioWith(roles)], [exchangeStep(unacknowledged, overrides)])).remarks;

  test.each<[Role, Role]>([
    ['synthesiser', 'idle'],
    ['listen', 'receive'],
  ])('%s is stood in for by %s, with a caution', (missing, standIn) => {
    const roles = allRoles.filter((role) => role !== missing);
    expect(intervalsOf(nodeWith([radioWith(roles)], [exchangeStep(unacknowledged)])).map(told)).toContain(
      `${missing === 'listen' ? 'assessment' : 'turnaround'} ${standIn}`,
    );
    expect(remarksOf(roles)).toContainEqual(
      expect.objectContaining({ code: 'role-fallback', path: 'node.parts[0].states' }),
    );
  });

  test('idle is stood in for by the rest state, with a caution', () => {
    const remarks = remarksOf(allRoles.filter((role) => role !== 'idle'));
    expect(remarks.map(({ code }) => code)).toContain('role-fallback');
  });

  test('transmit is stood in for by the state that the step types, with a caution', () => {
    const roles = allRoles.filter((role) => role !== 'transmit');
    expect(remarksOf(roles, { states: { radio: 'receive' } }).map(({ code }) => code)).toContain('role-fallback');
  });

  test('transmit is an error that names the part where the step types no state', () => {
    const node = nodeWith([radioWith(allRoles.slice(0, -1))], [exchangeStep(unacknowledged)]);
    const error = errorOf(EngineErrors, () => compile(node));
    expect(error.errors[0]).toMatchObject({ code: 'role-missing', field: 'node.parts[0].states' });
  });
});

describe('compileNode: the radio of an exchange', () => {
  const second: Part = { ...radioWith(allRoles), id: 'other' };

  test('is the one that the exchange names', () => {
    const duration = { kind: 'exchange' as const, ...unacknowledged, radioPartId: 'other' };
    const [interval] = intervalsOf(
      nodeWith([radioWith(allRoles), second], [exchangeStep(unacknowledged, { duration })]),
    );
    expect(interval?.occupants.map(({ partIndex }) => partIndex)).toEqual([1]);
  });

  test('is the one that the step names among several', () => {
    const step = exchangeStep(unacknowledged, { states: { other: 'idle' } });
    const [interval] = intervalsOf(nodeWith([radioWith(allRoles), second], [step]));
    expect(interval?.occupants.map(({ partIndex }) => partIndex)).toEqual([1]);
  });

  test('is open with several and cautioned', () => {
    const { remarks } = compile(nodeWith([radioWith(allRoles), second], [exchangeStep(unacknowledged)]));
    expect(remarks.map(({ code }) => code)).toContain('radio-open');
  });

  test('that does not exist is an error', () => {
    const duration = { kind: 'exchange' as const, ...unacknowledged, radioPartId: 'none' };
    const node = nodeWith([radioWith(allRoles)], [exchangeStep(unacknowledged, { duration })]);
    expect(errorOf(EngineErrors, () => compile(node)).errors[0]).toMatchObject({
      code: 'unknown-part',
      field: 'node.routines[0].steps[0].duration.radioPartId',
    });
  });
});

describe('compileNode: repeats of an exchange', () => {
  test('follow each other, with ids of their own', () => {
    const intervals = intervalsOf(nodeWith([radioWith(allRoles)], [exchangeStep(unacknowledged, { repeats: 3 })]));
    expect(intervals).toHaveLength(12);
    expect(new Set(intervals.map(({ id }) => id)).size).toBe(12);
    expect(intervals[4]?.id).toBe('r/send/backoff@2');
  });

  test('are multiplied beyond 64 phases, keep their longest stretch, and are remarked', () => {
    const node = nodeWith([radioWith(allRoles)], [exchangeStep(unacknowledged, { repeats: 17 })]);
    const intervals = intervalsOf(node);
    const { phases } = exchangePlan({ kind: 'exchange', ...unacknowledged }, link);
    expect(intervals).toHaveLength(4);
    expect(intervals[0]).toMatchObject({ durationS: (phases[0]?.meanS ?? 0) * 17, longestS: phases[0]?.longestS });
    expect(compile(node).remarks).toContainEqual(
      expect.objectContaining({ code: 'repeats-merged', path: 'node.routines[0].steps[0].repeats' }),
    );
  });
});

describe('compileNode: needs in an exchange', () => {
  test('are checked in each phase and told once', () => {
    const controller = buildPart(
      'controller',
      { off: 0, on: 0.002 },
      { states: { on: { needs: { partId: 'radio', stateIds: ['idle'] } } } },
    );
    const step = exchangeStep(unacknowledged, { states: { controller: 'on' } });
    const error = errorOf(EngineErrors, () => compile(nodeWith([radioWith(allRoles), controller], [step])));
    expect(error.errors).toHaveLength(1);
    expect(error.errors[0]).toMatchObject({ code: 'need-unmet' });
    expect(error.errors[0]?.message).toContain('in the phase "assessment of the channel"');
  });
});

describe('compileNode: loading of a frame', () => {
  const controller = buildPart('controller', { off: 0, waiting: 0.001, loading: 0.003 });
  const loading = { partId: 'controller', stateId: 'loading', clockHz: 1_000_000 };
  const withLoading = (own: Partial<typeof loading> & { beside?: boolean }): Node => {
    const duration = { kind: 'exchange' as const, ...unacknowledged, loading: { ...loading, ...own } };
    const step = exchangeStep(unacknowledged, { duration, states: { controller: 'waiting' } });
    return nodeWith([radioWith(allRoles), controller], [step]);
  };

  test('puts the loading part into its state before the exchange', () => {
    expect(intervalsOf(withLoading({})).map(told).slice(0, 2)).toEqual([
      'loading idle loading',
      'backoff idle waiting',
    ]);
  });

  test('runs beside the beginning of the frame', () => {
    const intervals = intervalsOf(withLoading({ beside: true }));
    expect(intervals.map(told).slice(-2)).toEqual(['frame transmit loading', 'frame transmit waiting']);
    const frame = exchangePlan({ kind: 'exchange', ...unacknowledged }, link).phases.find(({ id }) => id === 'frame');
    expect(intervals.slice(-2).reduce((sumS, { durationS }) => sumS + durationS, 0)).toBeCloseTo(frame?.meanS ?? 0, 12);
  });

  test.each([
    [{ partId: 'none' }, 'unknown-part', 'partId'],
    [{ stateId: 'none' }, 'unknown-state', 'stateId'],
  ])('by %o is an error at the loading', (own, code, field) => {
    const error = errorOf(EngineErrors, () => compile(withLoading(own)));
    expect(error.errors[0]).toMatchObject({ code, field: `node.routines[0].steps[0].duration.loading.${field}` });
  });
});
