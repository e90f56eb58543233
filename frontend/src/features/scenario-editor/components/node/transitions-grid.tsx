import { memo, useState } from 'react';
import type { Part, Transition } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useRemoval } from '#frontend/features/scenario-editor/hooks/use-removal.ts';
import { CURRENT, STEP_TIME } from '#frontend/features/scenario-editor/model/figure-options.ts';
import {
  addTransition,
  moveTransition,
  removeTransition,
  updateTransition,
} from '#frontend/features/scenario-editor/model/operations/part-operations.ts';
import { ChoiceField, type Choice } from '../fields/choice-field.tsx';
import { QuantityCells } from '../fields/quantity-fields.tsx';
import { EditGrid, GridCell, GridRow, PINNED_CELL, type GridColumn } from '../grid/edit-grid.tsx';
import { RowToolbar } from '../grid/row-toolbar.tsx';
import { TransitionDetails } from './transition-details.tsx';

const COLUMNS: readonly GridColumn[] = [
  { key: 'fromStateId', header: 'From', width: '6.5rem' },
  { key: 'toStateId', header: 'To', width: '6.5rem' },
  { key: 'duration-min', header: 'Time min', width: '4.6rem', isNumber: true },
  { key: 'duration-typical', header: 'typical', width: '4.6rem', isNumber: true },
  { key: 'duration-max', header: 'max', width: '4.6rem', isNumber: true },
  { key: 'duration-from', header: 'From', width: '4.4rem' },
  { key: 'current-min', header: 'Current min', width: '4.6rem', isNumber: true },
  { key: 'current-typical', header: 'typical', width: '4.6rem', isNumber: true },
  { key: 'current-max', header: 'max', width: '4.6rem', isNumber: true },
  { key: 'current-from', header: 'From', width: '4.4rem' },
];

/** How a part goes from one state to another, and what that costs. */
export function TransitionsGrid({ part }: { part: Part }) {
  const store = useEditorStore();
  const removal = useRemoval();
  const [selectedIndex, setSelectedIndex] = useState<number | null>(null);
  const states = part.states.map(({ id, name }) => ({ value: id, label: name }));
  const selected = selectedIndex === null ? undefined : part.transitions[selectedIndex];
  const field = `node.parts.${part.id}.transitions`;

  const add = (): void => {
    const made = transitionNotYetThere(part);
    if (!made) return;
    store.edit({
      label: 'add a transition',
      focus: `${field}.${part.transitions.length}.fromStateId`,
      change: (document) => addTransition(document, part.id, made),
    });
  };
  const move = (rowId: string, places: number): void => {
    const index = Number(rowId);
    const target = Math.max(0, Math.min(part.transitions.length - 1, index + places));
    setSelectedIndex(target);
    store.edit({
      label: 'move a transition',
      focus: `${field}.${target}.fromStateId`,
      change: (document) => moveTransition(document, part.id, index, places),
    });
  };
  const name = selected && `${nameOf(part, selected.fromStateId)} to ${nameOf(part, selected.toStateId)}`;
  return (
    <>
      <EditGrid
        label={`Transitions of ${part.name}`}
        columns={COLUMNS}
        fieldPrefix={`${field}.`}
        onMoveRow={move}
        onAddRow={add}
        onSelectRow={(rowId) => setSelectedIndex(Number(rowId))}
        footer={
          <RowToolbar
            what="transition"
            addLabel="Add a transition"
            selected={name ?? null}
            fullText={fullText(part)}
            onAdd={add}
            onMove={(places) => selectedIndex !== null && move(String(selectedIndex), places)}
            onRemove={() =>
              selectedIndex !== null &&
              removal(
                {
                  label: `remove the transition ${name}`,
                  change: (document) => removeTransition(document, part.id, selectedIndex),
                },
                `Transition ${name} removed.`,
              )
            }
          />
        }
      >
        {part.transitions.map((transition, index) => (
          <TransitionRow
            // Transitions have no id of their own, and two may be alike.
            key={index}
            partId={part.id}
            index={index}
            transition={transition}
            states={states}
            isSelected={index === selectedIndex}
          />
        ))}
      </EditGrid>
      {selected && selectedIndex !== null && name !== undefined && (
        <TransitionDetails part={part} index={selectedIndex} transition={selected} name={name} />
      )}
    </>
  );
}

function fullText(part: Part): string | undefined {
  if (part.states.length < 2) return 'A transition needs two states.';
  return part.transitions.length >= LIMITS.transitionsPerPart ? `At most ${LIMITS.transitionsPerPart}.` : undefined;
}

const nameOf = (part: Part, stateId: string): string => part.states.find(({ id }) => id === stateId)?.name ?? stateId;

/** A pair of states that has no transition yet, else the first pair. */
function transitionNotYetThere(part: Part): Transition | null {
  const pairs = part.states.flatMap((from) => part.states.filter((to) => to !== from).map((to) => [from.id, to.id]));
  const free = pairs.find(
    ([from, to]) => !part.transitions.some(({ fromStateId, toStateId }) => fromStateId === from && toStateId === to),
  );
  const [fromStateId, toStateId] = free ?? pairs[0] ?? [];
  if (fromStateId === undefined || toStateId === undefined) return null;
  const nothing = { typical: 0, provenance: { kind: 'assumed' as const } };
  return { fromStateId, toStateId, durationS: nothing, current: nothing };
}

interface TransitionRowProps {
  partId: string;
  index: number;
  transition: Transition;
  states: readonly Choice<string>[];
  isSelected: boolean;
}

const TransitionRow = memo(
  function TransitionRow({ partId, index, transition, states, isSelected }: TransitionRowProps) {
    const field = `node.parts.${partId}.transitions.${index}`;
    const nameIn = (stateId: string): string => states.find(({ value }) => value === stateId)?.label ?? stateId;
    const label = `${nameIn(transition.fromStateId)} to ${nameIn(transition.toStateId)}`;
    const end = (key: 'fromStateId' | 'toStateId', word: string) => (
      <ChoiceField
        field={`${field}.${key}`}
        label={`${word} of transition ${index + 1}`}
        editLabel={`${word.toLowerCase()} of the transition ${label}`}
        isCell
        value={transition[key]}
        choices={states}
        change={(document, stateId) =>
          updateTransition(document, partId, index, (before) => ({ ...before, [key]: stateId }))
        }
      />
    );
    return (
      <GridRow rowId={String(index)} isSelected={isSelected}>
        <th scope="row" data-col="fromStateId" className={PINNED_CELL}>
          {end('fromStateId', 'Start')}
        </th>
        <GridCell column="toStateId">{end('toStateId', 'End')}</GridCell>
        {FIGURES.map(({ key, prefix, word, options }) => (
          <QuantityCells
            key={key}
            columnPrefix={prefix}
            field={`${field}.${key}`}
            label={`${label}: ${word}`}
            quantity={transition[key]}
            options={options}
            change={(document, update) =>
              updateTransition(document, partId, index, (before) => ({ ...before, [key]: update(before[key]) }))
            }
          />
        ))}
      </GridRow>
    );
  },
  (before, after) =>
    before.transition === after.transition &&
    before.isSelected === after.isSelected &&
    before.index === after.index &&
    before.partId === after.partId &&
    before.states.length === after.states.length &&
    before.states.every(
      ({ value, label }, at) => value === after.states[at]?.value && label === after.states[at].label,
    ),
);

const FIGURES = [
  { key: 'durationS', prefix: 'duration-', word: 'duration', options: STEP_TIME },
  { key: 'current', prefix: 'current-', word: 'current', options: CURRENT },
] as const;
