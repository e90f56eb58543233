import { useState } from 'react';
import type { Cell } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { PULSE_TIME, RESISTANCE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateAt } from '#frontend/features/scenario-editor/model/list.ts';
import { updateCell, withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { QuantityCells } from '../fields/quantity-fields.tsx';
import { EditGrid, GridRow, PINNED_CELL, type GridColumn } from '../grid/edit-grid.tsx';
import { RowToolbar } from '../grid/row-toolbar.tsx';

const FIELD = 'supply.cell.resistanceOhm';

const COLUMNS: readonly GridColumn[] = [
  { key: 'pulseS', header: 'Pulse up to', width: '7rem', isNumber: true },
  { key: 'min', header: 'Minimum', width: '6rem', isNumber: true },
  { key: 'typical', header: 'Typical', width: '6rem', isNumber: true },
  { key: 'max', header: 'Maximum', width: '6rem', isNumber: true },
  { key: 'from', header: 'From', width: '5.5rem' },
];

type Rows = Cell['resistanceOhm'];

/** Fresh resistance at 20 °C, by the length of the pulse where that is known. */
export function ResistanceTable({ rows }: { rows: Rows }) {
  const store = useEditorStore();
  const [selected, setSelected] = useState(0);
  const change = (label: string, apply: (rows: Rows) => Rows): void =>
    store.edit({
      label,
      change: (document) =>
        updateCell(document, (before) => ({ ...before, resistanceOhm: apply(before.resistanceOhm) })),
    });
  const add = (): void =>
    change('add a resistance', (before) => [...before, { ohm: before.at(-1)?.ohm ?? { typical: 1 } }]);
  return (
    <section aria-labelledby="resistance" className="mt-6">
      <h3 id="resistance" className="font-extrabold">
        Resistance
      </h3>
      <p className="mb-1 text-small text-muted">fresh, at 20 °C; a row without a pulse length serves for all</p>
      <EditGrid
        label="Resistance"
        columns={COLUMNS}
        fieldPrefix={`${FIELD}.`}
        onAddRow={add}
        onSelectRow={(row) => setSelected(Number(row))}
        footer={
          <RowToolbar
            what="row"
            addLabel="Add a row"
            selected={selected in rows ? `row ${selected + 1}` : null}
            fullText={rows.length >= LIMITS.tableRows ? `At most ${LIMITS.tableRows} rows.` : undefined}
            onAdd={add}
            {...(rows.length > 1 && {
              onRemove: () =>
                change('remove a resistance', (before) =>
                  before.length > 1 ? before.filter((_, index) => index !== selected) : before,
                ),
            })}
          />
        }
      >
        {rows.map((row, index) => (
          <GridRow key={index} rowId={String(index)} isSelected={index === selected}>
            <th scope="row" data-col="pulseS" className={PINNED_CELL}>
              <FigureField
                field={`${FIELD}.${index}.pulseS`}
                label={`Pulse length of row ${index + 1}`}
                isCell
                align="right"
                value={row.pulseS}
                options={PULSE_TIME}
                isOptional
                change={(document, pulseS) =>
                  updateCell(document, (before) => ({
                    ...before,
                    resistanceOhm: updateAt(before.resistanceOhm, index, (old) => withOptional(old, 'pulseS', pulseS)),
                  }))
                }
              />
            </th>
            <QuantityCells
              field={`${FIELD}.${index}.ohm`}
              label={`resistance, row ${index + 1}`}
              quantity={row.ohm}
              options={RESISTANCE}
              change={(document, update) =>
                updateCell(document, (before) => ({
                  ...before,
                  resistanceOhm: updateAt(before.resistanceOhm, index, (old) => ({ ...old, ohm: update(old.ohm) })),
                }))
              }
            />
          </GridRow>
        ))}
      </EditGrid>
    </section>
  );
}
