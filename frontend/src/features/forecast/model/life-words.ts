import type { Forecast, Scenario, Warning } from '#common/engine/index.ts';
import { formatDuration, formatLifeYears, monthName } from '#common/units/format-duration.ts';
import { HOUR_S, YEAR_S } from '#common/units/si.ts';
import { ordinal } from './names.ts';
import type { Precision } from './precision.ts';
import { winterMonths } from './ribbon.ts';

/** A length of life in words, no finer than its inputs deserve: "6.3 years", "14 years", "14 months", "23 days". */
export function lifeInWords(lifeS: number, precision: Precision = 'figures'): string {
  if (precision === 'half-years') return halfYears(lifeS);
  return lifeS >= 9.95 * YEAR_S ? formatDuration(lifeS, { significantDigits: 2 }) : formatLifeYears(lifeS);
}

function halfYears(lifeS: number): string {
  const halves = Math.round((2 * lifeS) / YEAR_S);
  if (halves < 1) return 'less than half a year';
  return halves === 1 ? 'half a year' : formatDuration((halves / 2) * YEAR_S);
}

/** A shorter stretch in whole units: "41 days", "5 months", "31 hours". */
export function spanInWords(spanS: number): string {
  return spanS < HOUR_S ? 'less than an hour' : formatLifeYears(spanS);
}

/** Whether a warning comes too late to be of use: within the last hour. */
export function isWithTheEnd(warning: Warning): boolean {
  return warning.leadS < HOUR_S;
}

/** A typed time such as a target or a shelf life, as typed: "10 years". */
export function typedSpan(spanS: number): string {
  return formatDuration(spanS);
}

/** When life ends: "February of its seventh winter", "October of its third year"; without the month at half years. */
export function endInWords(scenario: Scenario, forecast: Forecast, precision: Precision): string {
  const year = Math.max(1, Math.ceil((forecast.lifeS ?? 0) / YEAR_S - 1e-9));
  const month = forecast.endMonth;
  const isWinter = month !== null && winterMonths(scenario.climate)?.includes(month) === true;
  const season = isWinter ? `${ordinal(forecast.wintersSurvived + 1)} winter` : `${ordinal(year)} year`;
  return month === null || precision === 'half-years' ? `its ${season}` : `${monthName(month)} of its ${season}`;
}
