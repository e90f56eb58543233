import { freshResistanceOhm } from '../supply/cell-figures.ts';
import type { Cell } from '../scenario/scenario.types.ts';
import { cellLimitV } from './converter.ts';
import type { Converter } from './converter.ts';
import type { IntervalLoad, NodeLoads, RailLimit } from './node-loads.ts';

/** A moment that may be the critical one: an interval, or rest, with `always` routines added. */
export interface Candidate {
  /** Whole load, rest and leakages included. */
  vector: Float64Array;
  limit: RailLimit;
  /** The limit at the cell, V; Infinity when the rail never reaches it. */
  limitV: number;
  /** Of the fresh pack at 20 °C for a load of this length, Ω. */
  freshOhm: number;
  /** The interval, null for rest. */
  source: IntervalLoad | null;
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
  const { intervals, rest, restLimit } = context.loads;
  let grounds: Candidate[] = [candidate(context, { vector: rest, limit: restLimit, source: null })];
  const always = new Map<number, IntervalLoad[]>();
  for (const load of intervals) {
    if (!isOn(load.routineIndex) || !isAlways(load.routineIndex)) continue;
    const known = always.get(load.routineIndex) ?? [];
    known.push(load);
    always.set(load.routineIndex, known);
  }
  // Each moment lies in one interval of each `always` routine: combine them.
  for (const loads of always.values()) {
    grounds = uncovered(grounds.flatMap((ground) => loads.map((load) => added(context, ground, load))));
  }
  const others = intervals.filter(({ routineIndex }) => isOn(routineIndex) && !isAlways(routineIndex));
  const all = others.flatMap((load) => grounds.map((ground) => added(context, ground, load)));
  return { all: uncovered([...all, ...grounds]), rest: grounds };
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
  return uncovered(own.flatMap((load) => grounds.map((ground) => added(context, ground, load))));
}

function candidate(
  { converter, resistanceOhm, resistanceFactor }: CandidateContext,
  { vector, limit, source }: Pick<Candidate, 'vector' | 'limit' | 'source'>,
): Candidate {
  const durationS = source?.interval.durationS ?? Infinity;
  return {
    vector,
    limit,
    limitV: cellLimitV(converter, limit.railV),
    freshOhm: freshResistanceOhm(resistanceOhm, durationS) * resistanceFactor,
    source,
  };
}

/** An interval on top of a ground, told as the interval itself. */
function added(context: CandidateContext, ground: Candidate, load: IntervalLoad): Candidate {
  const vector = new Float64Array(ground.vector);
  for (let index = 0; index < vector.length; index++) vector[index] = (vector[index] ?? 0) + (load.excess[index] ?? 0);
  // A limit of plain rest is already in the interval's own, less the parts that it occupies.
  const isStronger = ground.source !== null && ground.limit.railV > load.limit.railV;
  const limit = isStronger ? ground.limit : load.limit;
  return candidate(context, { vector, limit, source: load });
}

/** Drops candidates that an earlier or stronger one covers; the order of those that stay is kept. */
function uncovered(candidates: readonly Candidate[]): Candidate[] {
  const kept: Candidate[] = [];
  for (const next of candidates) {
    if (kept.some((strong) => covers(strong, next))) continue;
    let at = 0;
    for (const strong of kept) if (!covers(next, strong)) kept[at++] = strong;
    kept.length = at;
    kept.push(next);
  }
  return kept;
}

function covers(strong: Candidate, weak: Candidate): boolean {
  if (strong.limitV < weak.limitV || strong.freshOhm < weak.freshOhm) return false;
  const { vector } = strong;
  for (let index = 0; index < vector.length; index++) {
    if ((vector[index] ?? 0) < (weak.vector[index] ?? 0)) return false;
  }
  return true;
}
