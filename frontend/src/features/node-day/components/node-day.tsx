import { useMemo, useState } from 'react';
import type { Routine, Scenario } from '#common/engine/index.ts';
import { cyclesPerDay } from '#common/engine/index.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import { Segmented } from '#frontend/components/segmented.tsx';
import { compileAlone, type CompiledRoutine } from '../model/compiled-routine.ts';
import { cyclesInWords, scheduleInWords } from '../model/schedule-words.ts';
import { CycleLanes } from './cycle-lanes.tsx';
import { DayLanes } from './day-lanes.tsx';
import { ProblemLanes } from './problem-lanes.tsx';

interface Props {
  scenario: Scenario;
  /** Routine to show; the first one where it is null or gone. */
  routineId: string | null;
  selectedStepId: string | null;
  onSelectStep: (stepId: string) => void;
  onSelectRoutine: (routineId: string) => void;
}

type View = 'cycle' | 'day';
const VIEWS: { value: View; label: string }[] = [
  { value: 'cycle', label: 'one cycle' },
  { value: 'day', label: 'one day' },
];

/** The day of the node: a lane a part over one cycle of a routine, or all routines over 24 hours. */
export function NodeDay({ scenario, routineId, selectedStepId, onSelectStep, onSelectRoutine }: Props) {
  const [view, setView] = useState<View>('cycle');
  const { routines, parts } = scenario.node;
  const routine = routines.find((candidate) => candidate.id === routineId) ?? routines[0];
  const compiled = useMemo(() => (routine ? compileAlone(scenario, routine) : null), [scenario, routine]);

  if (parts.length === 0) {
    return (
      <Missing
        title="The day of the node"
        text="Parts come first: add a radio, a controller or a sensor, and its lane appears here."
      />
    );
  }
  if (!routine || !compiled) {
    return (
      <Missing
        title="The day of the node"
        text="The node only rests. Add a routine, and its steps appear here, a lane for each part."
      />
    );
  }
  return (
    <section aria-labelledby="node-day-heading" className="min-w-0">
      <h2 id="node-day-heading" className="text-title leading-tight font-light tracking-[-0.015em]">
        {routine.name}, <span className="font-extrabold">{scheduleInWords(routine.schedule)}</span>
      </h2>
      <p className="text-muted mt-1 min-h-6">{summary(routine, compiled)}</p>
      <div className="mt-5 flex flex-wrap items-baseline justify-between gap-x-6">
        <p className="text-small">
          <span className="font-extrabold">The day of the node</span>
          <span className="text-muted ml-2.5">
            {view === 'cycle'
              ? 'one cycle; time on a logarithmic scale, tint by current'
              : 'all routines over 24 hours'}
          </span>
        </p>
        <div className="text-small">
          <Segmented label="View of the day" value={view} options={VIEWS} onChange={setView} />
        </div>
      </div>
      {view === 'day' ? (
        <DayLanes scenario={scenario} selectedId={routine.id} onSelectRoutine={onSelectRoutine} />
      ) : compiled.kind === 'problems' ? (
        <ProblemLanes
          scenario={scenario}
          routine={routine}
          problems={compiled.problems}
          selectedStepId={selectedStepId}
          onSelectStep={onSelectStep}
        />
      ) : routine.steps.length === 0 ? (
        <p className="text-muted py-8">This routine has no steps yet.</p>
      ) : (
        <CycleLanes
          scenario={scenario}
          compiled={compiled}
          selectedStepId={selectedStepId}
          onSelectStep={onSelectStep}
        />
      )}
    </section>
  );
}

function summary(routine: Routine, compiled: CompiledRoutine): string {
  const off = routine.enabled ? '' : 'Switched off, so not in the forecast. ';
  if (compiled.kind === 'problems') return `${off}Cannot be laid out yet.`;
  const { cycleS } = compiled.routine;
  const perDay = cyclesPerDay(routine.schedule, cycleS);
  const often = routine.schedule.kind === 'once' ? 'One cycle in all' : cyclesInWords(perDay);
  return `${off}${often}, ${formatDuration(cycleS)} awake each. Between cycles the parts rest, which means sleep.`;
}

function Missing({ title, text }: { title: string; text: string }) {
  return (
    <section aria-label={title} className="py-2">
      <p className="text-small font-extrabold">{title}</p>
      <p className="mt-2 text-[1.1875rem] leading-[1.45] font-light">{text}</p>
    </section>
  );
}
