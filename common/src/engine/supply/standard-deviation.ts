import type { Quantity } from '../scenario/scenario.types.ts';

/** 95 % point of the standard normal distribution. */
const Z95 = 1.6448536269514722;

/**
 * Standard deviation of a quantity for its distribution. Normal and lognormal read min and max as P5 and P95 where they give no
 * deviation of their own.
 *
 * Source: moments of the triangular, uniform, normal and lognormal distributions.
 *
 * @param quantity The quantity; without a distribution it is triangular.
 * @returns Standard deviation, in the quantity's unit; 0 for `fixed` or without a spread.
 * @example standardDeviation({ min: 0, typical: 6, max: 12, distribution: 'uniform' }) // 3.464…
 */
export function standardDeviation(quantity: Quantity): number {
  const { typical, min = typical, max = typical, distribution = 'triangular', deviation } = quantity;
  switch (distribution) {
    case 'fixed':
      return 0;
    case 'uniform':
      return (max - min) / Math.sqrt(12);
    case 'triangular': {
      const left = typical - min;
      const right = max - typical;
      return Math.sqrt((left * left + right * right + left * right) / 18);
    }
    case 'normal':
      return deviation ?? (max - min) / (2 * Z95);
    case 'lognormal': {
      const ofLogarithm = deviation ?? (min > 0 ? Math.log(max / min) / (2 * Z95) : 0);
      const variance = ofLogarithm * ofLogarithm;
      return typical * Math.sqrt(Math.expm1(variance) * Math.exp(variance));
    }
  }
}
