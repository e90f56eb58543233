import type { StepModel } from './layout.types.ts';

/**
 * A derived duration on the timeline: whole microseconds, rounded half up.
 *
 * @param timeS Duration, s, 0 or more.
 * @returns Whole microseconds.
 * @example wholeMicros(0.0000015) // 2
 */
export function wholeMicros(timeS: number): number {
  return Math.round(timeS * 1e6);
}

/**
 * Times of a step that lasts exactly this long.
 *
 * @param durationS Duration, s.
 * @returns Mean, worst and longest, all the same.
 * @example lasting(0.004).durationUs // 4000
 */
export function lasting(
  durationS: number,
): Pick<StepModel, 'durationUs' | 'durationS' | 'termsS' | 'worstS' | 'longestS'> {
  return { durationUs: wholeMicros(durationS), durationS, termsS: [durationS], worstS: durationS, longestS: durationS };
}
