import type { Table } from '../scenario/scenario.types.ts';
import { requireNumber } from '../link/checks.ts';
import { tableValue } from './table-value.ts';

/**
 * Capacity of a cell at a constant current, linear in ln I between measured points and held constant beyond them: a power law
 * must never be extrapolated, since self-discharge wins at small currents.
 *
 * Source: interpolation; the warning from Linden's Handbook of Batteries, Fig. 14.17.
 *
 * @param input Table [A, C], currents above 0 and increasing; current, A, 0 or more.
 * @returns Capacity, C.
 * @throws OutOfRangeError code `out-of-range` for a negative current, `empty-table` for a table without rows.
 * @example capacityAtCurrentC({ table: [[0.001, 100], [0.1, 50]], currentA: 0.01 }) // 75
 */
export function capacityAtCurrentC({ table, currentA }: { table: Readonly<Table>; currentA: number }): number {
  requireNumber(currentA, { field: 'currentA', min: 0, unit: 'A' });
  const logTable = table.map(([rowA, capacityC]): [number, number] => [Math.log(rowA), capacityC]);
  return tableValue(logTable, Math.log(currentA));
}
