import type { Cell } from '../scenario/scenario.types.ts';
import { requireNumber } from '../link/checks.ts';
import { expectedMinimumBelow } from './expected-minimum.ts';
import { standardDeviation } from './standard-deviation.ts';

export interface PackFactors {
  /** Pack over cell, open-circuit voltage. */
  openCircuitFactor: number;
  /** Pack over typical cell, charge. */
  capacityFactor: number;
  /** Pack over cell, resistance. */
  resistanceFactor: number;
}

/**
 * What a pack makes of a cell. Series multiplies voltage and resistance, parallel multiplies capacity and divides resistance.
 * A string ends with its weakest group: the expected minimum of n normal values, whose relative spread is that of the cell's
 * capacity over √parallel.
 *
 * Source: expected values of normal order statistics; spread of a mean of independent values.
 * Valid for: cells that differ independently; a spread so wide that nothing would be left gives a capacity of 0.
 *
 * @param cell The cell; only its capacity is looked at.
 * @param pack Cells in series and in parallel, whole, 1 or more.
 * @returns Factors from one typical cell to the pack.
 * @throws OutOfRangeError code `out-of-range` for a count that is not whole or below 1.
 * @example packOf({ capacityC: { typical: 9360 } }, { series: 2, parallel: 3 }).capacityFactor // 3
 */
export function packOf(
  cell: Pick<Cell, 'capacityC'>,
  { series, parallel }: { series: number; parallel: number },
): PackFactors {
  requireNumber(series, { field: 'series', min: 1, whole: true });
  requireNumber(parallel, { field: 'parallel', min: 1, whole: true });
  const relativeSpread = standardDeviation(cell.capacityC) / cell.capacityC.typical / Math.sqrt(parallel);
  const weakest = relativeSpread > 0 ? 1 - expectedMinimumBelow(series) * relativeSpread : 1;
  return {
    openCircuitFactor: series,
    capacityFactor: parallel * Math.max(weakest, 0),
    resistanceFactor: series / parallel,
  };
}
