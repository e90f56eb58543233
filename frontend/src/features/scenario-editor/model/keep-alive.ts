import type { KeepAlive, Schedule } from '#common/engine/scenario/scenario.types.ts';

export type Every = Extract<Schedule, { kind: 'every' }>;
export type KeepAliveSide = keyof KeepAlive;

/** What may keep a child from sleeping longer, in the order in which it is asked for. */
export const KEEP_ALIVE_SIDES: readonly { side: KeepAliveSide; label: string; word: string; hint: string }[] = [
  { side: 'pollS', label: 'Poll', word: 'poll', hint: 'longest latency to the child' },
  { side: 'supervisionS', label: 'Supervision', word: 'supervision', hint: 'heard by the network' },
  { side: 'childTimeoutS', label: 'Child timeout', word: 'child timeout', hint: 'parent drops the child' },
];

/** The side whose period is the shortest, the first of equals; null where none is given. */
export function countingSide(keepAlive: KeepAlive | undefined): KeepAliveSide | null {
  let counting: KeepAliveSide | null = null;
  for (const { side } of KEEP_ALIVE_SIDES) {
    const periodS = keepAlive?.[side];
    if (periodS !== undefined && periodS < ((counting && keepAlive?.[counting]) ?? Infinity)) counting = side;
  }
  return counting;
}

/** The schedule with one of the three periods given or taken away; the shortest left is the period. */
export function withKeepAlive(schedule: Schedule, side: KeepAliveSide, periodS: number | undefined): Schedule {
  if (schedule.kind !== 'every') return schedule;
  const { keepAlive: before = {}, ...rest } = schedule;
  const { [side]: _, ...others } = before;
  const keepAlive: KeepAlive = periodS === undefined ? others : { ...others, [side]: periodS };
  const counting = countingSide(keepAlive);
  if (counting === null) return rest;
  return { ...rest, keepAlive, periodS: keepAlive[counting] ?? rest.periodS };
}

/** The schedule with another period; where three periods are given, the one that counts is changed. */
export function withPeriod(schedule: Schedule, periodS: number): Schedule {
  const counting = schedule.kind === 'every' ? countingSide(schedule.keepAlive) : null;
  if (counting !== null) return withKeepAlive(schedule, counting, periodS);
  return 'periodS' in schedule ? { ...schedule, periodS } : schedule;
}
