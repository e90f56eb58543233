import { useState } from 'react';
import type { Part, State } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { ConfirmDialog } from '#frontend/components/confirm-dialog.tsx';
import { useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useRemoval } from '#frontend/features/scenario-editor/hooks/use-removal.ts';
import {
  addState,
  duplicateState,
  idOfNewState,
  moveState,
  removeState,
} from '#frontend/features/scenario-editor/model/operations/part-operations.ts';
import { statesPasteTarget } from '#frontend/features/scenario-editor/model/paste/states-paste.ts';
import { usesOf } from '#frontend/features/scenario-editor/model/references.ts';
import { EditGrid, type GridColumn, type PastedBlock } from '../grid/edit-grid.tsx';
import { focusOfRow } from '../grid/grid-keys.ts';
import { RowToolbar } from '../grid/row-toolbar.tsx';
import { PasteDialog } from '../paste/paste-dialog.tsx';
import { StateRow } from './state-row.tsx';
import { StateDetails } from './state-details.tsx';

const COLUMNS: readonly GridColumn[] = [
  { key: 'name', header: 'State', width: '12rem' },
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
      <RemovalDialog asked={asked} onClose={close} onConfirm={remove} />
    </>
  );
}

interface AskedRemoval {
  state: State;
  uses: string[];
}

interface RemovalDialogProps {
  asked: AskedRemoval | null;
  onClose: () => void;
  onConfirm: (state: State) => void;
}

function RemovalDialog({ asked, onClose, onConfirm }: RemovalDialogProps) {
  return (
    <ConfirmDialog
      title={`Remove the state “${asked?.state.name ?? ''}”?`}
      action="Remove"
      isDanger
      isOpen={asked !== null}
      onClose={onClose}
      onConfirm={() => asked && onConfirm(asked.state)}
    >
      <p>It is used here, and would be taken out of:</p>
      <ul className="mt-2 list-disc pl-5">
        {asked?.uses.slice(0, 8).map((use) => (
          <li key={use}>{use}</li>
        ))}
        {asked && asked.uses.length > 8 && <li>and {asked.uses.length - 8} more</li>}
      </ul>
    </ConfirmDialog>
  );
}

/** Removing a state that is used elsewhere asks first; the last state of a part cannot go. */
function useStateRemoval(part: Part) {
  const store = useEditorStore();
  const removal = useRemoval();
  const [asked, setAsked] = useState<AskedRemoval | null>(null);
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
