import { memo, useState } from 'react';
import type { Part, State } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { ConfirmDialog } from '#frontend/components/confirm-dialog.tsx';
import { useEditorStore } from '../../hooks/editor-context.tsx';
import { useRemoval } from '../../hooks/use-removal.ts';
import { CURRENT } from '../../model/figure-options.ts';
import {
  addState,
  duplicateState,
  idOfNewState,
  moveState,
  removeState,
  renameState,
  updateState,
} from '../../model/operations/part-operations.ts';
import { withOptional } from '../../model/operations/supply-operations.ts';
import { statesPasteTarget } from '../../model/paste/states-paste.ts';
import { usesOf } from '../../model/references.ts';
import { ROLES } from '../../model/words.ts';
import { TextFieldOf } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { QuantityCells } from '../fields/quantity-fields.tsx';
import { EditGrid, GridCell, GridNameCell, GridRow, type GridColumn, type PastedBlock } from '../grid/edit-grid.tsx';
import { focusOfRow } from '../grid/grid-keys.ts';
import { RowToolbar } from '../grid/row-toolbar.tsx';
import { PasteDialog } from '../paste/paste-dialog.tsx';
import { StateDetails } from './state-details.tsx';

const COLUMNS: readonly GridColumn[] = [
  { key: 'name', header: 'State', width: '8.5rem' },
  { key: 'role', header: 'Role', width: '6.5rem' },
  { key: 'min', header: 'Minimum', width: '6rem', isNumber: true },
  { key: 'typical', header: 'Typical', width: '6rem', isNumber: true },
  { key: 'max', header: 'Maximum', width: '6rem', isNumber: true },
  { key: 'from', header: 'From', width: '5.5rem' },
];

/** The states of a part and their currents. */
export function StatesGrid({ part }: { part: Part }) {
  const store = useEditorStore();
  const [selectedId, setSelectedId] = useState<string | null>(null);
  const [pasted, setPasted] = useState<PastedBlock | null>(null);
  const selected = part.states.find((state) => state.id === selectedId) ?? null;
  const { asked, ask, remove, close } = useStateRemoval(part);
  const field = `node.parts.${part.id}.states`;

  const add = (): void => {
    const made = { name: 'New state', current: { typical: 0, provenance: { kind: 'assumed' as const } } };
    const stateId = idOfNewState(part, made.name);
    setSelectedId(stateId);
    store.edit({
      label: 'add a state',
      focus: `${field}.${stateId}.name`,
      change: (document) => addState(document, part.id, made),
    });
  };
  const move = (stateId: string, places: number): void =>
    store.edit({
      label: 'move a state',
      focus: focusOfRow(field, stateId),
      change: (document) => moveState(document, part.id, stateId, places),
    });
  const duplicate = (state: State): void =>
    store.edit({
      label: `duplicate the state “${state.name}”`,
      focus: `${field}.${idOfNewState(part, state.name)}.name`,
      change: (document) => duplicateState(document, part.id, state.id),
    });

  return (
    <>
      <EditGrid
        label={`States of ${part.name}`}
        columns={COLUMNS}
        fieldPrefix={`${field}.`}
        onMoveRow={move}
        onAddRow={add}
        onSelectRow={setSelectedId}
        onPasteBlock={setPasted}
        footer={
          <RowToolbar
            what="state"
            addLabel="Add a state"
            selected={selected?.name ?? null}
            fullText={
              part.states.length >= LIMITS.statesPerPart ? `At most ${LIMITS.statesPerPart} states.` : undefined
            }
            onAdd={add}
            onMove={(places) => selected && move(selected.id, places)}
            onDuplicate={() => selected && duplicate(selected)}
            onRemove={() => selected && ask(selected)}
          />
        }
      >
        {part.states.map((state) => (
          <StateRow
            key={state.id}
            partId={part.id}
            partName={part.name}
            state={state}
            isSelected={state === selected}
          />
        ))}
      </EditGrid>
      {selected && <StateDetails part={part} state={selected} />}
      {pasted && <PasteDialog block={pasted} target={statesPasteTarget(part.id)} onClose={() => setPasted(null)} />}
      <ConfirmDialog
        title={`Remove the state “${asked?.state.name ?? ''}”?`}
        action="Remove"
        isDanger
        isOpen={asked !== null}
        onClose={close}
        onConfirm={() => asked && remove(asked.state)}
      >
        <p>It is used here, and would be taken out of:</p>
        <ul className="mt-2 list-disc pl-5">
          {asked?.uses.slice(0, 8).map((use) => (
            <li key={use}>{use}</li>
          ))}
          {asked && asked.uses.length > 8 && <li>and {asked.uses.length - 8} more</li>}
        </ul>
      </ConfirmDialog>
    </>
  );
}

/** Removing a state that is used elsewhere asks first; the last state of a part cannot go. */
function useStateRemoval(part: Part) {
  const store = useEditorStore();
  const removal = useRemoval();
  const [asked, setAsked] = useState<{ state: State; uses: string[] } | null>(null);
  const remove = (state: State): void => {
    setAsked(null);
    removal(
      {
        label: `remove the state “${state.name}”`,
        change: (document) => removeState(document, part.id, state.id),
      },
      part.states.length < 2 ? 'A part keeps at least one state.' : `State “${state.name}” removed.`,
    );
  };
  const ask = (state: State): void => {
    const uses = usesOf(store.getState().document.node, part.id, state.id);
    if (uses.length > 0 && part.states.length > 1) setAsked({ state, uses });
    else remove(state);
  };
  return { asked, ask, remove, close: () => setAsked(null) };
}

interface StateRowProps {
  partId: string;
  partName: string;
  state: State;
  isSelected: boolean;
}

const StateRow = memo(function StateRow({ partId, partName, state, isSelected }: StateRowProps) {
  const field = `node.parts.${partId}.states.${state.id}`;
  const label = `${partName}, ${state.name}`;
  return (
    <GridRow rowId={state.id} isSelected={isSelected}>
      <GridNameCell>
        <TextFieldOf
          field={`${field}.name`}
          label="Name of the state"
          value={state.name}
          isCell
          change={(document, name) => updateState(document, partId, state.id, (before) => renameState(before, name))}
        />
      </GridNameCell>
      <GridCell column="role">
        <ChoiceField
          field={`${field}.role`}
          label={`Role of ${state.name}`}
          isCell
          value={state.role ?? ''}
          choices={[{ value: '', label: 'none' }, ...ROLES]}
          change={(document, role) =>
            updateState(document, partId, state.id, (before) =>
              withOptional(before, 'role', role === '' ? undefined : role),
            )
          }
        />
      </GridCell>
      <QuantityCells
        field={`${field}.current`}
        label={`${label}: current`}
        quantity={state.current}
        options={CURRENT}
        change={(document, update) =>
          updateState(document, partId, state.id, (before) => ({ ...before, current: update(before.current) }))
        }
      />
    </GridRow>
  );
});
