import type { Schedule, When } from '#common/engine/index.ts';
import { formatDuration, monthName } from '#common/units/format-duration.ts';
import { formatNumber, formatTemperature, NO_BREAK_SPACE } from '#common/units/format-quantity.ts';
import { perYearOf } from '#common/units/per-year.ts';

/** A schedule as the end of a heading: "every 15 min", "at random, 140 times a day on average". */
export function scheduleInWords(schedule: Schedule): string {
  const when = whenInWords(schedule.when);
  return when === '' ? bare(schedule) : `${bare(schedule)}, ${when}`;
}

function bare(schedule: Schedule): string {
  switch (schedule.kind) {
    case 'every':
      return `every ${period(schedule.periodS)}`;
    case 'random':
      return `at random, ${rate(schedule.meanPerDay)} on average`;
    case 'window':
      return `every ${period(schedule.periodS)} from ${clock(schedule.fromHour)} to ${clock(schedule.toHour)}`;
    case 'once':
      return schedule.afterS === 0 ? 'once, at the beginning' : `once, after ${formatDuration(schedule.afterS)}`;
    case 'always':
      return 'again and again';
  }
}

/** What happens less often than once a week is easier to grasp by the year. */
function rate(meanPerDay: number): string {
  return meanPerDay > 0 && meanPerDay < 1 / 7
    ? `${formatNumber(perYearOf(meanPerDay))} times a year`
    : `${formatNumber(meanPerDay)} times a day`;
}

/** "every minute" rather than "every 1 min". */
function period(periodS: number): string {
  const units: Record<number, string> = { 1: 'second', 60: 'minute', 3_600: 'hour', 86_400: 'day' };
  return units[periodS] ?? formatDuration(periodS);
}

/** An hour of the day as a clock shows it: "02:30". */
export function clock(hour: number): string {
  const minutes = Math.round(hour * 60);
  return `${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`;
}

function whenInWords(when: When | undefined): string {
  if (!when) return '';
  const words: string[] = [];
  if (when.belowC !== undefined) words.push(`below ${formatTemperature(when.belowC)}`);
  if (when.aboveC !== undefined) words.push(`from ${formatTemperature(when.aboveC)} up`);
  if (when.months !== undefined)
    words.push(`in ${when.months.map((month) => monthName(month).slice(0, 3)).join(', ')}`);
  return words.length === 0 ? '' : `only ${words.join(', ')}`;
}

/** "96 cycles a day", "1 cycle a day", "2.5 cycles a day". */
export function cyclesInWords(perDay: number): string {
  const text = perDay >= 1_000 ? Math.round(perDay).toLocaleString('en-GB') : formatNumber(perDay);
  return `${text}${NO_BREAK_SPACE}${text === '1' ? 'cycle' : 'cycles'} a day`;
}
