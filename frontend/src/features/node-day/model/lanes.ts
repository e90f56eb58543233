import type { Interval, PartProgram, RoutineProgram, Scenario, Schedule, State } from '#common/engine/index.ts';

/** A stretch of the picture; `from` and `to` as shares of its width. */
export interface Span {
  from: number;
  to: number;
}

export interface Column extends Span {
  intervalId: string;
  kind: Interval['kind'] | 'rest';
  stepId: string | null;
  durationS: number;
}

/** Columns of one step with the moves into it. */
export interface StepSpan extends Span {
  stepId: string | null;
  kind: 'step' | 'return' | 'rest';
  name: string;
  /** Of the step itself, without moves, s. */
  durationS: number;
}

export type Tint = 1 | 2 | 3 | 4 | 5;

export interface Block extends Span {
  kind: 'state' | 'transition';
  name: string;
  currentA: number;
  tint: Tint;
  role: State['role'] | null;
}

export interface Lane {
  partId: string;
  name: string;
  restName: string;
  restCurrentA: number;
  blocks: Block[];
}

export interface CyclePicture {
  columns: Column[];
  steps: StepSpan[];
  lanes: Lane[];
  /** Sum of the weights of the columns: a measure of how much room the picture wants. */
  weight: number;
}

/** Rest is the longest by far; it gets no more room than this share. */
const REST_SHARE = 0.1;
/** Borders between the tints, A. */
export const TINT_BORDERS_A = [10e-6, 100e-6, 1e-3, 10e-3] as const;

export function tintOf(currentA: number): Tint {
  if (currentA < TINT_BORDERS_A[0]) return 1;
  if (currentA < TINT_BORDERS_A[1]) return 2;
  if (currentA < TINT_BORDERS_A[2]) return 3;
  if (currentA < TINT_BORDERS_A[3]) return 4;
  return 5;
}

/** One cycle of a routine as columns on a logarithmic scale of time and a lane for each part. */
export function cyclePicture(scenario: Scenario, routine: RoutineProgram, parts: readonly PartProgram[]): CyclePicture {
  const columns = columnsOf(routine);
  return {
    columns,
    steps: stepSpans(routine, columns),
    lanes: parts.map((part, partIndex) => laneOf(scenario, routine, part, { partIndex, columns })),
    weight: weights(routine.intervals).reduce((sum, weight) => sum + weight, 0),
  };
}

/** One more for each tenfold time, so that longer is always wider. */
function weights(intervals: readonly Interval[]): number[] {
  const shortestS = Math.min(...intervals.map((interval) => Math.max(interval.durationS, 1e-6)));
  return intervals.map(({ durationS }) => 1.25 + Math.log10(Math.max(durationS, 1e-6) / shortestS));
}

function columnsOf(routine: RoutineProgram): Column[] {
  const { intervals } = routine;
  const restS = restOfCycle(routine);
  const restShare = restS === null ? 0 : intervals.length === 0 ? 1 : REST_SHARE;
  const own = weights(intervals);
  const total = own.reduce((sum, weight) => sum + weight, 0);
  let at = 0;
  const columns: Column[] = intervals.map((interval, i) => {
    const from = at;
    at += ((own[i] ?? 0) / total) * (1 - restShare);
    return {
      intervalId: interval.id,
      kind: interval.kind,
      stepId: interval.stepId,
      durationS: interval.durationS,
      from,
      to: at,
    };
  });
  if (restS !== null) {
    columns.push({ intervalId: 'rest', kind: 'rest', stepId: null, durationS: restS, from: 1 - restShare, to: 1 });
  }
  return columns;
}

/** Time at rest until the next cycle, s; null where cycles follow each other or none follows. */
function restOfCycle({ schedule, cycleS, intervals }: RoutineProgram): number | null {
  const periodS = periodOf(schedule);
  if (periodS === null) return null;
  const last = intervals.at(-1);
  const busyS = last ? Math.max(cycleS, last.startS + last.durationS) : cycleS;
  return periodS > busyS ? periodS - busyS : null;
}

function periodOf(schedule: Schedule): number | null {
  switch (schedule.kind) {
    case 'every':
    case 'window':
      return schedule.periodS;
    case 'random':
      return schedule.meanPerDay > 0 ? 86_400 / schedule.meanPerDay : null;
    default:
      return null;
  }
}

function stepSpans({ intervals }: RoutineProgram, columns: readonly Column[]): StepSpan[] {
  const spans: StepSpan[] = [];
  columns.forEach((column, i) => {
    const kind = column.kind === 'move' ? 'step' : column.kind;
    const last = spans.at(-1);
    const durationS = column.kind === 'move' ? 0 : column.durationS;
    if (last && last.kind === kind && last.stepId === column.stepId) {
      last.to = column.to;
      last.durationS += durationS;
      return;
    }
    const name = kind === 'step' ? (intervals[i]?.stepName ?? '') : kind === 'return' ? 'return' : 'rest';
    spans.push({
      from: column.from,
      to: column.to,
      stepId: kind === 'step' ? column.stepId : null,
      kind,
      name,
      durationS,
    });
  });
  return spans;
}

function laneOf(
  scenario: Scenario,
  { intervals }: RoutineProgram,
  { partId, name, restStateId, restDraw }: PartProgram,
  { partIndex, columns }: { partIndex: number; columns: readonly Column[] },
): Lane {
  const states = scenario.node.parts.find((part) => part.id === partId)?.states ?? [];
  const stateOf = (id: string): State | undefined => states.find((state) => state.id === id);
  const blocks: Block[] = [];
  let lastKey = '';
  intervals.forEach((interval, i) => {
    const column = columns[i];
    const occupant = interval.occupants.find((candidate) => candidate.partIndex === partIndex);
    if (!column || !occupant) {
      lastKey = '';
      return;
    }
    const { activity, draw } = occupant;
    const key = activity.kind === 'state' ? activity.stateId : `${activity.fromStateId}>${activity.toStateId}`;
    const last = blocks.at(-1);
    if (last && key === lastKey) last.to = column.to;
    else {
      const state = stateOf(activity.kind === 'state' ? activity.stateId : activity.toStateId);
      blocks.push({
        from: column.from,
        to: column.to,
        kind: activity.kind,
        name: activity.kind === 'state' ? (state?.name ?? '') : `→ ${state?.name ?? ''}`,
        currentA: draw.currentA,
        tint: tintOf(draw.currentA),
        role: activity.kind === 'state' ? (state?.role ?? null) : null,
      });
    }
    lastKey = key;
  });
  return { partId, name, restName: stateOf(restStateId)?.name ?? '', restCurrentA: restDraw.currentA, blocks };
}
