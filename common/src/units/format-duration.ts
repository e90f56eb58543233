import { OutOfRangeError } from '#common/errors.ts';
import type { FormatOptions } from './format-quantity.ts';
import { formatNumber, formatQuantity, withUnit } from './format-quantity.ts';
import { DAY_S, HOUR_S, MINUTE_S, MONTH_S, YEAR_S } from './si.ts';

/** Calendar months, January first. */
export const MONTH_NAMES = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
] as const;

/**
 * Name of a calendar month.
 *
 * @param month 1 to 12.
 * @returns The English name.
 * @throws OutOfRangeError for anything else.
 * @example monthName(2) // 'February'
 */
export function monthName(month: number): string {
  const name = MONTH_NAMES[month - 1];
  if (name !== undefined) return name;
  throw new OutOfRangeError(`There is no month ${month}; months count from 1 to 12.`, {
    code: 'out-of-range',
    field: 'month',
    value: month,
    expected: '1 to 12',
  });
}

function counted(text: string, word: string): string {
  return withUnit(text, text === '1' ? word : `${word}s`);
}

/**
 * A time in the unit that people would use: `192 µs`, `14 ms`, `15 min`, `6 h`, `41 days`, `6.2 years`.
 *
 * @param durationS Time, s, 0 or more.
 * @param options Digits; by default 3 significant ones, zeros at the end left out.
 * @returns The text; `—` for a number that is not finite.
 * @example formatDuration(0.000192) // '192 µs'
 */
export function formatDuration(durationS: number, options: FormatOptions = {}): string {
  const size = Math.abs(durationS);
  if (!Number.isFinite(size)) return '—';
  if (size < MINUTE_S) return formatQuantity(durationS, 'duration', options);
  if (size < HOUR_S) return withUnit(formatNumber(durationS / MINUTE_S, options), 'min');
  if (size < DAY_S) return withUnit(formatNumber(durationS / HOUR_S, options), 'h');
  if (size < YEAR_S) return counted(formatNumber(durationS / DAY_S, options), 'day');
  return counted(formatNumber(durationS / YEAR_S, options), 'year');
}

interface Life {
  number: string;
  word: 'hour' | 'day' | 'month' | 'year';
}

export interface LifeOptions {
  /** Years in half years only, where the figures behind them deserve no more. Default false. */
  toHalfYears?: boolean;
}

function lifeOf(lifeS: number, { toHalfYears = false }: LifeOptions): Life {
  if (lifeS < 2 * DAY_S) return { number: (lifeS / HOUR_S).toFixed(0), word: 'hour' };
  if (lifeS < 2 * MONTH_S) return { number: (lifeS / DAY_S).toFixed(0), word: 'day' };
  if (lifeS < 2 * YEAR_S) return { number: (lifeS / MONTH_S).toFixed(0), word: 'month' };
  const years = lifeS / YEAR_S;
  return { number: (toHalfYears ? Math.round(years * 2) / 2 : years).toFixed(1), word: 'year' };
}

/**
 * A life: years with one decimal, months below 2 years, days below 2 months, hours below 2 days.
 *
 * @param lifeS Life, s, 0 or more.
 * @param options Whether half years are fine enough.
 * @returns Text such as `6.2 years`.
 * @example formatLifeYears(6.2 * 31_557_600) // '6.2 years'
 */
export function formatLifeYears(lifeS: number, options: LifeOptions = {}): string {
  if (!Number.isFinite(lifeS)) return '—';
  const { number, word } = lifeOf(lifeS, options);
  return counted(number, word);
}

/**
 * A range of lives, as `4.9 to 7.4 years` or `20 months to 2.4 years`.
 *
 * @param lowS Shorter life, s.
 * @param highS Longer life, s.
 * @param options Whether half years are fine enough.
 * @returns The text; one life alone when both read the same.
 * @example formatLifeRange(4.9 * 31_557_600, 7.4 * 31_557_600) // '4.9 to 7.4 years'
 */
export function formatLifeRange(lowS: number, highS: number, options: LifeOptions = {}): string {
  const low = formatLifeYears(lowS, options);
  const high = formatLifeYears(highS, options);
  if (low === high) return high;
  const sameUnit = lifeOf(lowS, options).word === lifeOf(highS, options).word;
  return sameUnit ? `${lifeOf(lowS, options).number} to ${high}` : `${low} to ${high}`;
}
