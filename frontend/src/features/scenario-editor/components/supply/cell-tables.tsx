import type { Cell, Table } from '#common/engine/scenario/scenario.types.ts';
import {
  CAPACITY,
  CAPACITY_FACTOR,
  DEPTH,
  FACTOR,
  FACTOR_FROM_ZERO,
  POSITIVE_CURRENT,
  POSITIVE_VOLTAGE,
  TEMPERATURE,
} from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateCell, withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import type { PairColumn } from '#frontend/features/scenario-editor/model/paste/pairs-paste.ts';
import { useEditorStore, useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { PairTable } from '../tables/pair-table.tsx';

type TableKey =
  | 'openCircuitTableV'
  | 'resistanceFactorByTemperature'
  | 'resistanceFactorByDepth'
  | 'capacityFactorByTemperature'
  | 'rateTable';

interface TableRow {
  key: TableKey;
  title: string;
  note: string;
  columns: readonly [PairColumn, PairColumn];
  fewest: number;
  /** Table to begin with where the cell has none. */
  start: Table;
}

const depth: PairColumn = { header: 'Charge drawn', options: DEPTH };
const temperature: PairColumn = { header: 'Temperature', options: TEMPERATURE };

const TABLES: readonly TableRow[] = [
  {
    key: 'openCircuitTableV',
    title: 'Open-circuit voltage',
    note: 'of one cell at 20 °C, by the charge drawn',
    columns: [depth, { header: 'Voltage', options: POSITIVE_VOLTAGE }],
    fewest: 2,
    start: [],
  },
  {
    key: 'resistanceFactorByTemperature',
    title: 'Resistance by temperature',
    note: 'as a factor on the resistance at 20 °C',
    columns: [temperature, { header: 'Factor', options: FACTOR }],
    fewest: 1,
    start: [],
  },
  {
    key: 'resistanceFactorByDepth',
    title: 'Resistance by charge drawn',
    note: 'as a factor on the fresh resistance',
    columns: [depth, { header: 'Factor', options: FACTOR_FROM_ZERO }],
    fewest: 1,
    start: [],
  },
  {
    key: 'capacityFactorByTemperature',
    title: 'Capacity by temperature',
    note: 'as a factor of at most 1; without it the cold takes nothing',
    columns: [temperature, { header: 'Factor', options: CAPACITY_FACTOR }],
    fewest: 0,
    start: [
      [-20, 0.8],
      [20, 1],
    ],
  },
  {
    key: 'rateTable',
    title: 'Capacity by current',
    note: 'at a steady current; without it the capacity above holds for all',
    columns: [
      { header: 'Current', options: POSITIVE_CURRENT },
      { header: 'Capacity', options: CAPACITY },
    ],
    fewest: 0,
    start: [],
  },
];

/** The figures of a cell that depend on something. */
export function CellTables({ cell }: { cell: Cell }) {
  return (
    <div className="mt-6 grid gap-x-10 gap-y-6 sm:grid-cols-2">
      {TABLES.map((row) => (
        <CellTable key={row.key} cell={cell} row={row} />
      ))}
    </div>
  );
}

function startOf({ start }: TableRow, cell: Cell): Table {
  if (start.length > 0) return start;
  return [
    [0.0001, cell.capacityC.typical],
    [0.01, cell.capacityC.typical],
  ];
}

function CellTable({ cell, row }: { cell: Cell; row: TableRow }) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const { key, title, note, columns, fewest } = row;
  const table = cell[key];
  const isOptional = fewest === 0;
  const write = (document: Parameters<typeof updateCell>[0], next: Table | undefined) =>
    updateCell(document, (before) =>
      next === undefined
        ? isOptionalKey(key)
          ? withOptional(before, key, undefined)
          : before
        : { ...before, [key]: next },
    );
  return (
    <section aria-labelledby={`table-${key}`} className="min-w-0">
      <h3 id={`table-${key}`} className="font-extrabold">
        {title}
      </h3>
      <p className="mb-1 text-small text-muted">{note}</p>
      {table && (
        <PairTable
          field={`supply.cell.${key}`}
          label={title}
          columns={columns}
          table={table}
          read={(document) => document.supply.cell[key] ?? []}
          write={write}
          fewest={Math.max(fewest, key === 'rateTable' ? 2 : 1)}
        />
      )}
      {isOptional && !isReadOnly && (
        <button
          type="button"
          className="link min-h-9 text-small"
          onClick={() =>
            store.edit({
              label: `${table ? 'remove' : 'add'} the table of ${title.toLowerCase()}`,
              change: (document) => write(document, table ? undefined : startOf(row, document.supply.cell)),
            })
          }
        >
          {table ? 'Remove this table' : 'Add this table'}
        </button>
      )}
    </section>
  );
}

function isOptionalKey(key: TableKey): key is 'capacityFactorByTemperature' | 'rateTable' {
  return key === 'capacityFactorByTemperature' || key === 'rateTable';
}
