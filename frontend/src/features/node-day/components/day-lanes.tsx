import { useId, useMemo } from 'react';
import type { Scenario } from '#common/engine/index.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import { compileAlone } from '../model/compiled-routine.ts';
import { dayStrip, type DayStrip } from '../model/day.ts';
import { clock, cyclesInWords, scheduleInWords } from '../model/schedule-words.ts';
import { percent } from './step-header.tsx';

interface Props {
  scenario: Scenario;
  selectedId: string;
  onSelectRoutine: (routineId: string) => void;
}

interface DayRow {
  id: string;
  name: string;
  schedule: string;
  strip: DayStrip;
  told: string;
}

const HOURS = [0, 6, 12, 18, 24];

/** All routines over 24 hours: first laid over each other, then each by itself with its count. */
export function DayLanes({ scenario, selectedId, onSelectRoutine }: Props) {
  const rows = useMemo(() => dayRows(scenario), [scenario]);
  return (
    <div className="mt-3">
      <div className="grid gap-x-4 sm:grid-cols-[8rem_minmax(0,1fr)]">
        <span className="max-sm:hidden" />
        <div className="text-muted relative h-5 text-[0.6875rem] tabular-nums" aria-hidden="true">
          {HOURS.map((hour) => (
            <span
              key={hour}
              className={`absolute ${hour === 0 ? '' : hour === 24 ? '-translate-x-full' : '-translate-x-1/2'}`}
              style={{ left: percent(hour / 24) }}
            >
              {clock(hour)}
            </span>
          ))}
        </div>
        <p className="text-small self-center font-semibold">All together</p>
        <Strip strips={rows.map((row) => row.strip)} heightPx={40} />
      </div>
      <ul className="mt-2">
        {rows.map((row) => (
          <li key={row.id} className="border-hair border-t">
            <button
              type="button"
              aria-pressed={row.id === selectedId}
              className="grid w-full gap-x-4 py-2 text-left sm:grid-cols-[8rem_minmax(0,1fr)]"
              onClick={() => onSelectRoutine(row.id)}
            >
              <span
                className={`text-small ${row.id === selectedId ? 'font-extrabold underline decoration-accent decoration-2 underline-offset-4' : 'font-semibold'}`}
              >
                {row.name}
              </span>
              <span className="min-w-0">
                <Strip strips={[row.strip]} heightPx={20} />
                <span className="text-muted text-[0.75rem] tabular-nums">
                  {row.schedule}: {row.told}
                </span>
              </span>
            </button>
          </li>
        ))}
      </ul>
    </div>
  );
}

function dayRows(scenario: Scenario): DayRow[] {
  return scenario.node.routines
    .filter((routine) => routine.enabled)
    .map((routine) => {
      const compiled = compileAlone(scenario, routine);
      const cycleS = compiled.kind === 'laid-out' ? compiled.routine.cycleS : 0;
      const strip = dayStrip(routine, cycleS);
      const awake = strip.perDay > 0 && cycleS > 0 ? `, ${formatDuration(strip.perDay * cycleS)} awake` : '';
      const told =
        routine.schedule.kind === 'once' ? 'not on an ordinary day' : `${cyclesInWords(strip.perDay)}${awake}`;
      return { id: routine.id, name: routine.name, schedule: scheduleInWords(routine.schedule), strip, told };
    });
}

function Strip({ strips, heightPx }: { strips: readonly DayStrip[]; heightPx: number }) {
  const id = useId();
  // Single marks last, so that a density never hides them.
  const ordered = [...strips].sort((a, b) => Number(a.kind === 'marks') - Number(b.kind === 'marks'));
  return (
    <svg width="100%" height={heightPx} className="block" aria-hidden="true" focusable="false">
      <defs>
        <pattern id={id} width="3" height="3" patternUnits="userSpaceOnUse">
          <rect width="3" height="3" className="fill-tint-2" />
          <line x1="1" x2="1" y2="3" className="stroke-tint-4" />
        </pattern>
      </defs>
      {ordered.map((strip, i) => (
        <Marks key={i} strip={strip} heightPx={heightPx} densityFill={`url(#${id})`} />
      ))}
      <line x2="100%" y1={heightPx - 0.5} y2={heightPx - 0.5} className="stroke-line" />
      {HOURS.slice(1, -1).map((hour) => (
        <line
          key={hour}
          x1={percent(hour / 24)}
          x2={percent(hour / 24)}
          y1={heightPx - 5}
          y2={heightPx}
          className="stroke-line"
        />
      ))}
    </svg>
  );
}

function Marks({ strip, heightPx, densityFill }: { strip: DayStrip; heightPx: number; densityFill: string }) {
  if (strip.kind === 'density' || strip.kind === 'solid') {
    const shade = strip.kind === 'solid' ? 1 : density(strip.perDay);
    return strip.stretchesH.map(([from, to]) => (
      <rect
        key={from}
        x={percent(from / 24)}
        width={percent((to - from) / 24)}
        y={heightPx * (1 - shade)}
        height={heightPx * shade}
        {...(strip.kind === 'solid' ? { className: 'fill-tint-4' } : { fill: densityFill })}
      />
    ));
  }
  return strip.marksH.map((hour, i) => (
    <line
      key={i}
      x1={percent(hour / 24)}
      x2={percent(hour / 24)}
      y1={strip.isRandom ? heightPx * 0.35 : 3}
      y2={heightPx}
      className="stroke-accent"
      strokeWidth="1.5"
      strokeDasharray={strip.isRandom ? '2 2' : undefined}
    />
  ));
}

/** Height of a density: 100 a day fill two fifths, a cycle a second fills the strip. */
function density(perDay: number): number {
  return Math.min(1, 0.4 + 0.6 * (Math.log10(perDay / 100) / Math.log10(864)));
}
