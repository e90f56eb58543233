import { DAY_S, YEAR_S } from './si.ts';

const DAYS_A_YEAR = YEAR_S / DAY_S;

/**
 * Mean number a day of what happens so often a year.
 *
 * @param timesAYear Times a year of 365.25 days, 0 or more.
 * @returns Times a day.
 * @example perDayOf(365.25) // 1
 */
export const perDayOf = (timesAYear: number): number => timesAYear / DAYS_A_YEAR;

/**
 * How often a year something happens that happens so often a day.
 *
 * @param meanPerDay Times a day, 0 or more.
 * @returns Times a year of 365.25 days.
 * @example perYearOf(1) // 365.25
 */
export const perYearOf = (meanPerDay: number): number => meanPerDay * DAYS_A_YEAR;
