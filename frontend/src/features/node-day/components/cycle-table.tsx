import { useState } from 'react';
import type { Interval, Scenario } from '#common/engine/index.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import { formatCurrent } from '#common/units/format-quantity.ts';
import type { CompiledRoutine } from '../model/compiled-routine.ts';

interface Props {
  scenario: Scenario;
  compiled: Extract<CompiledRoutine, { kind: 'laid-out' }>;
}

const KIND_WORDS: Record<Interval['kind'], string> = { step: '', move: 'moving to ', return: 'returning after ' };

/** The intervals of the cycle with what each part does and draws, as numbers. */
export function CycleTable({ scenario, compiled }: Props) {
  const [isOpen, setOpen] = useState(false);
  return (
    <details className="text-small mt-2 sm:pl-32" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary className="text-muted hover:text-ink w-fit">The same numbers as a table</summary>
      {isOpen && (
        <div className="mt-2 overflow-x-auto" tabIndex={0} role="group" aria-label="One cycle, a table">
          <table className="w-full text-left tabular-nums">
            <thead>
              <tr className="border-line border-b">
                <th className="py-1 pr-4 font-bold">Interval</th>
                <th className="py-1 pr-4 text-right font-bold">Begins</th>
                <th className="py-1 pr-4 text-right font-bold">Lasts</th>
                {compiled.parts.map((part) => (
                  <th key={part.partId} className="py-1 pr-4 font-bold">
                    {part.name}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {compiled.routine.intervals.map((interval) => (
                <tr key={interval.id} className="border-hair border-b">
                  <th scope="row" className="py-1 pr-4 text-left font-normal">
                    {KIND_WORDS[interval.kind]}
                    {interval.stepName}
                  </th>
                  <td className="py-1 pr-4 text-right whitespace-nowrap">{formatDuration(interval.startS)}</td>
                  <td className="py-1 pr-4 text-right whitespace-nowrap">{formatDuration(interval.durationS)}</td>
                  {compiled.parts.map((part, i) => (
                    <td key={part.partId} className="py-1 pr-4 whitespace-nowrap">
                      {doing(scenario, compiled, { interval, partIndex: i })}
                    </td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
    </details>
  );
}

function doing(
  scenario: Scenario,
  { parts }: Props['compiled'],
  { interval, partIndex }: { interval: Interval; partIndex: number },
): string {
  const part = parts[partIndex];
  const states = scenario.node.parts.find(({ id }) => id === part?.partId)?.states ?? [];
  const nameOf = (id: string): string => states.find((state) => state.id === id)?.name ?? id;
  const occupant = interval.occupants.find((candidate) => candidate.partIndex === partIndex);
  if (!occupant) return `${nameOf(part?.restStateId ?? '')} ${formatCurrent(part?.restDraw.currentA ?? 0)}`;
  const { activity, draw } = occupant;
  const what =
    activity.kind === 'state'
      ? nameOf(activity.stateId)
      : `${nameOf(activity.fromStateId)} → ${nameOf(activity.toStateId)}`;
  return `${what} ${formatCurrent(draw.currentA)}`;
}
