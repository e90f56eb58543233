import type { Table } from '../scenario/scenario.types.ts';
import { requireNumber } from '../link/checks.ts';
import { firstFailingShare } from './first-failing-share.ts';
import { tableValue } from './table-value.ts';

export interface UsableChargeInput {
  capacityC: number;
  /** [depth 0 to 1, V]. */
  openCircuitTableV: Table;
  /** [depth 0 to 1, Ω]. */
  resistanceTableOhm: Table;
  /** Current of the heaviest pulse, A. */
  peakA: number;
  /** Lowest voltage allowed under that pulse, V. */
  cutOffV: number;
}

/**
 * Charge that can be drawn before a pulse first pulls the voltage below the cut-off: `V(d) = OCV(d) − I·R(d)`, both tables piecewise
 * linear in depth.
 *
 * Source: Ohm's law on merged tables.
 *
 * @param input Capacity, C; tables; pulse, A; cut-off, V.
 * @returns Charge, C, 0 to the capacity.
 * @throws OutOfRangeError code `out-of-range` for a negative figure, `empty-table` for a table without rows.
 * @example usableChargeC({ capacityC: 100, openCircuitTableV: [[0, 3], [1, 2]], resistanceTableOhm: [[0, 0]], peakA: 0, cutOffV: 2.5 }) // 50
 */
export function usableChargeC(input: UsableChargeInput): number {
  const { capacityC, openCircuitTableV, resistanceTableOhm, peakA, cutOffV } = input;
  requireNumber(capacityC, { field: 'capacityC', min: 0, unit: 'C' });
  requireNumber(peakA, { field: 'peakA', min: 0, unit: 'A' });
  requireNumber(cutOffV, { field: 'cutOffV', min: 0, unit: 'V' });
  const depths = mergedDepths(openCircuitTableV, resistanceTableOhm);
  const limited = { load: { constantA: peakA, powerW: 0, conductanceS: 0 }, limitV: cutOffV };
  let from = 0;
  for (const to of depths) {
    const share = firstFailingShare(
      limited,
      { dropV: 0, ceilingV: Infinity },
      {
        openCircuitFromV: tableValue(openCircuitTableV, from),
        openCircuitToV: tableValue(openCircuitTableV, to),
        resistanceFromOhm: tableValue(resistanceTableOhm, from),
        resistanceToOhm: tableValue(resistanceTableOhm, to),
      },
    );
    if (share !== null) return capacityC * (from + share * (to - from));
    from = to;
  }
  return capacityC;
}

/**
 * Depths at which any of some tables has a row, with 0 and 1.
 *
 * @param tables Tables whose first column is a depth.
 * @returns Increasing depths from 0 to 1.
 * @example mergedDepths([[0, 3], [0.5, 2]], [[0.2, 1]]) // [0, 0.2, 0.5, 1]
 */
export function mergedDepths(...tables: Readonly<Table>[]): number[] {
  const depths = new Set([0, 1]);
  for (const table of tables) for (const [depth] of table) if (depth > 0 && depth < 1) depths.add(depth);
  return [...depths].sort((a, b) => a - b);
}
