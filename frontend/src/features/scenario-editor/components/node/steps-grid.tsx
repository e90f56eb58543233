import { memo, useState } from 'react';
import { useShallowList } from '#frontend/features/scenario-editor/hooks/use-shallow-list.ts';
import type { Part, Routine, Step } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import {
  useDocument,
  useEditorState,
  useEditorStore,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useRemoval } from '#frontend/features/scenario-editor/hooks/use-removal.ts';
import {
  addStep,
  duplicateStep,
  emptyStep,
  idOfNewStep,
  moveStep,
  removeStep,
  updateStep,
  withPartState,
} from '#frontend/features/scenario-editor/model/operations/routine-operations.ts';
import { isLedByLink } from '#frontend/features/scenario-editor/model/operations/exchange-operations.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { REPEATS } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { FigureField, TextFieldOf } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { EditGrid, GridCell, GridNameCell, GridRow, type GridColumn, type PastedBlock } from '../grid/edit-grid.tsx';
import { focusOfRow } from '../grid/grid-keys.ts';
import { RowToolbar } from '../grid/row-toolbar.tsx';
import { PasteDialog } from '../paste/paste-dialog.tsx';
import { stepsPasteTarget } from '#frontend/features/scenario-editor/model/paste/steps-paste.ts';
import { DurationCell } from './duration-cell.tsx';

/** The steps of a routine: a duration and a state of each part. */
export function StepsGrid({ routine }: { routine: Routine }) {
  const store = useEditorStore();
  const removal = useRemoval();
  const parts = useShallowList(useDocument((document) => document.node.parts));
  const selectedId = useEditorState((state) => state.selection.stepId);
  const [pasted, setPasted] = useState<PastedBlock | null>(null);
  const selected = routine.steps.find((step) => step.id === selectedId) ?? null;
  const field = `node.routines.${routine.id}.steps`;

  const add = (): void => {
    const at = selected ? routine.steps.indexOf(selected) + 1 : routine.steps.length;
    const made = emptyStep('New step');
    const stepId = idOfNewStep(store.getState().document, made.name);
    store.edit({
      label: 'add a step',
      selection: { stepId },
      focus: `${field}.${stepId}.name`,
      change: (document) => addStep(document, routine.id, made, at),
    });
  };
  const move = (stepId: string, places: number): void =>
    store.edit({
      label: 'move a step',
      focus: focusOfRow(field, stepId),
      change: (document) => moveStep(document, routine.id, stepId, places),
    });
  const remove = ({ id, name }: Step): void =>
    removal(
      {
        label: `remove the step “${name}”`,
        selection: { stepId: neighbourOf(routine.steps, id) },
        change: (document) => removeStep(document, routine.id, id),
      },
      `Step “${name}” removed.`,
    );

  return (
    <>
      <EditGrid
        label={`Steps of ${routine.name}`}
        columns={columnsOf(parts)}
        fieldPrefix={`${field}.`}
        onMoveRow={move}
        onAddRow={add}
        onSelectRow={(stepId) => {
          if (stepId !== store.getState().selection.stepId) store.select({ stepId });
        }}
        onPasteBlock={setPasted}
        footer={
          <RowToolbar
            what="step"
            addLabel="Add a step"
            selected={selected?.name ?? null}
            fullText={
              routine.steps.length >= LIMITS.stepsPerRoutine ? `At most ${LIMITS.stepsPerRoutine} steps.` : undefined
            }
            onAdd={add}
            {...(selected && {
              onMove: (places: number) => move(selected.id, places),
              onDuplicate: () =>
                store.edit({
                  label: `duplicate the step “${selected.name}”`,
                  selection: { stepId: idOfNewStep(store.getState().document, selected.name) },
                  change: (document) => duplicateStep(document, routine.id, selected.id),
                }),
              onRemove: () => remove(selected),
            })}
          />
        }
      >
        {routine.steps.map((step) => (
          <StepRow key={step.id} routineId={routine.id} step={step} parts={parts} isSelected={step === selected} />
        ))}
      </EditGrid>
      {pasted && <PasteDialog block={pasted} target={stepsPasteTarget(routine.id)} onClose={() => setPasted(null)} />}
    </>
  );
}

function neighbourOf(steps: readonly Step[], stepId: string): string | null {
  const index = steps.findIndex((step) => step.id === stepId);
  return (steps[index + 1] ?? steps[index - 1])?.id ?? null;
}

function columnsOf(parts: readonly Pick<Part, 'id' | 'name'>[]): GridColumn[] {
  return [
    { key: 'name', header: 'Step', width: '8.5rem' },
    { key: 'duration', header: 'Duration', width: '7rem', isNumber: true },
    ...parts.map((part) => ({ key: part.id, header: part.name, width: '6.5rem' })),
    { key: 'repeats', header: 'Times', width: '3.5rem', isNumber: true },
  ];
}

interface StepRowProps {
  routineId: string;
  step: Step;
  parts: readonly Part[];
  isSelected: boolean;
}

const StepRow = memo(function StepRow({ routineId, step, parts, isSelected }: StepRowProps) {
  const field = `node.routines.${routineId}.steps.${step.id}`;
  return (
    <GridRow rowId={step.id} isSelected={isSelected}>
      <GridNameCell>
        <TextFieldOf
          field={`${field}.name`}
          label="Name of the step"
          value={step.name}
          isCell
          change={(document, name) => updateStep(document, routineId, step.id, (before) => ({ ...before, name }))}
        />
      </GridNameCell>
      <GridCell column="duration">
        <DurationCell routineId={routineId} step={step} />
      </GridCell>
      {parts.map((part) => (
        <GridCell key={part.id} column={part.id}>
          <ChoiceField
            field={`${field}.states.${part.id}`}
            label={`${part.name} in ${step.name}`}
            editLabel={`state of ${part.name} in ${step.name}`}
            isCell
            value={step.states[part.id] ?? ''}
            choices={[
              { value: '', label: isLedByLink(step, part, parts) ? 'by the link' : 'rest' },
              ...part.states.map(({ id, name }) => ({ value: id, label: name })),
            ]}
            change={(document, stateId) =>
              updateStep(document, routineId, step.id, (before) => withPartState(before, part.id, stateId))
            }
          />
        </GridCell>
      ))}
      <GridCell column="repeats">
        <FigureField
          field={`${field}.repeats`}
          label={`Repeats of ${step.name}`}
          value={step.repeats ?? 1}
          options={REPEATS}
          isCell
          align="right"
          change={(document, repeats) =>
            updateStep(document, routineId, step.id, (before) =>
              withOptional(before, 'repeats', repeats === 1 ? undefined : repeats),
            )
          }
        />
      </GridCell>
    </GridRow>
  );
});
