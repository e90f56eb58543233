import { useState } from 'react';
import type { Part } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { ConfirmDialog } from '#frontend/components/confirm-dialog.tsx';
import {
  useDocument,
  useEditorState,
  useEditorStore,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useRemoval } from '#frontend/features/scenario-editor/hooks/use-removal.ts';
import { VOLTAGE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import {
  duplicatePart,
  idOfNewPart,
  movePart,
  removePart,
  updatePart,
} from '#frontend/features/scenario-editor/model/operations/part-operations.ts';
import { usesOf } from '#frontend/features/scenario-editor/model/references.ts';
import { PART_KINDS } from '#frontend/features/scenario-editor/model/words.ts';
import { TextFieldOf } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { QuantityField } from '../fields/quantity-fields.tsx';
import { AddPartDialog } from './add-part-dialog.tsx';
import { ItemActions } from './item-actions.tsx';
import { PickList } from './pick-list.tsx';
import { AddButton } from './routines-section.tsx';
import { Section } from './section.tsx';
import { StatesGrid } from './states-grid.tsx';
import { TransitionsGrid } from './transitions-grid.tsx';

/** What draws current: the parts of the node, and the states of the chosen one. */
export function PartsSection() {
  const store = useEditorStore();
  const parts = useDocument((document) => document.node.parts);
  const partId = useEditorState((state) => state.selection.partId);
  const [isAdding, setAdding] = useState(false);
  const part = parts.find(({ id }) => id === partId) ?? parts[0];
  return (
    <Section id="parts" title="Parts" note="what draws current; at rest means asleep">
      <PickList
        label="Parts"
        items={parts.map(({ id, name, kind }) => ({ id, name, note: kind === 'other' ? '' : kind }))}
        selectedId={part?.id ?? null}
        onSelect={(id) => store.select({ partId: id })}
        onMove={(id, places) =>
          store.edit({
            label: 'move a part',
            focus: `pick.${id}`,
            change: (document) => movePart(document, id, places),
          })
        }
      >
        <AddButton label="Add a part" isFull={parts.length >= LIMITS.parts} onAdd={() => setAdding(true)} />
      </PickList>
      {part ? (
        <div className="mt-4">
          <PartHead part={part} />
          <StatesGrid key={part.id} part={part} />
          <Section
            id="transitions"
            level={3}
            title="Transitions"
            note={
              part.transitions.length === 0
                ? 'none: this part changes its state in no time and without charge'
                : 'how it goes from one state to another, and what that costs'
            }
          >
            <TransitionsGrid key={part.id} part={part} />
          </Section>
        </div>
      ) : (
        <p className="mt-3 text-muted">
          There is no part yet. Add a radio, a controller, a sensor: whatever draws current.
        </p>
      )}
      <AddPartDialog isOpen={isAdding} onClose={() => setAdding(false)} />
    </Section>
  );
}

function PartHead({ part }: { part: Part }) {
  const store = useEditorStore();
  const field = `node.parts.${part.id}`;
  const { asked, ask, remove, close } = usePartRemoval();
  return (
    <div className="flex items-start gap-x-6">
      <div className="grid flex-1 grid-cols-2 gap-x-6 sm:grid-cols-4">
        <TextFieldOf
          field={`${field}.name`}
          label="Name of the part"
          value={part.name}
          change={(document, name) => updatePart(document, part.id, (before) => ({ ...before, name }))}
        />
        <ChoiceField
          field={`${field}.kind`}
          label="Kind"
          editLabel={`kind of ${part.name}`}
          value={part.kind}
          choices={PART_KINDS}
          change={(document, kind) => updatePart(document, part.id, (before) => ({ ...before, kind }))}
        />
        <ChoiceField
          field={`${field}.restStateId`}
          label="Rests in"
          editLabel={`rest state of ${part.name}`}
          value={part.restStateId}
          choices={part.states.map(({ id, name }) => ({ value: id, label: name }))}
          change={(document, restStateId) => updatePart(document, part.id, (before) => ({ ...before, restStateId }))}
        />
        <QuantityField
          title="Lowest voltage"
          field={`${field}.lowestVoltageV`}
          label={`${part.name}: lowest voltage`}
          quantity={part.lowestVoltageV}
          options={VOLTAGE}
          change={(document, update) =>
            updatePart(document, part.id, (before) => ({ ...before, lowestVoltageV: update(before.lowestVoltageV) }))
          }
        />
      </div>
      <ItemActions
        name={part.name}
        what="part"
        onMove={(places) =>
          store.edit({ label: 'move a part', change: (document) => movePart(document, part.id, places) })
        }
        onDuplicate={() =>
          store.edit({
            label: `duplicate the part “${part.name}”`,
            selection: { partId: idOfNewPart(store.getState().document.node, part.name) },
            change: (document) => duplicatePart(document, part.id),
          })
        }
        onRemove={() => ask(part)}
      />
      <ConfirmDialog
        title={`Remove the part “${part.name}”?`}
        action="Remove"
        isDanger
        isOpen={asked !== null}
        onClose={close}
        onConfirm={() => remove(part)}
      >
        <p>It is used here, and would be taken out of:</p>
        <ul className="mt-2 list-disc pl-5">
          {asked?.slice(0, 8).map((use) => (
            <li key={use}>{use}</li>
          ))}
          {asked && asked.length > 8 && <li>and {asked.length - 8} more</li>}
        </ul>
      </ConfirmDialog>
    </div>
  );
}

/** Removing a part that steps or other parts refer to asks first. */
function usePartRemoval() {
  const store = useEditorStore();
  const removal = useRemoval();
  const [asked, setAsked] = useState<string[] | null>(null);
  const remove = (part: Part): void => {
    setAsked(null);
    removal(
      {
        label: `remove the part “${part.name}”`,
        selection: { partId: null },
        change: (document) => removePart(document, part.id),
      },
      `Part “${part.name}” removed.`,
    );
  };
  const ask = (part: Part): void => {
    const uses = usesOf(store.getState().document.node, part.id);
    if (uses.length > 0) setAsked(uses);
    else remove(part);
  };
  return { asked, ask, remove, close: () => setAsked(null) };
}
