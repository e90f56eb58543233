import { freshResistanceOhm } from '../supply/cell-figures.ts';
import type { CellLoad } from '../supply/cell-load.ts';
import type { Cell } from '../scenario/scenario.types.ts';
import { cellLimitV } from './converter.ts';
import type { Converter } from './converter.ts';
import { railLimit } from './node-loads.ts';
import type { IntervalLoad, NodeLoads, RailLimit } from './node-loads.ts';

/** A moment that may be the critical one: an interval, or rest, with `always` routines added. */
export interface Candidate {
  /** Whole load, rest and leakages included. */
  vector: Float64Array;
  limit: RailLimit;
  /** Limit of the parts in use alone, and which parts are away from a rest state with a limit. */
  busy: RailLimit;
  awayMask: number;
  /** The limit at the cell, V; Infinity when the rail never reaches it. */
  limitV: number;
  /** Of the fresh pack at 20 °C for a load of this length, Ω. */
  freshOhm: number;
  /** The interval, null for rest. */
  source: IntervalLoad | null;
}

/** A candidate with its load on the cell. */
export interface TestCase {
  load: CellLoad;
  limitV: number;
  /** Of the fresh pack at 20 °C, Ω. */
  freshOhm: number;
  candidate: Candidate;
}

export interface CandidateContext {
  loads: NodeLoads;
  converter: Converter;
  resistanceOhm: Cell['resistanceOhm'];
  resistanceFactor: number;
}

/** What may be critical in a dekad, and what of it counts when the node rests. */
export interface CandidateLists {
  /** Every interval that is on, and rest; without those that another one covers in load, limit and resistance. */
  all: Candidate[];
  /** Rest with whatever runs always. */
  rest: Candidate[];
  /** The cases of `all`, once made, where no load depends on temperature. */
  fixedCases?: TestCase[];
}

/**
 * Lists what may be critical while some routines are on.
 *
 * A candidate that draws no more in any respect, has no higher limit and no higher resistance than another can never be critical
 * alone, so it is dropped; a list of a hundred intervals shrinks to a handful, at every temperature and voltage alike.
 *
 * @param context Loads, regulator and resistance.
 * @param isOn Whether the routine of an index is on.
 * @param isAlways Whether it is repeated back to back.
 * @returns The lists.
 * @example candidateLists(context, () => true, () => false).all.length
 */
export function candidateLists(
  context: CandidateContext,
  isOn: (routineIndex: number) => boolean,
  isAlways: (routineIndex: number) => boolean,
): CandidateLists {
  const { intervals } = context.loads;
  let grounds: Candidate[] = [restCandidate(context)];
  const always = new Map<number, IntervalLoad[]>();
  const others: IntervalLoad[] = [];
  for (const load of intervals) {
    if (!isOn(load.routineIndex)) continue;
    if (!isAlways(load.routineIndex)) others.push(load);
    else always.set(load.routineIndex, [...(always.get(load.routineIndex) ?? []), load]);
  }
  // Each moment lies in one interval of each `always` routine: combine them.
  for (const loads of always.values()) grounds = uncovered(context, grounds, loads, coversUnder);
  const all = uncovered(context, grounds, others, covers);
  for (const ground of grounds) keep(all, ground, covers);
  return { all, rest: grounds };
}

/**
 * The moments of one routine alone, for example of one that runs once.
 *
 * @param context Loads, regulator and resistance.
 * @param grounds Rest with whatever runs always.
 * @param routineIndex The routine.
 * @returns Its candidates that no other of them covers.
 * @example routineCandidates(context, lists.rest, 0)
 */
export function routineCandidates(
  context: CandidateContext,
  grounds: readonly Candidate[],
  routineIndex: number,
): Candidate[] {
  const own = context.loads.intervals.filter((load) => load.routineIndex === routineIndex);
  return uncovered(context, grounds, own, covers);
}

function restCandidate({ converter, resistanceOhm, resistanceFactor, loads }: CandidateContext): Candidate {
  const busy = { railV: 0, partIndex: -1 };
  const limit = railLimit(loads.restLimitsV, busy, 0);
  const freshOhm = freshResistanceOhm(resistanceOhm, Infinity) * resistanceFactor;
  const limitV = cellLimitV(converter, limit.railV);
  return { vector: loads.rest, limit, busy, awayMask: 0, limitV, freshOhm, source: null };
}

type Covers = (strong: Candidate, weak: Candidate) => boolean;

/** Intervals on top of grounds, told as the intervals themselves, without those that another one covers. */
function uncovered(
  context: CandidateContext,
  grounds: readonly Candidate[],
  loads: readonly IntervalLoad[],
  isCovered: Covers,
): Candidate[] {
  const kept: Candidate[] = [];
  // Most are covered at once, so one object serves until it is kept.
  let next: Candidate | null = null;
  for (const load of loads) {
    for (const ground of grounds) {
      next ??= blank(context);
      putOn(context, ground, load, next);
      if (keep(kept, next, isCovered)) next = null;
    }
  }
  return kept;
}

function blank({ loads }: CandidateContext): Candidate {
  const busy = { railV: 0, partIndex: -1 };
  const vector = new Float64Array(loads.width);
  return { vector, limit: busy, busy, awayMask: 0, limitV: 0, freshOhm: 0, source: null };
}

/** Makes a candidate what a ground with an interval on top is. */
function putOn(context: CandidateContext, ground: Candidate, load: IntervalLoad, candidate: Candidate): void {
  const { loads, converter, resistanceOhm, resistanceFactor } = context;
  const { vector } = candidate;
  for (let at = 0; at < vector.length; at++) {
    vector[at] = (ground.vector[at] ?? 0) + (loads.intervalExcess[load.offset + at] ?? 0);
  }
  candidate.busy = ground.busy.railV > load.busy.railV ? ground.busy : load.busy;
  candidate.awayMask = ground.awayMask | load.awayMask;
  candidate.limit = railLimit(loads.restLimitsV, candidate.busy, candidate.awayMask);
  candidate.limitV = cellLimitV(converter, candidate.limit.railV);
  candidate.freshOhm = freshResistanceOhm(resistanceOhm, load.interval.longestS) * resistanceFactor;
  candidate.source = load;
}

/** Adds a candidate unless one that is there covers it, and drops those that it covers; the order of the others is kept. */
function keep(kept: Candidate[], next: Candidate, isCovered: Covers): boolean {
  for (const strong of kept) if (isCovered(strong, next)) return false;
  let at = 0;
  for (const weak of kept) if (!isCovered(next, weak)) kept[at++] = weak;
  kept.length = at;
  kept.push(next);
  return true;
}

/** Covers it under any interval on top too, which may take parts out of rest states with a limit. */
function coversUnder(strong: Candidate, weak: Candidate): boolean {
  return strong.busy.railV >= weak.busy.railV && (strong.awayMask & ~weak.awayMask) === 0 && covers(strong, weak);
}

function covers(strong: Candidate, weak: Candidate): boolean {
  if (strong.limitV < weak.limitV || strong.freshOhm < weak.freshOhm) return false;
  const { vector } = strong;
  for (let index = 0; index < vector.length; index++) {
    if ((vector[index] ?? 0) < (weak.vector[index] ?? 0)) return false;
  }
  return true;
}
