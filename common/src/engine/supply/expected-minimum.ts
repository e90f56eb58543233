/** Half-width of the integration, in standard deviations. */
const REACH = 9;
const STEP = 1 / 16;

/**
 * How far the smallest of n independent normal values lies below their mean, in standard deviations, on average:
 * `∫ (1 − Φ(x)^n − (1 − Φ(x))^n)/2 dx` twice over the half line, by the trapezoid rule, which converges geometrically here.
 *
 * Source: Harter, Expected values of normal order statistics, Biometrika 48 (1961); value for n = 2 is 1/√π.
 *
 * @param count Number of values, whole, 1 or more.
 * @returns Standard deviations below the mean, 0 for one value.
 * @example expectedMinimumBelow(2) // 0.5641…
 */
export function expectedMinimumBelow(count: number): number {
  if (count <= 1) return 0;
  // E[max] = ∫0..∞ (1 − Φ(x)^n − (1 − Φ(x))^n) dx, since P(max > x) − P(max < −x) is what counts at ±x.
  let sum = 0;
  let tail = 0.5;
  for (let index = 0; index * STEP <= REACH; index++) {
    const x = index * STEP;
    if (index > 0) tail -= densityBetween(x - STEP, x);
    const value = 1 - (1 - tail) ** count - Math.max(tail, 0) ** count;
    sum += value * (index === 0 ? 0.5 : 1);
  }
  return sum * STEP;
}

/** Normal probability between two near points, by Gauss-Legendre with four points. */
function densityBetween(fromX: number, toX: number): number {
  const middle = (fromX + toX) / 2;
  const half = (toX - fromX) / 2;
  const near = half * 0.3399810435848563;
  const far = half * 0.8611363115940526;
  const pair = (distance: number): number => density(middle - distance) + density(middle + distance);
  return half * (0.6521451548625461 * pair(near) + 0.34785484513745385 * pair(far));
}

const density = (x: number): number => Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI);
