import type { LoadSight } from '../supply/cell-load.ts';
import { loadedVoltageV } from '../supply/cell-load.ts';
import { firstFailingShare } from '../supply/first-failing-share.ts';
import type { TestCase } from './candidates.ts';
import type { TestConditions } from './dekad-load.ts';
import { sourceAt, stretchOf } from './source-tables.ts';
import type { SourceTables } from './source-tables.ts';

/** Where and by what a node first fails. */
export interface Failure {
  /** Share of the starting charge that is spent then. */
  spent: number;
  /** The moment that fails; null when the charge is exhausted. */
  testCase: TestCase | null;
}

/**
 * The first failure while the charge goes down under constant conditions: depth 1 reached, or a moment whose loaded voltage falls
 * below its limit. Both ends are tested too.
 *
 * @param source Tables of the pack.
 * @param conditions Conditions of the tests.
 * @param sight What loads see of the cell's voltage.
 * @param range Share spent at the beginning and at the end.
 * @returns The first failure, null for none. At equal charge exhaustion comes first, then the earlier case.
 * @example firstFailure(source, conditions, sight, { fromSpent: 0, toSpent: 0.1 })
 */
export function firstFailure(
  source: SourceTables,
  conditions: TestConditions,
  sight: LoadSight,
  { fromSpent, toSpent }: { fromSpent: number; toSpent: number },
): Failure | null {
  const { capacityFactor, openCircuitShiftV } = conditions;
  const fromDepth = fromSpent / capacityFactor;
  if (fromDepth >= 1) return { spent: fromSpent, testCase: null };
  const toDepth = Math.min(1, toSpent / capacityFactor);
  const { low, high, piece } = source.room;
  sourceAt(source, fromDepth, low);
  let depth = fromDepth;
  for (let stretch = stretchOf(source, fromDepth); ; stretch++) {
    const endDepth = Math.min(source.depths[stretch + 1] ?? 1, toDepth);
    sourceAt(source, endDepth, high);
    piece.openCircuitFromV = low.openCircuitV + openCircuitShiftV;
    piece.openCircuitToV = high.openCircuitV + openCircuitShiftV;
    const first = firstOf(conditions, sight, source.room);
    if (first) {
      const failingDepth = depth + first.share * (endDepth - depth);
      const spent = first.share === 0 && depth === fromDepth ? fromSpent : failingDepth * capacityFactor;
      return { spent: Math.max(fromSpent, spent), testCase: first.testCase };
    }
    if (endDepth >= toDepth) break;
    depth = endDepth;
    low.openCircuitV = high.openCircuitV;
    low.resistanceFactor = high.resistanceFactor;
  }
  return toDepth >= 1 ? { spent: capacityFactor, testCase: null } : null;
}

/**
 * Whether everything works at one charge.
 *
 * @param source Tables of the pack.
 * @param conditions Conditions of the tests.
 * @param sight What loads see of the cell's voltage.
 * @param spent Share of the starting charge that is spent.
 * @returns Whether there is charge left, and every case holds its limit.
 * @example worksAt(source, conditions, sight, 0)
 */
export function worksAt(
  source: SourceTables,
  { capacityFactor, openCircuitShiftV, resistanceFactor, cases }: TestConditions,
  sight: LoadSight,
  spent: number,
): boolean {
  if (spent >= capacityFactor) return false;
  const point = sourceAt(source, spent / capacityFactor, source.room.low);
  const openCircuitV = point.openCircuitV + openCircuitShiftV;
  for (const { load, limitV, freshOhm } of cases) {
    const ohm = freshOhm * resistanceFactor * point.resistanceFactor;
    if (!(loadedVoltageV(load, sight, openCircuitV, ohm) >= limitV)) return false;
  }
  return true;
}

/** The case that fails first between the two points of a room, whose piece has the voltages already. */
function firstOf(
  { cases, resistanceFactor }: TestConditions,
  sight: LoadSight,
  { low, high, piece }: SourceTables['room'],
): { share: number; testCase: TestCase } | null {
  let firstShare = Infinity;
  let first: TestCase | null = null;
  for (const testCase of cases) {
    const ohm = testCase.freshOhm * resistanceFactor;
    piece.resistanceFromOhm = low.resistanceFactor * ohm;
    piece.resistanceToOhm = high.resistanceFactor * ohm;
    const share = firstFailingShare(testCase, sight, piece);
    if (share === null || share >= firstShare) continue;
    firstShare = share;
    first = testCase;
  }
  return first && { share: firstShare, testCase: first };
}

/** The moment with the least headroom. */
export interface LeastHeadroom {
  testCase: TestCase;
  /** Loaded voltage, V; 0 where the source collapses. */
  loadedV: number;
  /** Limit, V; where the rail can never reach the limit, the loaded voltage and what the rail lacks. */
  limitV: number;
  headroomV: number;
}

/**
 * The critical moment at one charge: the case with the least headroom, the first of equal ones.
 *
 * @param source Tables of the pack.
 * @param conditions Conditions of the tests, with at least one case.
 * @param view What loads see of the cell's voltage, and the highest voltage that the rail can have, V.
 * @param spent Share of the starting charge that is spent.
 * @returns The moment; null without any case.
 * @example leastHeadroom(source, conditions, converter, 0)?.headroomV
 */
export function leastHeadroom(
  source: SourceTables,
  { capacityFactor, openCircuitShiftV, resistanceFactor, cases }: TestConditions,
  view: { sight: LoadSight; highestRailV: number },
  spent: number,
): LeastHeadroom | null {
  const point = sourceAt(source, spent / capacityFactor, source.room.low);
  const openCircuitV = point.openCircuitV + openCircuitShiftV;
  let least: TestCase | null = null;
  let leastV = Infinity;
  let loadedV = 0;
  for (const testCase of cases) {
    const ohm = testCase.freshOhm * resistanceFactor * point.resistanceFactor;
    const voltageV = loadedVoltageV(testCase.load, view.sight, openCircuitV, ohm);
    // A collapse and a limit out of reach are worse than any voltage.
    const headroomV = Number.isNaN(voltageV) ? -Infinity : voltageV - testCase.limitV;
    if (least !== null && headroomV >= leastV) continue;
    least = testCase;
    leastV = headroomV;
    loadedV = Number.isNaN(voltageV) ? 0 : voltageV;
  }
  if (least === null) return null;
  if (least.limitV < Infinity)
    return { testCase: least, loadedV, limitV: least.limitV, headroomV: loadedV - least.limitV };
  const headroomV = view.highestRailV - least.candidate.limit.railV;
  return { testCase: least, loadedV, limitV: loadedV - headroomV, headroomV };
}
