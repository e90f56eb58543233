import { memo, useState } from 'react';
import type { Leakage } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { useDocument, useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useRemoval } from '#frontend/features/scenario-editor/hooks/use-removal.ts';
import { CURRENT } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { uniqueId, uniqueName } from '#frontend/features/scenario-editor/model/ids.ts';
import {
  addLeakage,
  moveLeakage,
  removeLeakage,
  updateLeakage,
} from '#frontend/features/scenario-editor/model/operations/part-operations.ts';
import { TextFieldOf } from '../fields/bound-fields.tsx';
import { QuantityCells } from '../fields/quantity-fields.tsx';
import { EditGrid, GridNameCell, GridRow, type GridColumn } from '../grid/edit-grid.tsx';
import { focusOfRow } from '../grid/grid-keys.ts';
import { RowToolbar } from '../grid/row-toolbar.tsx';

const COLUMNS: readonly GridColumn[] = [
  { key: 'name', header: 'Leakage', width: '11rem' },
  { key: 'min', header: 'Minimum', width: '6rem', isNumber: true },
  { key: 'typical', header: 'Typical', width: '6rem', isNumber: true },
  { key: 'max', header: 'Maximum', width: '6rem', isNumber: true },
  { key: 'from', header: 'From', width: '5.5rem' },
];

const FIELD = 'node.leakages';

/** Currents that always flow. */
export function LeakagesGrid() {
  const store = useEditorStore();
  const removal = useRemoval();
  const leakages = useDocument((document) => document.node.leakages);
  const [selectedId, setSelectedId] = useState<string | null>(null);
  const selected = leakages.find(({ id }) => id === selectedId) ?? null;

  const add = (): void => {
    const name = uniqueName(
      'New leakage',
      leakages.map((leakage) => leakage.name),
    );
    const id = uniqueId(
      name,
      leakages.map((leakage) => leakage.id),
      'leakage',
    );
    store.edit({
      label: 'add a leakage',
      focus: `${FIELD}.${id}.name`,
      change: (document) => addLeakage(document, { name, current: { typical: 0, provenance: { kind: 'assumed' } } }),
    });
  };
  const move = (id: string, places: number): void =>
    store.edit({
      label: 'move a leakage',
      focus: focusOfRow(FIELD, id),
      change: (document) => moveLeakage(document, id, places),
    });
  return (
    <EditGrid
      label="Leakages"
      columns={COLUMNS}
      fieldPrefix={`${FIELD}.`}
      onMoveRow={move}
      onAddRow={add}
      onSelectRow={setSelectedId}
      footer={
        <RowToolbar
          what="leakage"
          addLabel="Add a leakage"
          selected={selected?.name ?? null}
          fullText={leakages.length >= LIMITS.leakages ? `At most ${LIMITS.leakages} leakages.` : undefined}
          onAdd={add}
          onMove={(places) => selected && move(selected.id, places)}
          onRemove={() =>
            selected &&
            removal(
              {
                label: `remove the leakage “${selected.name}”`,
                change: (document) => removeLeakage(document, selected.id),
              },
              `Leakage “${selected.name}” removed.`,
            )
          }
        />
      }
    >
      {leakages.map((leakage) => (
        <LeakageRow key={leakage.id} leakage={leakage} isSelected={leakage === selected} />
      ))}
    </EditGrid>
  );
}

const LeakageRow = memo(function LeakageRow({ leakage, isSelected }: { leakage: Leakage; isSelected: boolean }) {
  const field = `${FIELD}.${leakage.id}`;
  return (
    <GridRow rowId={leakage.id} isSelected={isSelected}>
      <GridNameCell>
        <TextFieldOf
          field={`${field}.name`}
          label="Name of the leakage"
          value={leakage.name}
          isCell
          change={(document, name) => updateLeakage(document, leakage.id, (before) => ({ ...before, name }))}
        />
      </GridNameCell>
      <QuantityCells
        field={`${field}.current`}
        label={`${leakage.name}: current`}
        quantity={leakage.current}
        options={CURRENT}
        change={(document, update) =>
          updateLeakage(document, leakage.id, (before) => ({ ...before, current: update(before.current) }))
        }
      />
    </GridRow>
  );
});
