import type { Table } from '#common/engine/scenario/scenario.types.ts';
import { formatForEdit } from '#common/units/format-for-edit.ts';
import type { ParseOptions } from '#common/units/parse-quantity.ts';

/** Why a first value cannot stand in this row; the first column rises from row to row. Null when it can. */
export function risingProblem(table: Table, index: number, value: number, options: ParseOptions): string | null {
  const show = (limit: number): string => formatForEdit(limit, options.dimension);
  const before = table[index - 1]?.[0];
  const after = table[index + 1]?.[0];
  if (before !== undefined && value <= before) return `Rows rise: more than ${show(before)} here.`;
  if (after !== undefined && value >= after) return `Rows rise: less than ${show(after)} here.`;
  return null;
}

/** The table with one more row behind a row, half way to the next one or one step beyond the last. */
export function withRowAfter(table: Table, index: number, limits: ParseOptions): Table {
  const own = table[index] ?? table.at(-1);
  if (!own) return [[limits.min ?? 0, 1]];
  const next = table[index + 1];
  if (next) return table.toSpliced(index + 1, 0, [middle(own[0], next[0]), middle(own[1], next[1])]);
  const before = table[index - 1];
  const step = before ? own[0] - before[0] : Math.abs(own[0]) || 1;
  const beyond = own[0] + step;
  if (limits.max === undefined || beyond <= limits.max) return [...table, [beyond, own[1]]];
  if (limits.max > own[0]) return [...table, [limits.max, own[1]]];
  return before ? table.toSpliced(index, 0, [middle(before[0], own[0]), middle(before[1], own[1])]) : table;
}

function middle(a: number, b: number): number {
  return Number(((a + b) / 2).toPrecision(12));
}

export function withoutRow(table: Table, index: number, fewest: number): Table {
  return table.length > fewest && index in table ? table.toSpliced(index, 1) : table;
}

export function withPair(table: Table, index: number, column: 0 | 1, value: number): Table {
  const row = table[index];
  if (!row) return table;
  return table.with(index, column === 0 ? [value, row[1]] : [row[0], value]);
}
