/**
 * Modified Bessel function of the first kind and order 0, by its power series `Σ (x²/4)^k / (k!)²`. All terms are positive, so
 * nothing cancels.
 *
 * Source: Abramowitz and Stegun, Handbook of Mathematical Functions, 9.6.12.
 * Valid for: |x| below some 700; beyond, the value exceeds a double and is Infinity.
 *
 * @param x Argument, no unit.
 * @returns I0(x), 1 or more.
 * @example besselI0(0) // 1
 */
export function besselI0(x: number): number {
  const quarter = (x * x) / 4;
  let term = 1;
  let sum = 1;
  for (let k = 1; term > sum * 1e-17; k++) {
    term *= quarter / (k * k);
    sum += term;
    if (sum === Infinity) return Infinity;
  }
  return sum;
}
