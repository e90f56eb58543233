/**
 * Time that a quantity needs to fall by some amount when its speed decays in proportion to the fall: `x' = speed − decay·x` from
 * x = 0, so `−ln(1 − decay·fall/speed)/decay`.
 *
 * @param fall Speed at the start in units a second, decay in 1/s (any sign), fall in units, 0 or more.
 * @returns Time, s; Infinity when it never gets there.
 * @example fallS({ speed: 2, decayPerS: 0, fall: 10 }) // 5
 */
export function fallS({ speed, decayPerS, fall }: { speed: number; decayPerS: number; fall: number }): number {
  if (fall <= 0) return 0;
  if (!(speed > 0)) return Infinity;
  const share = (decayPerS * fall) / speed;
  if (share >= 1) return Infinity;
  // Below 1e-9 the series is exact to the last bit, and a decay of 0 needs no case of its own.
  if (Math.abs(share) < 1e-9) return (fall / speed) * (1 + share / 2);
  return -Math.log1p(-share) / decayPerS;
}

/**
 * Time weighed by a decay: `∫ e^(−k·t) dt = (1 − e^(−k·t))/k`, the time itself for k = 0. A quantity that falls at some speed which
 * decays at k has fallen by speed times this.
 *
 * @param decayPerS Decay k, 1/s, any sign.
 * @param timeS Time, s.
 * @returns Weighed time, s.
 * @example decayedS(0, 10) // 10
 */
export function decayedS(decayPerS: number, timeS: number): number {
  const x = decayPerS * timeS;
  return Math.abs(x) < 1e-9 ? timeS * (1 - x / 2) : -Math.expm1(-x) / decayPerS;
}
