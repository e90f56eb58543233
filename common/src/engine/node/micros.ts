/**
 * Microseconds of a time in seconds: whole where the time is the double nearest to a whole number of microseconds, so that
 * sums of typed times stay exact in double arithmetic.
 *
 * @param timeS Time, s.
 * @returns Time, µs.
 * @example toMicros(0.3) // 300000
 */
export function toMicros(timeS: number): number {
  const microseconds = Math.round(timeS * 1e6);
  return microseconds / 1e6 === timeS ? microseconds : timeS * 1e6;
}

/**
 * Seconds of a time in microseconds, correctly rounded.
 *
 * @param timeUs Time, µs.
 * @returns Time, s.
 * @example fromMicros(300000) // 0.3
 */
export function fromMicros(timeUs: number): number {
  return timeUs / 1e6;
}
