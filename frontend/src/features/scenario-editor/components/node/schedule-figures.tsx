import type { Routine, Schedule } from '#common/engine/scenario/scenario.types.ts';
import type { ParseOptions } from '#common/units/parse-quantity.ts';
import { perDayOf, perYearOf } from '#common/units/per-year.ts';
import { DELAY, HOUR, PER_DAY, PERIOD, TIMES_A_YEAR } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateRoutine } from '#frontend/features/scenario-editor/model/operations/routine-operations.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { KeepAliveFields, PeriodThatCounts } from './keep-alive-fields.tsx';

interface Row {
  key: string;
  label: string;
  hint?: string;
  options: ParseOptions;
  isOptional?: boolean;
  read: (schedule: Schedule) => number | undefined;
  /** The schedule with the figure; a figure that cannot be absent is left when there is no value. */
  write: (schedule: Schedule, value: number | undefined) => Schedule;
}

const PERIOD_ROW: Row = {
  key: 'periodS',
  label: 'Period',
  options: PERIOD,
  read: (schedule) => ('periodS' in schedule ? schedule.periodS : undefined),
  write: (schedule, periodS) => ('periodS' in schedule && periodS !== undefined ? { ...schedule, periodS } : schedule),
};

/** What a year of 365.25 days makes of a round number is not round; seven digits are more than anyone types. */
const legible = (rate: number): number => Number(rate.toPrecision(7));

const ROWS: Record<Schedule['kind'], readonly Row[]> = {
  every: [PERIOD_ROW],
  window: [
    PERIOD_ROW,
    {
      key: 'fromHour',
      label: 'From hour',
      options: HOUR,
      read: (schedule) => (schedule.kind === 'window' ? schedule.fromHour : undefined),
      write: (schedule, fromHour) =>
        schedule.kind === 'window' && fromHour !== undefined ? { ...schedule, fromHour } : schedule,
    },
    {
      key: 'toHour',
      label: 'To hour',
      options: HOUR,
      read: (schedule) => (schedule.kind === 'window' ? schedule.toHour : undefined),
      write: (schedule, toHour) =>
        schedule.kind === 'window' && toHour !== undefined ? { ...schedule, toHour } : schedule,
    },
  ],
  random: [
    {
      key: 'meanPerDay',
      label: 'On average',
      options: PER_DAY,
      read: (schedule) => (schedule.kind === 'random' ? legible(schedule.meanPerDay) : undefined),
      write: (schedule, meanPerDay) =>
        schedule.kind === 'random' && meanPerDay !== undefined ? { ...schedule, meanPerDay } : schedule,
    },
    {
      key: 'timesAYear',
      label: 'Times a year',
      options: TIMES_A_YEAR,
      read: (schedule) => (schedule.kind === 'random' ? legible(perYearOf(schedule.meanPerDay)) : undefined),
      write: (schedule, timesAYear) =>
        schedule.kind === 'random' && timesAYear !== undefined
          ? { ...schedule, meanPerDay: perDayOf(timesAYear) }
          : schedule,
    },
    {
      key: 'busiestPerDay',
      label: 'On the busiest day',
      hint: 'shown, not counted',
      options: PER_DAY,
      isOptional: true,
      read: (schedule) => (schedule.kind === 'random' ? schedule.busiestPerDay : undefined),
      write: (schedule, busiest) =>
        schedule.kind === 'random' ? withOptional(schedule, 'busiestPerDay', busiest) : schedule,
    },
  ],
  once: [
    {
      key: 'afterS',
      label: 'After',
      hint: 'from the beginning of life',
      options: DELAY,
      read: (schedule) => (schedule.kind === 'once' ? schedule.afterS : undefined),
      write: (schedule, afterS) =>
        schedule.kind === 'once' && afterS !== undefined ? { ...schedule, afterS } : schedule,
    },
  ],
  always: [],
};

/** The figures of a routine's schedule, by its kind. */
export function ScheduleFigures({ routine, field }: { routine: Routine; field: string }) {
  const { schedule } = routine;
  if (schedule.kind === 'always') {
    return <p className="self-center text-small text-muted">One cycle after the other, without a pause.</p>;
  }
  const hasKeepAlive = schedule.kind === 'every' && schedule.keepAlive !== undefined;
  return (
    <>
      {hasKeepAlive && <PeriodThatCounts schedule={schedule} />}
      {!hasKeepAlive && <Rows routine={routine} field={field} />}
      {schedule.kind === 'every' && <KeepAliveFields routine={routine} schedule={schedule} field={field} />}
    </>
  );
}

function Rows({ routine: { schedule, id, name }, field }: { routine: Routine; field: string }) {
  return ROWS[schedule.kind].map(({ key, label, hint, options, isOptional, read, write }) => (
    <FigureField
      key={`${schedule.kind} ${key}`}
      field={`${field}.${key}`}
      label={label}
      editLabel={`${label.toLowerCase()} of ${name}`}
      value={read(schedule)}
      options={options}
      isOptional={isOptional ?? false}
      {...(hint === undefined ? {} : { hint })}
      change={(document, value) =>
        updateRoutine(document, id, (before) => ({ ...before, schedule: write(before.schedule, value) }))
      }
    />
  ));
}
