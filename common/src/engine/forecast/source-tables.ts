import type { Cell } from '../scenario/scenario.types.ts';
import type { SourcePiece } from '../supply/first-failing-share.ts';
import type { PackFactors } from '../supply/pack-of.ts';
import { tableValue } from '../supply/table-value.ts';
import { mergedDepths } from '../supply/usable-charge.ts';

/** Open-circuit voltage at 20 °C and resistance factor of a pack on merged depths, from 0 to 1. */
export interface SourceTables {
  depths: Float64Array;
  openCircuitV: Float64Array;
  resistanceFactors: Float64Array;
  /** Room for the tests of one stretch, which are made tens of thousands of times in a forecast. */
  room: { low: SourcePoint; high: SourcePoint; piece: SourcePiece };
}

/** The source at one depth. */
export interface SourcePoint {
  openCircuitV: number;
  resistanceFactor: number;
}

/**
 * Merges a cell's tables by depth into those of its pack.
 *
 * @param cell The cell.
 * @param pack Factors of the pack.
 * @returns Tables on the same depths, 0 first and 1 last.
 * @example sourceTables(cell, pack).depths[0] // 0
 */
export function sourceTables(
  cell: Pick<Cell, 'openCircuitTableV' | 'resistanceFactorByDepth'>,
  { openCircuitFactor }: Pick<PackFactors, 'openCircuitFactor'>,
): SourceTables {
  const { openCircuitTableV, resistanceFactorByDepth } = cell;
  const depths = mergedDepths(openCircuitTableV, resistanceFactorByDepth);
  return {
    depths: Float64Array.from(depths),
    openCircuitV: Float64Array.from(depths, (depth) => openCircuitFactor * tableValue(openCircuitTableV, depth)),
    resistanceFactors: Float64Array.from(depths, (depth) => tableValue(resistanceFactorByDepth, depth)),
    room: {
      low: { openCircuitV: 0, resistanceFactor: 0 },
      high: { openCircuitV: 0, resistanceFactor: 0 },
      piece: { openCircuitFromV: 0, openCircuitToV: 0, resistanceFromOhm: 0, resistanceToOhm: 0 },
    },
  };
}

/**
 * Index of the stretch between two merged depths that a depth lies in.
 *
 * @param tables The tables.
 * @param depth Depth, 0 or more.
 * @returns Index of its first depth; from depth 1 on the last stretch.
 * @example stretchOf(tables, 0.5)
 */
export function stretchOf({ depths }: SourceTables, depth: number): number {
  let low = 0;
  let high = depths.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((depths[middle] ?? 1) <= depth) low = middle;
    else high = middle;
  }
  return low;
}

/**
 * The source at a depth, held constant beyond depth 1.
 *
 * @param tables The tables.
 * @param depth Depth, 0 or more.
 * @param point Where the answer goes, so that inner loops make no objects.
 * @returns `point`.
 * @example sourceAt(tables, 0.5, { openCircuitV: 0, resistanceFactor: 0 }).openCircuitV
 */
export function sourceAt(tables: SourceTables, depth: number, point: SourcePoint): SourcePoint {
  const { depths, openCircuitV, resistanceFactors } = tables;
  const low = stretchOf(tables, depth);
  const fromDepth = depths[low] ?? 0;
  const share = Math.min(1, (depth - fromDepth) / ((depths[low + 1] ?? 1) - fromDepth));
  const fromV = openCircuitV[low] ?? 0;
  const fromFactor = resistanceFactors[low] ?? 0;
  point.openCircuitV = fromV + share * ((openCircuitV[low + 1] ?? fromV) - fromV);
  point.resistanceFactor = fromFactor + share * ((resistanceFactors[low + 1] ?? fromFactor) - fromFactor);
  return point;
}
