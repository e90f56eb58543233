import type { Part, Provenance, Schedule, StateRole, When } from '#common/engine/scenario/scenario.types.ts';
import { formatDuration, MONTH_NAMES } from '#common/units/format-duration.ts';
import { formatNumber } from '#common/units/format-quantity.ts';
import { perYearOf } from '#common/units/per-year.ts';

export const ROLES: readonly { value: StateRole; label: string }[] = [
  { value: 'sleep', label: 'sleep' },
  { value: 'idle', label: 'idle' },
  { value: 'synthesiser', label: 'synthesiser' },
  { value: 'listen', label: 'listen' },
  { value: 'receive', label: 'receive' },
  { value: 'transmit', label: 'transmit' },
  { value: 'active', label: 'active' },
];

export const PART_KINDS: readonly { value: Part['kind']; label: string }[] = [
  { value: 'radio', label: 'radio' },
  { value: 'controller', label: 'controller' },
  { value: 'sensor', label: 'sensor' },
  { value: 'actuator', label: 'actuator' },
  { value: 'other', label: 'other' },
];

export const PROVENANCE_KINDS: readonly { value: Provenance['kind']; label: string; explanation: string }[] = [
  { value: 'source', label: 'source', explanation: 'Taken from a document that can be looked up.' },
  { value: 'measured', label: 'measured', explanation: 'Measured on a real board.' },
  { value: 'typical', label: 'typical', explanation: 'Usual for parts of this kind.' },
  { value: 'memory', label: 'from memory', explanation: 'Remembered, not checked against a document.' },
  { value: 'assumed', label: 'assumed', explanation: 'Nothing stands behind it yet.' },
];

export function provenanceWord(kind: Provenance['kind']): string {
  return PROVENANCE_KINDS.find(({ value }) => value === kind)?.label ?? kind;
}

/** Months as choices, January first. */
export const MONTHS: readonly { value: string; label: string }[] = MONTH_NAMES.map((label, index) => ({
  value: String(index + 1),
  label,
}));

/** A schedule in words: "every 15 min", "06:00 to 18:00, every 15 min, below 2 °C". */
export function scheduleWords(schedule: Schedule): string {
  return [ownWords(schedule), ...whenWords(schedule.when)].join(', ');
}

function ownWords(schedule: Schedule): string {
  switch (schedule.kind) {
    case 'every':
      return `every ${formatDuration(schedule.periodS)}`;
    case 'random':
      return `at random, ${rateWords(schedule.meanPerDay)}`;
    case 'window':
      return `${clock(schedule.fromHour)} to ${clock(schedule.toHour)}, every ${formatDuration(schedule.periodS)}`;
    case 'once':
      return schedule.afterS === 0 ? 'once, at the beginning' : `once, after ${formatDuration(schedule.afterS)}`;
    case 'always':
      return 'always';
  }
}

/** What happens less often than once a week is easier to grasp by the year. */
function rateWords(meanPerDay: number): string {
  return meanPerDay > 0 && meanPerDay < 1 / 7
    ? `${formatNumber(perYearOf(meanPerDay))} a year`
    : `${formatNumber(meanPerDay)} a day`;
}

function clock(hour: number): string {
  const minutes = Math.round(hour * 60);
  return `${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`;
}

function whenWords(when: When | undefined): string[] {
  const words: string[] = [];
  if (when?.months) words.push(`in ${when.months.map((month) => MONTH_NAMES[month - 1]?.slice(0, 3)).join(', ')}`);
  if (when?.belowC !== undefined) words.push(`below ${formatNumber(when.belowC)} °C`);
  if (when?.aboveC !== undefined) words.push(`above ${formatNumber(when.aboveC)} °C`);
  return words;
}
