import { DEKAD_S, winterStartMonth } from '#common/engine/index.ts';
import type { Climate, DekadPoint, Forecast, Scenario } from '#common/engine/index.ts';
import { MONTH_S, YEAR_S } from '#common/units/si.ts';

/** Borders between the five tints of the ribbon, V. Halving, so that the tint tells most where little is left. */
export const HEADROOM_BORDERS_V = [0.8, 0.4, 0.2, 0.1] as const;

export type HeadroomStep = 1 | 2 | 3 | 4 | 5;

const DEKADS_PER_YEAR = 36;
const MAX_ROWS = 40;

export interface RibbonMonth {
  /** Month of life counted from 0. */
  index: number;
  /** Year of life counted from 1. */
  year: number;
  /** Calendar month 1 to 12. */
  month: number;
  /** Share of this month that is lived, 0 to 1. */
  lived: number;
  headroomV: number;
  coldestC: number;
  chargeLeftFraction: number;
  isCold: boolean;
  hasWarning: boolean;
  hasEnd: boolean;
}

/** A stretch of one tint; `from` and `to` as shares of the row. */
export interface RibbonRun {
  from: number;
  to: number;
  step: HeadroomStep;
}

export interface RibbonRow {
  year: number;
  runs: RibbonRun[];
  cold: { from: number; to: number }[];
  /** Share of the row that is lived, 0 to 1. */
  livedTo: number;
  warningAt: number | null;
  endAt: number | null;
}

export interface Ribbon {
  /** Calendar months of the columns, beginning with the month in which life starts. */
  columnMonths: number[];
  rows: RibbonRow[];
  months: RibbonMonth[];
  /** Years that are lived but not drawn. */
  hiddenYears: number;
}

/** Tint of a headroom: 1 is ample, 5 is nearly gone. */
export function headroomStep(headroomV: number): HeadroomStep {
  if (headroomV >= HEADROOM_BORDERS_V[0]) return 1;
  if (headroomV >= HEADROOM_BORDERS_V[1]) return 2;
  if (headroomV >= HEADROOM_BORDERS_V[2]) return 3;
  if (headroomV >= HEADROOM_BORDERS_V[3]) return 4;
  return 5;
}

/** Months of life as rows of years, from the month in which life starts to its end. */
export function seasonRibbon(scenario: Scenario, forecast: Forecast): Ribbon {
  const dekads = forecast.dekads.slice(0, MAX_ROWS * DEKADS_PER_YEAR);
  const rowCount = Math.max(1, Math.ceil(dekads.length / DEKADS_PER_YEAR));
  const endS = endOfLife(forecast);
  const warningS = forecast.warning?.timeS ?? null;
  return {
    columnMonths: Array.from({ length: 12 }, (_, i) => ((scenario.climate.startMonth - 1 + i) % 12) + 1),
    rows: Array.from({ length: rowCount }, (_, i) => rowOf(i, dekads, { endS, warningS })),
    months: monthsOf(forecast, dekads, { endS, warningS }),
    hiddenYears: Math.ceil((forecast.dekads.length - dekads.length) / DEKADS_PER_YEAR),
  };
}

/** Time of the end where life has one, s. */
function endOfLife(forecast: Forecast): number | null {
  return forecast.outcome === 'outlives-horizon' || forecast.outcome === 'oversubscribed' ? null : forecast.lifeS;
}

interface Marks {
  endS: number | null;
  warningS: number | null;
}

function rowOf(rowIndex: number, dekads: DekadPoint[], { endS, warningS }: Marks): RibbonRow {
  const first = rowIndex * DEKADS_PER_YEAR;
  const startS = rowIndex * YEAR_S;
  const inRow = (timeS: number | null): number | null => {
    if (timeS === null || timeS < startS || timeS > startS + YEAR_S) return null;
    if (timeS === startS + YEAR_S && first + DEKADS_PER_YEAR < dekads.length) return null;
    if (timeS === startS && rowIndex > 0) return null;
    return (timeS - startS) / YEAR_S;
  };
  const row: RibbonRow = {
    year: rowIndex + 1,
    runs: [],
    cold: [],
    livedTo: 0,
    warningAt: inRow(warningS),
    endAt: inRow(endS),
  };
  dekads.slice(first, first + DEKADS_PER_YEAR).forEach((dekad, i) => {
    const from = i / DEKADS_PER_YEAR;
    const to = Math.min(1, Math.max(from, (dekad.timeS - startS) / YEAR_S));
    const step = headroomStep(dekad.headroomV);
    const last = row.runs.at(-1);
    if (last?.step === step) last.to = to;
    else row.runs.push({ from, to, step });
    const lastCold = row.cold.at(-1);
    if (dekad.coldestC < 0 && lastCold && Math.abs(lastCold.to - from) < 1e-9) lastCold.to = to;
    else if (dekad.coldestC < 0) row.cold.push({ from, to });
    row.livedTo = to;
  });
  return row;
}

function monthsOf(forecast: Forecast, dekads: DekadPoint[], { endS, warningS }: Marks): RibbonMonth[] {
  const months: RibbonMonth[] = [];
  for (let first = 0; first < dekads.length; first += 3) {
    const three = dekads.slice(first, first + 3);
    const last = three.at(-1);
    if (!last) break;
    const index = first / 3;
    const startS = first * DEKAD_S;
    const isWithin = (timeS: number | null): boolean =>
      timeS !== null && timeS <= last.timeS && (timeS > startS || index === 0);
    const coldestC = Math.min(...three.map((dekad) => dekad.coldestC));
    months.push({
      index,
      year: Math.floor(index / 12) + 1,
      month: last.month,
      lived: Math.min(1, (last.timeS - startS) / MONTH_S),
      headroomV: Math.min(...three.map((dekad) => dekad.headroomV)),
      coldestC,
      chargeLeftFraction: forecast.startingChargeC > 0 ? last.remainingC / forecast.startingChargeC : 0,
      isCold: coldestC < 0,
      hasWarning: isWithin(warningS),
      hasEnd: endS !== null && first + 3 >= dekads.length && isWithin(endS),
    });
  }
  return months;
}

export interface RibbonMeasures {
  rowPx: number;
  gapPx: number;
  /** Every so many years a row is named. */
  labelEvery: number;
  /** Height kept free, so that a year more or less moves nothing. */
  heightPx: number;
}

/** Few years get a generous band, forty still fit. */
export function ribbonMeasures(rowCount: number): RibbonMeasures {
  if (rowCount <= 4) return { rowPx: 20, gapPx: 8, labelEvery: 1, heightPx: 4 * 28 };
  if (rowCount <= 8) return { rowPx: 17, gapPx: 7, labelEvery: 1, heightPx: 8 * 24 };
  if (rowCount <= 12) return { rowPx: 13, gapPx: 5, labelEvery: 1, heightPx: 12 * 18 };
  if (rowCount <= 20) return { rowPx: 9, gapPx: 4, labelEvery: 3, heightPx: 20 * 13 };
  return { rowPx: 6, gapPx: 2, labelEvery: 5, heightPx: 40 * 8 };
}

/** The three consecutive coldest months of a climate, or null where the year has no seasons. */
export function winterMonths({ months }: Climate): number[] | null {
  const means = months.map((month) => month.meanC);
  if (Math.max(...means) - Math.min(...means) < 1) return null;
  const first = winterStartMonth(months);
  return [0, 1, 2].map((k) => ((first - 1 + k) % 12) + 1);
}
