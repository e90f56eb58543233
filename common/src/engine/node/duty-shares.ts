import { DAY_S } from '#common/units/si.ts';
import type { Activity, NodeProgram, Segment } from './node-program.types.ts';
import { cyclesPerDay } from './schedule-rate.ts';

/** Share of time of one part in one state, or on one transition. */
export interface DutyShare {
  partIndex: number;
  partId: string;
  /** State, or for a transition the state reached. */
  stateId: string;
  /** For a transition the state left, otherwise null. */
  fromStateId: string | null;
  /** 0 to 1; above 1 when the routines ask for more time than there is. */
  share: number;
  draw: Segment['draw'];
}

/**
 * Share of time that each part spends in each state and transition, with the routines superposed. Rest has what is left, at
 * least 0.
 *
 * @param program A compiled node.
 * @param ratesPerS Cycles per second by routine, in the order of the program.
 * @returns Rest first, then the rest in the order of the routines, part by part.
 * @example dutyShares(program, program.routines.map(() => 1 / 900))
 */
export function dutyShares(program: NodeProgram, ratesPerS: readonly number[]): DutyShare[] {
  const byPart = program.parts.map((): DutyShare[] => []);
  // Segments of one state mostly share their activity object: found by that, no ids are compared.
  const byActivity = program.parts.map(() => new Map<Activity, DutyShare>());
  program.routines.forEach((routine, routineIndex) => {
    const ratePerS = ratesPerS[routineIndex] ?? 0;
    for (const segment of routine.segments) {
      const activities = byActivity[segment.partIndex];
      let known = activities?.get(segment.activity);
      if (!known) {
        known = knownShare(byPart[segment.partIndex] ?? [], segment, program.parts);
        activities?.set(segment.activity, known);
      }
      for (const termS of segment.durationTermsS) known.share += ratePerS * termS;
    }
  });
  return program.parts.flatMap(({ partId, restStateId, restDraw }, partIndex) => {
    const shares = byPart[partIndex] ?? [];
    let busy = 0;
    for (const { share } of shares) busy += share;
    const share = Math.max(0, 1 - busy);
    return [{ partIndex, partId, stateId: restStateId, fromStateId: null, share, draw: restDraw }, ...shares];
  });
}

function knownShare(
  shares: DutyShare[],
  { partIndex, activity, draw }: Segment,
  parts: NodeProgram['parts'],
): DutyShare {
  const stateId = activity.kind === 'state' ? activity.stateId : activity.toStateId;
  const fromStateId = activity.kind === 'state' ? null : activity.fromStateId;
  for (const share of shares) if (share.stateId === stateId && share.fromStateId === fromStateId) return share;
  const partId = parts[partIndex]?.partId ?? '';
  const next: DutyShare = { partIndex, partId, stateId, fromStateId, share: 0, draw };
  shares.push(next);
  return next;
}

/** What asks for more time than there is. Empty lists: nothing. */
export interface Oversubscription {
  /** Routines whose cycle is longer than their (mean) period. */
  routines: { routineId: string; cycleS: number; periodS: number }[];
  /** Parts that are away from rest for more than all the time. */
  parts: { partId: string; share: number }[];
}

/** Relative excess below which a share of 1 counts as 1: roundings of its sum. */
const ROUNDING = 1e-9;

/**
 * Tells what of a node is oversubscribed: a routine longer than its period, a part busy for more than all the time. This is an
 * answer, not an error.
 *
 * @param program A compiled node.
 * @param ratesPerS Cycles per second by routine, in the order of the program; a routine whose rate is 0 asks for no time.
 * @returns Routines and parts that are oversubscribed.
 * @example oversubscription(program, [1 / 900]).parts.length === 0
 */
export function oversubscription(program: NodeProgram, ratesPerS: readonly number[]): Oversubscription {
  const routines = program.routines.flatMap(({ routineId, schedule, cycleS }, index) => {
    const perDay = schedule.kind === 'window' ? DAY_S / schedule.periodS : cyclesPerDay(schedule, cycleS);
    if (schedule.kind === 'always' || !(perDay > 0) || !((ratesPerS[index] ?? 0) > 0)) return [];
    const periodS = DAY_S / perDay;
    return cycleS > periodS * (1 + ROUNDING) ? [{ routineId, cycleS, periodS }] : [];
  });
  const busyShares = program.parts.map(() => 0);
  for (const { partIndex, partId, stateId, fromStateId, share } of dutyShares(program, ratesPerS)) {
    const isRest = fromStateId === null && stateId === program.parts[partIndex]?.restStateId;
    if (!isRest && partId !== '') busyShares[partIndex] = (busyShares[partIndex] ?? 0) + share;
  }
  const parts = program.parts.flatMap(({ partId }, index) => {
    const share = busyShares[index] ?? 0;
    return share > 1 + ROUNDING ? [{ partId, share }] : [];
  });
  return { routines, parts };
}
