import { besselI0 } from './bessel-i0.ts';

/** Hour of the day that is warmest. */
const WARMEST_HOUR = 15;

/** Largest argument of I0 taken from its series. */
const LARGEST_SERIES = 600;

/** Points of the midpoint rule over a day. */
const POINTS = 24;

/**
 * Temperature at an hour of the day: `mean + amplitude · cos(2π(h − 15)/24)`.
 *
 * @param meanC Mean of the day, °C.
 * @param amplitudeK Half the difference between the warmest and the coldest hour, K, 0 or more.
 * @param hour Hour, 0 to 24.
 * @returns Temperature, °C.
 * @example temperatureAtHour(10, 5, 3) // 5
 */
export function temperatureAtHour(meanC: number, amplitudeK: number, hour: number): number {
  return meanC + amplitudeK * Math.cos((2 * Math.PI * (hour - WARMEST_HOUR)) / 24);
}

/**
 * Mean over a day of a factor `base^((T − reference)/step)`: exactly `base^((mean − reference)/step) · I0(amplitude·ln(base)/step)`.
 *
 * Source: mean of exp(z·cos φ) over a period, Abramowitz and Stegun, Handbook of Mathematical Functions, 9.6.16.
 *
 * @param base Factor per step, above 0.
 * @param stepK Temperature step that multiplies by `base`, K, above 0.
 * @param day Mean of the day above the reference, K, and its amplitude, K.
 * @returns Mean factor.
 * @example dayAverageOfPower(2, 10, { aboveReferenceK: 5, amplitudeK: 15 }) // 1.823…
 */
export function dayAverageOfPower(
  base: number,
  stepK: number,
  { aboveReferenceK, amplitudeK }: { aboveReferenceK: number; amplitudeK: number },
): number {
  const exponent = (aboveReferenceK * Math.log(base)) / stepK;
  if (amplitudeK === 0) return base ** (aboveReferenceK / stepK);
  const swing = Math.abs((amplitudeK * Math.log(base)) / stepK);
  // Beyond, I0 exceeds a double although the product may not: its asymptotic form goes into the exponent.
  if (swing > LARGEST_SERIES) return Math.exp(exponent + swing - Math.log(2 * Math.PI * swing) / 2);
  return Math.exp(exponent) * besselI0(swing);
}

/**
 * Mean over a day of any function of temperature, by the midpoint rule with 24 points, which for a smooth function of a cosine
 * converges faster than any power.
 *
 * @param meanC Mean of the day, °C.
 * @param amplitudeK Amplitude of the day, K, 0 or more.
 * @param valueAt Function of the temperature in °C.
 * @returns Its mean, in its own unit.
 * @example dayAverage(20, 5, (temperatureC) => temperatureC) // 20
 */
export function dayAverage(meanC: number, amplitudeK: number, valueAt: (temperatureC: number) => number): number {
  if (amplitudeK === 0) return valueAt(meanC);
  let sum = 0;
  for (let point = 0; point < POINTS; point++) sum += valueAt(temperatureAtHour(meanC, amplitudeK, point + 0.5));
  return sum / POINTS;
}
