import type { Decimal } from 'decimal.js';
import type { Dimension } from './dimensions.table.ts';
import { DIMENSIONS, PREFIX_EXPONENTS } from './dimensions.table.ts';
import type { Unit } from './unit-lookup.ts';
import { defaultUnitOf, toDocumentUnit, UnitDecimal, unitOf } from './unit-lookup.ts';

/** A coefficient longer than this in the field's own unit is easier to read with another prefix. */
const EASY_DIGITS = 4;
/** A number with more digits than this was not typed in that unit: 34 C is 9.4444… mAh. */
const TYPED_DIGITS = 12;
/** Doubles have at most 17 significant decimal digits. */
const DOUBLE_DIGITS = 17;

/** The number to type in a unit so that exactly this value comes back, or null if no short one does. */
function coefficientIn(value: number, unit: Unit, digits: number): Decimal | null {
  const exact = new UnitDecimal(value).sub(unit.offset).div(unit.scale);
  const short = exact.toSignificantDigits(digits);
  return toDocumentUnit(short, unit) === value ? short : null;
}

function prefixFor(magnitude: Decimal, prefixes: string): string {
  const exponent = magnitude.e;
  const allowed = ['', ...prefixes].sort((a, b) => (PREFIX_EXPONENTS[a] ?? 0) - (PREFIX_EXPONENTS[b] ?? 0));
  const fitting = allowed.filter((prefix) => (PREFIX_EXPONENTS[prefix] ?? 0) <= exponent);
  return fitting.at(-1) ?? allowed[0] ?? '';
}

/**
 * The unit with the prefix that leaves one to three digits before the decimal point, as far as the unit has such prefixes.
 *
 * @param value Value in the document's unit, not 0.
 * @param unit Any unit of the same row; its own prefix does not matter.
 * @returns The unit with the fitting prefix.
 * @example engineeringUnit(0.0000017, defaultUnitOf('current')).symbol // 'µA'
 */
export function engineeringUnit(value: number, unit: Unit): Unit {
  const { row, dimension } = unit;
  if (!row.prefixes || row.symbols[0] === '') return unit;
  return unitOf(dimension, row, prefixFor(new UnitDecimal(value).abs().div(row.scale), row.prefixes));
}

/** The largest of year, day, hour and minute that gives a whole number (a year: two decimals), else a prefixed second. */
function durationUnit(value: number): Unit {
  const places: [string, number][] = [
    ['y', 2],
    ['d', 0],
    ['h', 0],
    ['min', 0],
  ];
  for (const [symbol, decimals] of places) {
    const unit = defaultUnitOf('duration', symbol);
    const number = coefficientIn(value, unit, DOUBLE_DIGITS);
    if (number?.abs().gte(1) && number.decimalPlaces() <= decimals && number.abs().lt(1e6)) return unit;
  }
  return engineeringUnit(value, defaultUnitOf('duration'));
}

function editUnits(value: number, dimension: Dimension, fieldUnit: Unit): Unit[] {
  if (dimension === 'duration') return [durationUnit(value), engineeringUnit(value, defaultUnitOf('duration'))];
  const base = defaultUnitOf(dimension);
  return [engineeringUnit(value, fieldUnit), engineeringUnit(value, base), base];
}

function write(number: Decimal, unit: Unit): string {
  const digits = number.toString().replace(/^-/, '−');
  return unit.symbol === '' ? digits : `${digits} ${unit.symbol}`;
}

/**
 * Text of a value for an edit field. `parseQuantity` of it gives exactly the same double back.
 *
 * @param value Finite value in the document's unit.
 * @param dimension What it measures.
 * @param defaultUnit The field's unit; kept where the number in it is short.
 * @returns Number and unit with a plain space; the minus sign is U+2212, the micro sign U+00B5.
 * @throws InconsistentInputError if `defaultUnit` is no unit of the dimension.
 * @example formatForEdit(0.0000017, 'current') // '1.7 µA'
 */
export function formatForEdit(value: number, dimension: Dimension, defaultUnit?: string): string {
  const fieldUnit = defaultUnitOf(dimension, defaultUnit);
  if (value === 0) return write(new UnitDecimal(0), zeroUnit(fieldUnit));
  const asIs = defaultUnit === undefined ? null : coefficientIn(value, fieldUnit, EASY_DIGITS);
  if (asIs?.abs().gte(0.01) && asIs.abs().lt(10_000)) return write(asIs, fieldUnit);
  const units = editUnits(value, dimension, fieldUnit);
  for (const digits of [TYPED_DIGITS, DOUBLE_DIGITS]) {
    for (const unit of units) {
      const number = coefficientIn(value, unit, digits);
      if (number) return write(number, unit);
    }
  }
  return write(new UnitDecimal(value), defaultUnitOf(dimension));
}

/** 0 °C and 0 K are not the same. */
function zeroUnit(fieldUnit: Unit): Unit {
  return fieldUnit.offset.isZero() ? fieldUnit : defaultUnitOf(fieldUnit.dimension);
}

/**
 * Text of a figure with its range for an edit field; `parseQuantityRange` of it gives the same figures back.
 *
 * @param figures Lowest, typical and highest in the document's unit; the outer ones may be absent.
 * @param dimension What they measure.
 * @param defaultUnit The field's unit.
 * @returns One figure, or three places parted by ` … `.
 * @throws InconsistentInputError if `defaultUnit` is no unit of the dimension.
 * @example formatRangeForEdit({ min: 1e-6, typical: 2e-6 }, 'current') // '1 µA … 2 µA …'
 */
export function formatRangeForEdit(
  figures: { min?: number; typical: number; max?: number },
  dimension: Dimension,
  defaultUnit?: string,
): string {
  const show = (value: number | undefined): string =>
    value === undefined ? '' : formatForEdit(value, dimension, defaultUnit);
  if (figures.min === undefined && figures.max === undefined) return show(figures.typical);
  return [show(figures.min), show(figures.typical), show(figures.max)].join(' … ').trim();
}

/**
 * An example of what can be typed in a field.
 *
 * @param dimension What the field measures.
 * @returns Text such as `1.7 µA`.
 * @example exampleOf('current') // '1.7 µA'
 */
export function exampleOf(dimension: Dimension): string {
  return DIMENSIONS[dimension].example;
}
