import { requireNumber } from './checks.ts';

/** What widens a receiver's window between two synchronisations. */
export interface GuardInput {
  /** Time since the clocks last agreed, s; 0 or more. */
  intervalS: number;
  /** One clock's tolerance, ± ppm; 0 or more. */
  tolerancePpmA: number;
  /** The other clock's tolerance, ± ppm; 0 or more. */
  tolerancePpmB: number;
  /** What either side is off beside its clock, ± s; default 0. */
  jitterS?: number;
}

/** Guard on one side of the expected time, and the whole window. */
export interface GuardWindow {
  halfS: number;
  windowS: number;
}

/**
 * Guard time between two clocks: `half = (ppm A + ppm B) · interval + jitter`, `window = 2 · half`. The worst case adds up:
 * both clocks off by their whole tolerance in opposite directions. Temperature, ageing and load are parts of the tolerance.
 *
 * Source: common practice, no source; the same sum is in OpenThread src/core/mac/sub_mac_csl_receiver.cpp @0486979.
 *
 * @param input Interval, s; tolerances, ± ppm; jitter, s; all 0 or more.
 * @returns One side and the whole window, s.
 * @throws OutOfRangeError code `out-of-range` for a figure below 0.
 * @example guardWindow({ intervalS: 60, tolerancePpmA: 20, tolerancePpmB: 20 }) // { halfS: 0.0024, windowS: 0.0048 }
 */
export function guardWindow(input: GuardInput): GuardWindow {
  const { intervalS, tolerancePpmA, tolerancePpmB, jitterS = 0 } = input;
  requireNumber(intervalS, { field: 'intervalS', min: 0, unit: 's' });
  requireNumber(tolerancePpmA, { field: 'tolerancePpmA', min: 0, unit: 'ppm' });
  requireNumber(tolerancePpmB, { field: 'tolerancePpmB', min: 0, unit: 'ppm' });
  requireNumber(jitterS, { field: 'jitterS', min: 0, unit: 's' });
  const halfS = ((tolerancePpmA + tolerancePpmB) * intervalS) / 1e6 + jitterS;
  return { halfS, windowS: 2 * halfS };
}

/**
 * Longest time between two synchronisations that a guard covers: `(guard − jitter) / (ppm A + ppm B)`.
 *
 * Source: `guardWindow` solved for the interval; the same quotient is the keep-alive interval of Contiki-NG
 * os/net/mac/tsch @9f80681.
 *
 * @param input Guard on one side, s, tolerances, ± ppm, jitter, s, default 0; all 0 or more.
 * @returns Interval, s; 0 where the jitter alone takes the guard; null where both clocks are exact: no limit.
 * @throws OutOfRangeError code `out-of-range` for a figure below 0.
 * @example longestResynchronisationS({ guardS: 0.001, tolerancePpmA: 40, tolerancePpmB: 40 }) // 12.5
 */
export function longestResynchronisationS(
  input: Omit<GuardInput, 'intervalS'> & { /** Guard on one side, s. */ guardS: number },
): number | null {
  const { guardS, tolerancePpmA, tolerancePpmB, jitterS = 0 } = input;
  requireNumber(guardS, { field: 'guardS', min: 0, unit: 's' });
  guardWindow({ intervalS: 0, tolerancePpmA, tolerancePpmB, jitterS });
  if (jitterS >= guardS) return 0;
  const ppm = tolerancePpmA + tolerancePpmB;
  return ppm === 0 ? null : ((guardS - jitterS) * 1e6) / ppm;
}
