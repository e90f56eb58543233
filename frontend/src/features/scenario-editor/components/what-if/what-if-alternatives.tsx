import { useMemo, useState } from 'react';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { Segmented } from '#frontend/components/segmented.tsx';
import { useEditorStore, useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useJobs } from '#frontend/features/scenario-editor/hooks/use-jobs.ts';
import {
  whatIfAxes,
  type Alternative,
  type Axis,
  type AxisId,
  type WhatIfTarget,
} from '#frontend/features/scenario-editor/model/what-if/what-if-axes.ts';
import { outcomeOf, type WhatIfOutcome } from '#frontend/features/scenario-editor/model/what-if/what-if-outcome.ts';
import { whatIfRows, type Row } from '#frontend/features/scenario-editor/model/what-if/what-if-rows.ts';

interface Props extends WhatIfTarget {
  document: Scenario;
}

/** One thing that could be otherwise at a time, a few values of it beside each other. */
export function WhatIfAlternatives({ document, routineId, stepId }: Props) {
  const [axisId, setAxisId] = useState<AxisId | null>(null);
  const axes = useMemo(() => whatIfAxes(document, { routineId, stepId }), [document, routineId, stepId]);
  const axis = axes.find(({ id }) => id === axisId) ?? axes[0] ?? null;
  const set = useMemo(
    () => ({
      subject: axis,
      jobs: (axis?.alternatives ?? []).map(
        ({ change }) =>
          () =>
            outcomeOf(change(document), { routineId, stepId }),
      ),
    }),
    [axis, document, routineId, stepId],
  );
  const done = useJobs(set);
  if (!axis) return <p className="py-2 text-small text-muted">The step has no plan yet, so nothing follows from it.</p>;
  return (
    <>
      <Segmented
        label="What could be otherwise"
        value={axis.id}
        options={axes.map(({ id, title }) => ({ value: id, label: title }))}
        onChange={setAxisId}
      />
      {/* The height of a whole table, so that nothing moves when it comes. */}
      <div className="min-h-80" aria-busy={done?.set !== set}>
        {done?.set.subject && <Table axis={done.set.subject} outcomes={done.results} isOld={done.set !== set} />}
      </div>
    </>
  );
}

interface TableProps {
  axis: Axis;
  outcomes: readonly WhatIfOutcome[];
  isOld: boolean;
}

function Table({ axis, outcomes, isOld }: TableProps) {
  const isReadOnly = useIsReadOnly();
  const { alternatives, title } = axis;
  const current = alternatives.findIndex(({ isCurrent }) => isCurrent);
  const rows = whatIfRows(outcomes, current);
  const problems = alternatives.flatMap(({ label }, index) => {
    const outcome = outcomes[index];
    return outcome?.kind === 'problem' ? [{ label, message: outcome.message }] : [];
  });
  return (
    <div className={isOld ? 'opacity-50' : ''}>
      <div className="overflow-x-auto" tabIndex={0} role="group" aria-label={`What if: ${title}`}>
        <table className="w-full table-fixed border-collapse text-left tabular-nums max-sm:min-w-[44rem]">
          <thead>
            <tr className="border-b border-line align-bottom">
              <th scope="col" className="sticky left-0 w-28 bg-paper py-1.5 pr-3 text-small font-normal text-muted">
                {title}
              </th>
              {alternatives.map(({ label, isCurrent, value }) => (
                <th key={value} scope="col" className={`py-1.5 pr-3 ${isCurrent ? 'font-extrabold' : 'font-semibold'}`}>
                  {label}
                  {isCurrent && <span className="block text-small font-normal text-muted">now</span>}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <MetricRow key={row.title} row={row} current={current} />
            ))}
            {!isReadOnly && <TakeRow axis={axis} outcomes={outcomes} isOld={isOld} />}
          </tbody>
        </table>
      </div>
      {problems.map(({ label, message }) => (
        <p key={label} className="mt-1 text-small text-muted">
          {label}: {message}
        </p>
      ))}
    </div>
  );
}

function MetricRow({ row, current }: { row: Row; current: number }) {
  return (
    <tr className="border-b border-hair align-top">
      <th scope="row" className="sticky left-0 bg-paper py-1.5 pr-3 text-small font-normal text-muted">
        {row.title}
      </th>
      {row.cells.map(({ text, change }, index) => (
        <td key={index} className={`py-1.5 pr-3 ${index === current ? 'font-extrabold' : ''}`}>
          <span className="text-[0.9375rem] whitespace-nowrap">{change ?? text}</span>
          {change !== null && <span className="block text-small text-muted">{text}</span>}
        </td>
      ))}
    </tr>
  );
}

function TakeRow({ axis, outcomes, isOld }: TableProps) {
  const store = useEditorStore();
  const take = ({ label, change }: Alternative, button: HTMLElement): void => {
    // The button goes away with what it offered.
    button.closest<HTMLElement>('[role="group"]')?.focus();
    store.edit({ label: `what if: ${axis.word} ${label}`, change });
  };
  return (
    <tr>
      <th scope="row">
        <span className="sr-only">Take a value</span>
      </th>
      {axis.alternatives.map((alternative, index) => (
        <td key={alternative.value} className="py-1 pr-3">
          {!alternative.isCurrent && outcomes[index]?.kind === 'figures' && (
            <button
              type="button"
              className="link min-h-9 text-small"
              disabled={isOld}
              aria-label={`Take it: ${axis.word} ${alternative.label}`}
              onClick={(event) => take(alternative, event.currentTarget)}
            >
              take it
            </button>
          )}
        </td>
      ))}
    </tr>
  );
}
