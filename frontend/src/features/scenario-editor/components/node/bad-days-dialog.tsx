import { useState } from 'react';
import { BAD_DAYS, badDayRoutine, type BadDay } from '#common/catalogue/bad-days.ts';
import { Button } from '#frontend/components/button.tsx';
import { Dialog } from '#frontend/components/dialog.tsx';
import { QuantityInput } from '#frontend/components/quantity-input.tsx';
import { useDocument, useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { TIMES_A_YEAR } from '#frontend/features/scenario-editor/model/figure-options.ts';
import {
  addReadyRoutine,
  idOfNewRoutine,
} from '#frontend/features/scenario-editor/model/operations/routine-operations.ts';

/** Ready routines for days out of the ordinary, made for the radio and the controller of the node. */
export function BadDaysDialog({ onClose }: { onClose: () => void }) {
  return (
    <Dialog title="Bad days" isOpen onClose={onClose}>
      <p className="mb-2 text-small text-muted">
        Each becomes a routine with steps of its own, times on the air from the link. Look at its figures afterwards:
        they are usual ones, not yours.
      </p>
      {BAD_DAYS.map((day) => (
        <BadDayRow key={day.id} day={day} onClose={onClose} />
      ))}
    </Dialog>
  );
}

function BadDayRow({ day, onClose }: { day: BadDay; onClose: () => void }) {
  const store = useEditorStore();
  const node = useDocument((document) => document.node);
  const [timesAYear, setTimesAYear] = useState(day.timesAYear ?? 1);
  const { routine, missing } = badDayRoutine(node, day.id, timesAYear);
  const add = (): void => {
    if (!routine) return;
    const id = idOfNewRoutine(store.getState().document, routine.name);
    onClose();
    store.edit({
      label: `add the routine “${routine.name}”`,
      selection: { routineId: id, stepId: null },
      focus: `pick.${id}`,
      change: (document) => addReadyRoutine(document, routine),
    });
  };
  return (
    <section aria-label={day.name} className="border-t border-hair py-4">
      <h3 className="font-extrabold">{day.name}</h3>
      <p className="text-small text-muted">{day.description}</p>
      {missing.length > 0 ? (
        <p className="mt-2 border-l-2 border-caution pl-3 text-small">This node lacks {missing.join('; ')}.</p>
      ) : (
        <div className="mt-2 flex flex-wrap items-start justify-between gap-x-6">
          {day.timesAYear === null ? (
            <p className="pt-2 text-small">once in a life</p>
          ) : (
            <div className="w-36">
              <QuantityInput
                label="Times a year"
                value={timesAYear}
                options={TIMES_A_YEAR}
                onCommit={(value) => value !== undefined && setTimesAYear(value)}
              />
            </div>
          )}
          <Button aria-label={`Add ${day.name}`} onClick={add}>
            Add
          </Button>
        </div>
      )}
    </section>
  );
}
