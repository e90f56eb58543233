import type { Climate } from '../scenario/scenario.types.ts';
import { YEAR_S } from '#common/units/si.ts';

/** A third of a month, as a calendar year has 36 of them. Its temperatures are constant inside it. */
export interface CalendarDekad {
  /** 0 to 35, the first of January being 0. */
  dekadOfYear: number;
  /** Calendar month, 1 to 12. */
  month: number;
  meanC: number;
  amplitudeK: number;
  /** Temperature of the coldest hour, °C, with a coldest night where the climate gives one for this dekad. */
  coldestC: number;
  /** Temperature of the warmest hour, °C, likewise. */
  hottestC: number;
}

/** Dekads of a year. */
export const DEKADS = 36;

/** Length of a dekad, s; dekads are equal. */
export const DEKAD_S = YEAR_S / DEKADS;

/**
 * The 36 dekads of a climate's year. Means and amplitudes are given at mid-month, vary linearly from mid-month to mid-month round
 * the year, and each dekad takes the value at its middle. A coldest night or hottest day applies in the middle dekad of its month.
 *
 * Source: the agrometeorologist's third of a month; linear interpolation.
 *
 * @param climate Twelve months, January first, and extremes.
 * @returns 36 dekads, the first of January first.
 * @example dekadsOfYear(climate)[1].meanC === climate.months[0].meanC // true: its middle is mid-month
 */
export function dekadsOfYear({ months, extremes }: Pick<Climate, 'months' | 'extremes'>): CalendarDekad[] {
  return Array.from({ length: DEKADS }, (_, dekadOfYear): CalendarDekad => {
    // The middle of dekad k lies (k − 1)/3 months after the middle of January.
    const fromMonth = Math.floor((dekadOfYear + DEKADS - 1) / 3) % 12;
    const share = ((dekadOfYear + 2) % 3) / 3;
    const from = months[fromMonth] ?? { meanC: 0, amplitudeK: 0 };
    const to = months[(fromMonth + 1) % 12] ?? from;
    const meanC = rounded(from.meanC + share * (to.meanC - from.meanC));
    const amplitudeK = from.amplitudeK + share * (to.amplitudeK - from.amplitudeK);
    const month = Math.floor(dekadOfYear / 3) + 1;
    const isMiddle = dekadOfYear % 3 === 1;
    const coldest = isMiddle && extremes?.coldest?.month === month ? extremes.coldest.temperatureC : Infinity;
    const hottest = isMiddle && extremes?.hottest?.month === month ? extremes.hottest.temperatureC : -Infinity;
    return {
      dekadOfYear,
      month,
      meanC,
      amplitudeK,
      coldestC: Math.min(meanC - amplitudeK, coldest),
      hottestC: Math.max(meanC + amplitudeK, hottest),
    };
  });
}

/** To a billionth of a kelvin, so that a mean of 8 °C between typed months meets a typed threshold of 8 °C. */
const rounded = (temperatureC: number): number => Math.round(temperatureC * 1e9) / 1e9;
