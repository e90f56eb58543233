import { useState } from 'react';
import type { Scenario, Table } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import {
  risingProblem,
  withoutRow,
  withPair,
  withRowAfter,
} from '#frontend/features/scenario-editor/model/pair-rows.ts';
import { pairsPasteTarget, type PairColumn } from '#frontend/features/scenario-editor/model/paste/pairs-paste.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { EditGrid, GridCell, GridRow, PINNED_CELL, type PastedBlock } from '../grid/edit-grid.tsx';
import { RowToolbar } from '../grid/row-toolbar.tsx';
import { PasteDialog } from '../paste/paste-dialog.tsx';

export interface PairTableProps {
  field: string;
  /** What the table says: "Open-circuit voltage". */
  label: string;
  columns: readonly [PairColumn, PairColumn];
  table: Table;
  /** The table of a document; an empty one where it has none. */
  read: (document: Scenario) => Table;
  write: (document: Scenario, table: Table) => Scenario;
  /** Fewest rows; with 0 the last one can go and the table with it. */
  fewest: number;
}

/** A table of pairs of figures, rising in its first column. */
export function PairTable({ field, label, columns, table, read, write, fewest }: PairTableProps) {
  const store = useEditorStore();
  const [selected, setSelected] = useState(0);
  const [pasted, setPasted] = useState<PastedBlock | null>(null);
  const change = (what: string, apply: (table: Table) => Table, row?: number): void =>
    store.edit({
      label: `${what} ${label.toLowerCase()}`,
      change: (document) => {
        const before = read(document);
        const after = apply(before);
        return after === before ? document : write(document, after);
      },
      ...(row === undefined ? {} : { focus: `${field}.${row}.0` }),
    });
  const add = (): void =>
    change(
      'a row of',
      (before) => withRowAfter(before, selected, columns[0].options),
      Math.min(selected + 1, table.length),
    );
  return (
    <div className="max-w-sm">
      <EditGrid
        label={label}
        fieldPrefix={`${field}.`}
        columns={columns.map(({ header }, at) => ({ key: String(at), header, isNumber: true, width: '8rem' }))}
        onAddRow={add}
        onSelectRow={(row) => setSelected(Number(row))}
        onPasteBlock={setPasted}
        footer={
          <RowToolbar
            what="row"
            addLabel="Add a row"
            selected={selected in table ? `row ${selected + 1}` : null}
            fullText={table.length >= LIMITS.tableRows ? `At most ${LIMITS.tableRows} rows.` : undefined}
            onAdd={add}
            {...(table.length > fewest && {
              onRemove: () => change('remove a row of', (before) => withoutRow(before, selected, fewest)),
            })}
          />
        }
      >
        {table.map((pair, index) => (
          <GridRow key={index} rowId={String(index)} isSelected={index === selected}>
            <th scope="row" data-col="0" className={PINNED_CELL}>
              <PairField {...{ field, label, columns, table, read, write }} pair={pair} index={index} column={0} />
            </th>
            <GridCell column="1">
              <PairField {...{ field, label, columns, table, read, write }} pair={pair} index={index} column={1} />
            </GridCell>
          </GridRow>
        ))}
      </EditGrid>
      {pasted && (
        <PasteDialog block={pasted} target={pairsPasteTarget(columns, read, write)} onClose={() => setPasted(null)} />
      )}
    </div>
  );
}

interface PairFieldProps extends Omit<PairTableProps, 'fewest'> {
  pair: Table[number];
  index: number;
  column: 0 | 1;
}

function PairField({ field, label, columns, table, read, write, pair, index, column }: PairFieldProps) {
  const { header, options } = columns[column];
  return (
    <FigureField
      field={`${field}.${index}.${column}`}
      label={`${label}, row ${index + 1}, ${header.toLowerCase()}`}
      editLabel={label.toLowerCase()}
      isCell
      align="right"
      value={pair[column]}
      options={options}
      {...(column === 0 && { check: (value: number) => risingProblem(table, index, value, options) })}
      change={(document, value) =>
        value === undefined ? document : write(document, withPair(read(document), index, column, value))
      }
    />
  );
}
