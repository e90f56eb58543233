import { useState } from 'react';
import type { InputProblem } from '#common/schemas/problem.ts';
import type { Routine } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import {
  useDocument,
  useEditorState,
  useEditorStore,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useRemoval } from '#frontend/features/scenario-editor/hooks/use-removal.ts';
import {
  addRoutine,
  duplicateRoutine,
  emptyRoutine,
  idOfNewRoutine,
  moveRoutine,
  removeRoutine,
  updateRoutine,
} from '#frontend/features/scenario-editor/model/operations/routine-operations.ts';
import { scheduleWords } from '#frontend/features/scenario-editor/model/words.ts';
import { TextFieldOf } from '../fields/bound-fields.tsx';
import { BadDaysDialog } from './bad-days-dialog.tsx';
import { MissingMoves } from './missing-moves.tsx';
import { PickList } from './pick-list.tsx';
import { ScheduleEditor } from './schedule-editor.tsx';
import { Section } from './section.tsx';
import { StepDetail } from './step-detail.tsx';
import { StepsGrid } from './steps-grid.tsx';
import { ItemActions } from './item-actions.tsx';

/** What the node does, and when: its routines, and the steps of the chosen one. */
export function RoutinesSection({ problems }: { problems: readonly InputProblem[] }) {
  const store = useEditorStore();
  const routines = useDocument((document) => document.node.routines);
  const { routineId, stepId } = useEditorState((state) => state.selection);
  const routine = routines.find(({ id }) => id === routineId) ?? routines[0];
  const step = routine?.steps.find(({ id }) => id === stepId);
  const [isChoosing, setChoosing] = useState(false);
  const isFull = routines.length >= LIMITS.routines;
  const add = (): void => {
    const id = idOfNewRoutine(store.getState().document, 'New routine');
    store.edit({
      label: 'add a routine',
      selection: { routineId: id, stepId: null },
      focus: `node.routines.${id}.name`,
      change: (document) => addRoutine(document, emptyRoutine('New routine')),
    });
  };
  const select = (id: string): void =>
    store.select({ routineId: id, stepId: routines.find((other) => other.id === id)?.steps[0]?.id ?? null });
  return (
    <Section id="routines" title="Routines" note="what the node does, and when; a part that a step does not name rests">
      <PickList
        label="Routines"
        items={routines.map(({ id, name, schedule, enabled }) => ({
          id,
          name,
          note: enabled ? scheduleWords(schedule) : 'switched off',
          isFaint: !enabled,
        }))}
        selectedId={routine?.id ?? null}
        onSelect={select}
        onMove={(id, places) =>
          store.edit({
            label: 'move a routine',
            focus: `pick.${id}`,
            change: (document) => moveRoutine(document, id, places),
          })
        }
      >
        <span className="flex flex-wrap gap-x-5">
          <AddButton label="Add a routine" isFull={isFull} onAdd={add} />
          <AddButton label="Bad days" isFull={isFull} onAdd={() => setChoosing(true)} />
        </span>
      </PickList>
      {isChoosing && <BadDaysDialog onClose={() => setChoosing(false)} />}
      {routine ? (
        <div className="mt-4">
          <RoutineHead routine={routine} />
          <ScheduleEditor routine={routine} />
          <StepsGrid routine={routine} />
          <MissingMoves problems={problems} />
          {step && <StepDetail routine={routine} step={step} />}
        </div>
      ) : (
        <p className="mt-3 text-muted">
          There is no routine yet, so the node only rests, which is to say that it sleeps. Add one, such as a report
          every 15 min.
        </p>
      )}
    </Section>
  );
}

export function AddButton({ label, isFull, onAdd }: { label: string; isFull: boolean; onAdd: () => void }) {
  if (useIsReadOnly()) return null;
  return (
    <button
      type="button"
      disabled={isFull}
      onClick={onAdd}
      className="min-h-10 rounded-sm font-semibold text-accent enabled:hover:underline enabled:hover:underline-offset-4 disabled:opacity-50"
    >
      + {label}
    </button>
  );
}

function RoutineHead({ routine }: { routine: Routine }) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const removal = useRemoval();
  const { id, name } = routine;
  return (
    <div className="flex items-start gap-x-4 sm:gap-x-6">
      <div className="min-w-0 flex-1">
        <TextFieldOf
          field={`node.routines.${id}.name`}
          label="Name of the routine"
          value={name}
          change={(document, next) => updateRoutine(document, id, (before) => ({ ...before, name: next }))}
        />
      </div>
      <label className="flex min-h-10 items-center gap-2 pt-5 whitespace-nowrap">
        <input
          type="checkbox"
          className="size-4 accent-[var(--accent)]"
          checked={routine.enabled}
          disabled={isReadOnly}
          onChange={() =>
            store.edit({
              label: `switch ${name} ${routine.enabled ? 'off' : 'on'}`,
              change: (document) => updateRoutine(document, id, (before) => ({ ...before, enabled: !before.enabled })),
            })
          }
        />
        Switched on
      </label>
      <ItemActions
        name={name}
        what="routine"
        onMove={(places) =>
          store.edit({ label: 'move a routine', change: (document) => moveRoutine(document, id, places) })
        }
        onDuplicate={() =>
          store.edit({
            label: `duplicate the routine “${name}”`,
            selection: { routineId: idOfNewRoutine(store.getState().document, name), stepId: null },
            change: (document) => duplicateRoutine(document, id),
          })
        }
        onRemove={() =>
          removal(
            {
              label: `remove the routine “${name}”`,
              selection: { routineId: null, stepId: null },
              change: (document) => removeRoutine(document, id),
            },
            `Routine “${name}” removed.`,
          )
        }
      />
    </div>
  );
}
