import type { Scenario, Table } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { parseQuantity, type ParseOptions } from '#common/units/parse-quantity.ts';
import { layBlock, splitBlock, type PasteColumn } from './paste.ts';
import type { PasteTarget } from './steps-paste.ts';

export interface PairColumn {
  header: string;
  options: ParseOptions;
}

type Pair = Table[number];

/** Pasting into a table of pairs whose first column rises. */
export function pairsPasteTarget(
  columns: readonly [PairColumn, PairColumn],
  read: (scenario: Scenario) => Table,
  write: (scenario: Scenario, table: Table) => Scenario,
): PasteTarget {
  return (scenario, { text, rowId, column }) => {
    const table = read(scenario);
    const result = layBlock<Pair>(
      {
        columns: [columnOf(columns[0], 0), columnOf(columns[1], 1)],
        items: table,
        nameOf: (pair) => `row ${table.indexOf(pair) + 1}`,
        blank: () => [Number.NaN, Number.NaN],
        limit: LIMITS.tableRows,
      },
      splitBlock(text),
      { row: Number(rowId), column },
    );
    const pasted = result.items.slice(Number(rowId), Number(rowId) + result.rows.length);
    const kept: Table = result.items.slice(0, Number(rowId));
    const rows = result.rows.map((row, offset) => {
      const pair = pasted[offset];
      const problem = pair && problemOf(pair, kept.at(-1));
      if (pair && problem === null) {
        kept.push(pair);
        return row;
      }
      return {
        ...row,
        cells: row.cells.map((cell, at) => (at === 0 ? { ...cell, problem: cell.problem ?? problem ?? null } : cell)),
      };
    });
    const rest = result.items.slice(Number(rowId) + result.rows.length);
    const last = kept.at(-1)?.[0] ?? -Infinity;
    const next = [...kept, ...rest.filter(([first]) => first > last)];
    return { ...result, rows, apply: (document) => write(document, next) };
  };
}

function problemOf([first, second]: Pair, before: Pair | undefined): string | null {
  if (Number.isNaN(first) || Number.isNaN(second)) return 'A new row needs both values.';
  if (before && first <= before[0]) return 'The first column must rise from row to row; this row is left out.';
  return null;
}

function columnOf({ header, options }: PairColumn, at: 0 | 1): PasteColumn<Pair> {
  return {
    key: String(at),
    header,
    read: (text) => {
      const parsed = parseQuantity(text, options);
      if (parsed.kind === 'problem') return parsed;
      const { value } = parsed;
      return { kind: 'value', apply: ([first, second]) => (at === 0 ? [value, second] : [first, value]) };
    },
  };
}
