import { Decimal } from 'decimal.js';

/** Significant digits of the charge ledger's arithmetic. */
const SIGNIFICANT_DIGITS = 40;

/** Decimal places that every entry is rounded to, once: a grid of 1e-30 C. */
const GRID_PLACES = 30;

/** A clone of its own, so that no setting made elsewhere reaches the ledger. It takes a double as its shortest decimal. */
export const LedgerDecimal = Decimal.clone({
  precision: SIGNIFICANT_DIGITS,
  rounding: Decimal.ROUND_HALF_EVEN,
  toExpNeg: -9e15,
  toExpPos: 9e15,
});

/**
 * Rounds a charge to the ledger's grid of 1e-30 C.
 *
 * Entries on one grid add up exactly as long as the sum stays below 1e10 C (10 digits before the point and 30 behind are
 * the 40 significant digits), also for a reader who adds them with 40-digit decimals. The grid is 1e11 times finer than the
 * charge of one electron.
 *
 * @param chargeC Charge, C, any sign.
 * @returns The nearest multiple of 1e-30 C; half goes to the even neighbour.
 * @example onGrid(new LedgerDecimal('0.1')).toFixed() // '0.1'
 */
export function onGrid(chargeC: Decimal): Decimal {
  const rounded = chargeC.toDecimalPlaces(GRID_PLACES);
  return rounded.isZero() ? rounded.abs() : rounded;
}

/**
 * Writes a charge in plain notation without exponent.
 *
 * @param chargeC Charge, C.
 * @returns Decimal digits, `-` in front of negative ones; zero is `0`.
 * @example plainDecimal(new LedgerDecimal('1e-7')) // '0.0000001'
 */
export function plainDecimal(chargeC: Decimal): string {
  return chargeC.toFixed();
}

/**
 * Exact sum of charges that lie on the grid.
 *
 * @param chargesC Charges on the grid, C.
 * @returns Their sum, C; 0 for none.
 * @example plainDecimal(sumOnGrid([new LedgerDecimal('0.1'), new LedgerDecimal('0.2')])) // '0.3'
 */
export function sumOnGrid(chargesC: readonly Decimal[]): Decimal {
  return chargesC.reduce((sumC, chargeC) => sumC.plus(chargeC), new LedgerDecimal(0));
}
