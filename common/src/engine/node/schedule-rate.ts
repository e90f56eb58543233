import type { Decimal } from 'decimal.js';
import { DAY_S } from '#common/units/si.ts';
import type { Schedule, When } from '../scenario/scenario.types.ts';
import { LedgerDecimal } from './ledger-decimal.ts';

const HOUR_US = 3_600_000_000;
const DAY_US = 24 * HOUR_US;

/**
 * Cycles of a daily window: one at its beginning and one each period until its end, `ceil(span / period)`.
 *
 * @param window Hours of the day, 0 to 24, and period, s; `fromHour > toHour` crosses midnight, equal hours are no span.
 * @returns Whole number of cycles a day.
 * @example windowCyclesPerDay({ fromHour: 22, toHour: 6, periodS: 3600 }) // 8
 */
export function windowCyclesPerDay(window: { fromHour: number; toHour: number; periodS: number }): number {
  const { fromHour, toHour, periodS } = window;
  // Whole microseconds, so that 1.2 h in steps of 60 s are 72 cycles and not 73.
  const spanUs = Math.round((toHour - fromHour) * HOUR_US);
  return Math.ceil((spanUs < 0 ? spanUs + DAY_US : spanUs) / Math.round(periodS * 1e6));
}

/**
 * Cycles of a schedule per day while it is switched on: every 86,400 s / period, random its mean rate, a window its whole
 * number of cycles, always back to back, once none.
 *
 * @param schedule The schedule; its `when` is not looked at.
 * @param cycleS Length of one cycle, s; only `always` needs it. A cycle of no length never runs.
 * @returns Cycles a day.
 * @example cyclesPerDay({ kind: 'every', periodS: 900 }, 0.01) // 96
 */
export function cyclesPerDay(schedule: Schedule, cycleS: number): number {
  switch (schedule.kind) {
    case 'every':
      return DAY_S / schedule.periodS;
    case 'random':
      return schedule.meanPerDay;
    case 'window':
      return windowCyclesPerDay(schedule);
    case 'always':
      return cycleS > 0 ? DAY_S / cycleS : 0;
    case 'once':
      return 0;
  }
}

/**
 * The same as `cyclesPerDay` in decimal arithmetic of 40 digits.
 *
 * @param schedule The schedule; its `when` is not looked at.
 * @param cycleS Length of one cycle, s.
 * @returns Cycles a day.
 * @example exactCyclesPerDay({ kind: 'every', periodS: 0.1 }, 0.01).toFixed() // '864000'
 */
export function exactCyclesPerDay(schedule: Schedule, cycleS: number): Decimal {
  if (schedule.kind === 'every') return new LedgerDecimal(DAY_S).div(schedule.periodS);
  if (schedule.kind === 'always' && cycleS > 0) return new LedgerDecimal(DAY_S).div(cycleS);
  return new LedgerDecimal(cyclesPerDay(schedule, cycleS));
}

/**
 * Whether a schedule is switched on at a temperature: below `belowC`, and at `aboveC` or above, so that one routine below and
 * another above the same temperature never leave a gap.
 *
 * @param when The schedule's condition; absent means always on. Its months are not looked at.
 * @param temperatureC Temperature, °C.
 * @returns Whether it is on.
 * @example isOnAt({ belowC: 2 }, 2) // false
 */
export function isOnAt(when: When | undefined, temperatureC: number): boolean {
  const { belowC = Infinity, aboveC = -Infinity } = when ?? {};
  return temperatureC < belowC && temperatureC >= aboveC;
}

/**
 * Whether a schedule is switched on in a calendar month.
 *
 * @param when The schedule's condition; absent means always on. Its temperatures are not looked at.
 * @param month Calendar month, 1 to 12.
 * @returns Whether it is on.
 * @example isOnInMonth({ months: [11, 12] }, 1) // false
 */
export function isOnInMonth(when: When | undefined, month: number): boolean {
  return when?.months === undefined || when.months.includes(month);
}

/**
 * Months of the year in which a schedule is switched on.
 *
 * @param when The schedule's condition; absent means always on.
 * @returns Number of months, 0 to 12.
 * @example monthsOn({ months: [1, 2, 2] }) // 2
 */
export function monthsOn(when: When | undefined): number {
  return when?.months === undefined ? 12 : new Set(when.months).size;
}
