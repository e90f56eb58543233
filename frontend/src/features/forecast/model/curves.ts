import type { DekadPoint, Forecast } from '#common/engine/index.ts';
import { monthName } from '#common/units/format-duration.ts';
import { MAH_C, MONTH_S, YEAR_S } from '#common/units/si.ts';
import type { ChartTone } from '#frontend/components/chart/chart-theme.ts';
import { celsius, charge, fineVolts } from './figures.ts';

/** How a line is told apart, in grey as well: by dashes and weight first, by colour second. */
export interface CurveStyle {
  tone: ChartTone;
  dash: readonly number[];
  widthPx: number;
}

export interface Curve {
  label: string;
  style: CurveStyle;
  values: number[];
  /** A value in words. */
  tell: (value: number) => string;
}

export interface CurvePicture {
  id: string;
  title: string;
  /** Unit of the vertical axis, its title. */
  unit: string;
  curves: Curve[];
  min: number;
  max: number;
  /** Where the axis does not begin at zero, what it begins at. */
  startsAt: string | null;
}

export interface TimeAxis {
  title: string;
  /** One value a dekad. */
  values: number[];
  max: number;
}

const SOLID: readonly number[] = [];

export function timeAxis(dekads: readonly DekadPoint[]): TimeAxis {
  const lastS = dekads.at(-1)?.timeS ?? 0;
  const isShort = lastS < 2 * YEAR_S;
  const unitS = isShort ? MONTH_S : YEAR_S;
  return {
    title: isShort ? 'months of life' : 'years of life',
    values: dekads.map((dekad) => dekad.timeS / unitS),
    max: lastS / unitS,
  };
}

/** Charge left, voltages against the limit, temperature. */
export function curvePictures(forecast: Forecast): CurvePicture[] {
  return [chargePicture(forecast), voltagePicture(forecast), temperaturePicture(forecast)];
}

function chargePicture({ dekads, startingChargeC }: Forecast): CurvePicture {
  const values = dekads.map((dekad) => dekad.remainingC / MAH_C);
  return {
    id: 'charge',
    title: 'Charge left',
    unit: 'mAh',
    curves: [
      {
        label: 'charge left',
        style: { tone: 'accent', dash: SOLID, widthPx: 2.5 },
        values,
        tell: (value) => charge(value * MAH_C),
      },
    ],
    min: 0,
    max: niceCeiling(startingChargeC / MAH_C),
    startsAt: null,
  };
}

function voltagePicture({ dekads }: Forecast): CurvePicture {
  const open = dekads.map((dekad) => dekad.openCircuitV);
  const loaded = dekads.map((dekad) => dekad.loadedV);
  const limit = dekads.map((dekad) => dekad.limitV);
  const all = [...open, ...loaded, ...limit];
  const min = Math.max(0, Math.floor((Math.min(...all) - 0.05) * 5) / 5);
  return {
    id: 'voltage',
    title: 'Voltage',
    unit: 'V',
    curves: [
      { label: 'open circuit', style: { tone: 'ink', dash: [1, 3], widthPx: 2 }, values: open, tell: fineVolts },
      { label: 'loaded', style: { tone: 'accent', dash: SOLID, widthPx: 2.5 }, values: loaded, tell: fineVolts },
      { label: 'limit', style: { tone: 'rust', dash: [8, 4], widthPx: 1.75 }, values: limit, tell: fineVolts },
    ],
    min,
    max: Math.ceil((Math.max(...all) + 0.05) * 5) / 5,
    startsAt: min > 0 ? fineVolts(min) : null,
  };
}

function temperaturePicture({ dekads }: Forecast): CurvePicture {
  const mean = dekads.map((dekad) => dekad.meanC);
  const coldest = dekads.map((dekad) => dekad.coldestC);
  return {
    id: 'temperature',
    title: 'Temperature',
    unit: '°C',
    curves: [
      { label: 'mean', style: { tone: 'ink', dash: SOLID, widthPx: 1.75 }, values: mean, tell: celsius },
      { label: 'coldest hour', style: { tone: 'frost', dash: [4, 3], widthPx: 2 }, values: coldest, tell: celsius },
    ],
    min: Math.floor((Math.min(...coldest, 0) - 1) / 5) * 5,
    max: Math.ceil((Math.max(...mean, 0) + 1) / 5) * 5,
    startsAt: null,
  };
}

function niceCeiling(value: number): number {
  if (value <= 0) return 1;
  const step = 10 ** Math.floor(Math.log10(value)) / 2;
  return Math.ceil(value / step) * step;
}

/** When a dekad is, in words: "early February, year 7". */
export function dekadInWords(dekad: DekadPoint): string {
  const third = ['early', 'mid', 'late'][dekad.dekadOfYear % 3] ?? '';
  const year = Math.max(1, Math.ceil(dekad.timeS / YEAR_S - 1e-9));
  return `${third} ${monthName(dekad.month)}, year ${year}`;
}

/** The values of a picture at one dekad: "loaded 2.31 V, limit 2.0 V". */
export function valuesInWords(picture: CurvePicture, index: number): string {
  return picture.curves.map((curve) => `${curve.label} ${curve.tell(curve.values[index] ?? 0)}`).join(', ');
}
