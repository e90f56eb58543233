import { useState } from 'react';
import type { Routine } from '#common/engine/scenario/scenario.types.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import { useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { PERIOD } from '#frontend/features/scenario-editor/model/figure-options.ts';
import {
  countingSide,
  KEEP_ALIVE_SIDES,
  withKeepAlive,
  type Every,
} from '#frontend/features/scenario-editor/model/keep-alive.ts';
import { updateRoutine } from '#frontend/features/scenario-editor/model/operations/routine-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';

const wordOf = (schedule: Every): string => {
  const counting = countingSide(schedule.keepAlive);
  return KEEP_ALIVE_SIDES.find(({ side }) => side === counting)?.word ?? '';
};

/** The period that follows from poll, supervision and child timeout, and which of them it is. */
export function PeriodThatCounts({ schedule }: { schedule: Every }) {
  return (
    <div>
      <p className="text-small text-muted">Period</p>
      <p className="py-1.5 font-semibold">{formatDuration(schedule.periodS)}</p>
      <p className="min-h-6 pt-1 text-small text-muted">the {wordOf(schedule)} counts</p>
    </div>
  );
}

interface Props {
  routine: Routine;
  schedule: Every;
  field: string;
}

/** Poll, supervision and child timeout of a child that must be heard from, entered together. */
export function KeepAliveFields({ routine, schedule, field }: Props) {
  const { id, name } = routine;
  const counting = countingSide(schedule.keepAlive);
  const [isOpen, setOpen] = useState(counting !== null);
  const isReadOnly = useIsReadOnly();
  if (isReadOnly && counting === null) return null;
  return (
    <details
      open={isOpen}
      onToggle={(event) => setOpen(event.currentTarget.open)}
      className="order-last col-span-full mb-2 min-w-0"
    >
      <summary className="min-h-9 w-fit py-1.5 text-small text-muted hover:text-ink">
        Poll, supervision and child timeout
        <span className="ml-2">
          {counting === null
            ? '(for a child of a parent; none given)'
            : `(the shortest counts: the ${wordOf(schedule)})`}
        </span>
      </summary>
      {isOpen && (
        <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">
          {KEEP_ALIVE_SIDES.map(({ side, label, hint }) => (
            <FigureField
              key={side}
              field={`${field}.keepAlive.${side}`}
              label={label}
              editLabel={`${label.toLowerCase()} of ${name}`}
              hint={side === counting ? 'counts' : hint}
              value={schedule.keepAlive?.[side]}
              options={PERIOD}
              isOptional
              change={(document, value) =>
                updateRoutine(document, id, (before) => ({
                  ...before,
                  schedule: withKeepAlive(before.schedule, side, value),
                }))
              }
            />
          ))}
        </div>
      )}
    </details>
  );
}
