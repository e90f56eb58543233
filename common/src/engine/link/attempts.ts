/**
 * Sum of the first `count` powers of a ratio, `Σ_{j<count} ratio^j`. Adding up instead of dividing keeps it exact at 0 and 1.
 *
 * Source: definition.
 *
 * @param ratio Probability that one more attempt follows, or any other ratio.
 * @param count Attempts allowed; whole, 0 or more.
 * @returns The sum; of a probability, the mean number of attempts.
 * @example powerSum(0.5, 3) // 1.75
 */
export function powerSum(ratio: number, count: number): number {
  let sum = 0;
  for (let j = 0; j < count; j += 1) sum = 1 + ratio * sum;
  return sum;
}

/**
 * Mean of a per-attempt figure `Σ_j ratio^j · figure(j) / Σ_j ratio^j`: what holds, given that attempt `j` was the good one. At a
 * ratio of 1 every attempt is as likely as the others: the limit, though no attempt then ever is the good one.
 *
 * Source: definition.
 *
 * @param ratio Probability that an attempt fails and another follows, 0 to 1.
 * @param count Attempts allowed; whole, 1 or more.
 * @param figure Figure of the case that attempt `j`, counted from 0, is the good one.
 * @returns The mean.
 * @example meanByAttempt(1, 3, (j) => j) // 1
 */
export function meanByAttempt(ratio: number, count: number, figure: (attempt: number) => number): number {
  let weight = 1;
  let weights = 0;
  let sum = 0;
  for (let j = 0; j < count; j += 1) {
    weights += weight;
    sum += weight * figure(j);
    weight *= ratio;
  }
  return sum / weights;
}
