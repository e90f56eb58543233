import { InconsistentInputError } from '#common/errors.ts';
import { GAS_CONSTANT, KELVIN_OFFSET, YEAR_S } from '#common/units/si.ts';
import { requireNumber } from '../link/checks.ts';
import { dayAverage, dayAverageOfPower } from './day-average.ts';

/** Rise per 10 K where a cell gives neither Q10 nor an activation energy. */
const DEFAULT_Q10 = 2;

export interface SelfDischargeRateInput {
  /** Share lost in a year at the reference temperature, 0 to below 1. */
  lossPerYear: number;
  /** Reference temperature, °C. */
  referenceC: number;
  /** Factor per 10 K, above 0; default 2 where no activation energy is given either. */
  q10?: number | undefined;
  /** Activation energy, J/mol, 0 or more; instead of `q10`. */
  activationEnergyJPerMol?: number | undefined;
  /** Temperature, or mean of the day, °C. */
  temperatureC: number;
  /** Amplitude of the day, K; default 0. The rate is then averaged over the day. */
  amplitudeK?: number;
}

/**
 * First-order self-discharge rate at a temperature, or averaged over a day (the average of the rate, not the rate at the
 * average): `−ln(1 − loss)/year`, times `q10^((T − Tref)/10)` or the Arrhenius factor `exp(−Ea/R·(1/T − 1/Tref))`.
 *
 * Source: Arrhenius equation with R = 8.314462618 J/(mol·K) (CODATA 2018); day average of Q10 by I0, of Arrhenius by the
 * 24-point midpoint rule.
 * Valid for: cells whose loss is proportional to what is left; secondary cells lose faster in their first days.
 *
 * @param input Yearly loss, its reference, its rise with temperature, and the temperature.
 * @returns Rate, 1/s, 0 or more.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @throws InconsistentInputError code `two-temperature-laws` when both Q10 and an activation energy are given.
 * @example selfDischargeRatePerS({ lossPerYear: 0.01, referenceC: 20, temperatureC: 20 }) * 31_557_600 // 0.01005…
 */
export function selfDischargeRatePerS(input: SelfDischargeRateInput): number {
  const { lossPerYear, referenceC, q10, activationEnergyJPerMol, temperatureC, amplitudeK = 0 } = input;
  requireNumber(amplitudeK, { field: 'amplitudeK', min: 0, unit: 'K' });
  requireNumber(temperatureC - amplitudeK, { field: 'temperatureC', min: -KELVIN_OFFSET + 1, unit: '°C' });
  requireNumber(referenceC, { field: 'referenceC', min: -KELVIN_OFFSET + 1, unit: '°C' });
  requireNumber(lossPerYear, { field: 'lossPerYear', min: 0, max: 1 - Number.EPSILON });
  if (q10 !== undefined && activationEnergyJPerMol !== undefined) {
    throw new InconsistentInputError('Q10 and an activation energy are both given; give one of them.', {
      code: 'two-temperature-laws',
      field: 'q10',
      value: q10,
      expected: 'Q10 or an activation energy, not both',
      relatedFields: ['activationEnergyJPerMol'],
    });
  }
  const referenceRatePerS = -Math.log1p(-lossPerYear) / YEAR_S;
  const factor =
    activationEnergyJPerMol === undefined
      ? q10Factor(q10 ?? DEFAULT_Q10, temperatureC - referenceC, amplitudeK)
      : arrheniusFactor(activationEnergyJPerMol, referenceC, { temperatureC, amplitudeK });
  return referenceRatePerS === 0 ? 0 : Math.min(referenceRatePerS * factor, Number.MAX_VALUE);
}

function q10Factor(q10: number, aboveReferenceK: number, amplitudeK: number): number {
  requireNumber(q10, { field: 'q10', min: Number.MIN_VALUE });
  return dayAverageOfPower(q10, 10, { aboveReferenceK, amplitudeK });
}

function arrheniusFactor(
  activationEnergyJPerMol: number,
  referenceC: number,
  { temperatureC, amplitudeK }: { temperatureC: number; amplitudeK: number },
): number {
  requireNumber(activationEnergyJPerMol, { field: 'activationEnergyJPerMol', min: 0, unit: 'J/mol' });
  const perK = activationEnergyJPerMol / GAS_CONSTANT;
  const reference = 1 / (referenceC + KELVIN_OFFSET);
  return dayAverage(temperatureC, amplitudeK, (hourC) => Math.exp(perK * (reference - 1 / (hourC + KELVIN_OFFSET))));
}
