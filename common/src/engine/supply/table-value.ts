import { OutOfRangeError } from '#common/errors.ts';
import type { Table } from '../scenario/scenario.types.ts';

/** Row below and above an argument, and where it lies between them. */
export interface TablePlace {
  low: readonly [number, number];
  high: readonly [number, number];
  /** Share of the way from `low` to `high`, 0 to 1. */
  share: number;
  /** Whether the argument lies beyond the table, which is then held constant. */
  isClamped: boolean;
}

/**
 * Finds an argument in a table.
 *
 * @param table Pairs, first column strictly increasing, at least one.
 * @param x Argument, in the unit of the first column.
 * @returns The rows around it; beyond an end both are the end row.
 * @throws OutOfRangeError code `empty-table` for a table without rows.
 * @example tablePlace([[0, 1], [10, 3]], 5).share // 0.5
 */
export function tablePlace(table: Readonly<Table>, x: number): TablePlace {
  const first = table[0];
  const last = table[table.length - 1];
  if (!first || !last) {
    throw new OutOfRangeError('A table has no rows; at least one is needed.', {
      code: 'empty-table',
      field: 'table',
      expected: 'at least one row',
    });
  }
  if (x <= first[0]) return { low: first, high: first, share: 0, isClamped: x < first[0] };
  if (x >= last[0]) return { low: last, high: last, share: 0, isClamped: x > last[0] };
  let low = first;
  for (const row of table) {
    if (row[0] > x) return { low, high: row, share: (x - low[0]) / (row[0] - low[0]), isClamped: false };
    low = row;
  }
  return { low: last, high: last, share: 0, isClamped: false };
}

/**
 * Value of a table, piecewise linear and held constant beyond its ends.
 *
 * @param table Pairs, first column strictly increasing, at least one.
 * @param x Argument, in the unit of the first column.
 * @returns Value, in the unit of the second column.
 * @throws OutOfRangeError code `empty-table` for a table without rows.
 * @example tableValue([[-20, 0.6], [23, 1]], 0) // 0.786…
 */
export function tableValue(table: Readonly<Table>, x: number): number {
  const { low, high, share } = tablePlace(table, x);
  return low[1] + share * (high[1] - low[1]);
}

/**
 * Value of a table whose logarithm is piecewise linear, held constant beyond its ends.
 *
 * @param table Pairs, first column strictly increasing, second column above 0.
 * @param x Argument, in the unit of the first column.
 * @returns Value, in the unit of the second column.
 * @throws OutOfRangeError code `empty-table` for a table without rows.
 * @example tableValueLn([[-20, 4], [20, 1]], 0) // 2
 */
export function tableValueLn(table: Readonly<Table>, x: number): number {
  const { low, high, share } = tablePlace(table, x);
  return share === 0 ? low[1] : low[1] * (high[1] / low[1]) ** share;
}
