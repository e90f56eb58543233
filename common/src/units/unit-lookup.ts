import { Decimal } from 'decimal.js';
import { InconsistentInputError } from '#common/errors.ts';
import type { Dimension, UnitRow } from './dimensions.table.ts';
import { DIMENSIONS, PREFIX_EXPONENTS } from './dimensions.table.ts';

/** A clone of its own, wide enough that a typed figure (40 digits at most) times a scale is never rounded. */
export const UnitDecimal = Decimal.clone({ precision: 100, rounding: Decimal.ROUND_HALF_UP });

/** One unit with its prefix: value in the document's unit = number × `scale` + `offset`. */
export interface Unit {
  dimension: Dimension;
  /** As shown, such as µA. */
  symbol: string;
  scale: Decimal;
  offset: Decimal;
  /** The table row it comes from, for other prefixes of the same unit. */
  row: UnitRow;
}

/**
 * Builds the unit of a table row with a prefix.
 *
 * @param dimension What the unit measures.
 * @param row Row of the table of units.
 * @param prefix A prefix that the row allows, or '' for none.
 * @returns The unit.
 * @example unitOf('current', DIMENSIONS.current.units[0], 'µ').symbol // 'µA'
 */
export function unitOf(dimension: Dimension, row: UnitRow, prefix: string): Unit {
  const scale = new UnitDecimal(row.scale).mul(new UnitDecimal(10).pow(PREFIX_EXPONENTS[prefix] ?? 0));
  const symbol = `${prefix}${row.symbols[0] ?? ''}`;
  return { dimension, symbol, scale, offset: new UnitDecimal(row.offset ?? 0), row };
}

/**
 * Brings the spellings of a unit into the one that the table uses: one micro sign, one ohm sign, single spaces.
 *
 * @param text A unit as typed.
 * @returns The same unit in the table's spelling; `u` at the beginning becomes `µ`.
 * @example normaliseUnit('uA') // 'µA'
 */
export function normaliseUnit(text: string): string {
  return text.trim().replace(/\s+/g, ' ').replaceAll('\u03bc', 'µ').replaceAll('\u2126', 'Ω').replace(/^u/, 'µ');
}

function matches(row: UnitRow, symbol: string, ignoreCase: boolean): boolean {
  return row.symbols.some((known) => known === symbol || (ignoreCase && known.toLowerCase() === symbol.toLowerCase()));
}

/**
 * Finds a unit of a dimension by its spelling.
 *
 * @param text Unit as typed, with or without prefix, after `normaliseUnit`.
 * @param dimension What it is to measure.
 * @param ignoreCase Whether `ma` counts as `mA`; the prefix itself always keeps its case.
 * @returns The unit, or null when the dimension has no such unit.
 * @example findUnit('mAh', 'charge', false)?.scale.toNumber() // 3.6
 */
export function findUnit(text: string, dimension: Dimension, ignoreCase: boolean): Unit | null {
  const rows = DIMENSIONS[dimension].units;
  const whole = rows.find((row) => matches(row, text, ignoreCase));
  if (whole) return unitOf(dimension, whole, '');
  const prefix = text.charAt(0);
  const rest = text.slice(1);
  if (rest === '') return null;
  const row = rows.find((candidate) => candidate.prefixes?.includes(prefix) && matches(candidate, rest, ignoreCase));
  return row ? unitOf(dimension, row, prefix) : null;
}

/**
 * The default unit of a field.
 *
 * @param dimension What the field measures.
 * @param symbol A unit of that dimension, such as `µA`; without it the dimension's first.
 * @returns The unit.
 * @throws InconsistentInputError if the dimension has no unit of that name.
 * @example defaultUnitOf('charge', 'mAh').symbol // 'mAh'
 */
export function defaultUnitOf(dimension: Dimension, symbol?: string): Unit {
  const [first] = DIMENSIONS[dimension].units;
  const unit = symbol === undefined ? null : findUnit(normaliseUnit(symbol), dimension, false);
  if (unit) return unit;
  if (symbol === undefined && first) return unitOf(dimension, first, '');
  throw new InconsistentInputError(`"${symbol}" is no unit of ${DIMENSIONS[dimension].name}.`, {
    code: 'unknown-unit',
    field: 'unit',
    value: symbol,
    expected: DIMENSIONS[dimension].example,
  });
}

/**
 * Finds in which dimension a spelling is a unit.
 *
 * @param text Unit as typed, after `normaliseUnit`.
 * @returns The first dimension that knows exactly this spelling, or null.
 * @example dimensionOfUnit('V') // 'voltage'
 */
export function dimensionOfUnit(text: string): Dimension | null {
  if (text === '') return null;
  for (const dimension of dimensions()) {
    if (findUnit(text, dimension, false)) return dimension;
  }
  return null;
}

function dimensions(): Dimension[] {
  const isDimension = (key: string): key is Dimension => Object.hasOwn(DIMENSIONS, key);
  return Object.keys(DIMENSIONS).filter(isDimension);
}

/**
 * Converts an exact decimal in a unit to the document's unit, rounded once to the nearest double.
 *
 * @param number The number as typed.
 * @param unit Its unit.
 * @returns The value in the document's unit; ±Infinity beyond the range of doubles. Never −0.
 * @example toDocumentUnit(new UnitDecimal('1.7'), defaultUnitOf('current', 'µA')) // 0.0000017
 */
export function toDocumentUnit(number: Decimal, unit: Unit): number {
  const value = number.mul(unit.scale).add(unit.offset).toNumber();
  return value === 0 ? 0 : value;
}

/**
 * A figure in a unit as the document holds it, so that tables can keep the figure of their source.
 *
 * @param value The figure; taken as its shortest decimal.
 * @param symbol Its unit, such as `mAh`, `µA`, `min`, `y`, `%/year`, `g`, `cm³`.
 * @returns The nearest double in the document's unit (A, s, C, V, Ω, F, °C, share of 1, kg, m³).
 * @throws InconsistentInputError if no dimension knows the unit.
 * @example fromUnit(225, 'mAh') // 810
 */
export function fromUnit(value: number, symbol: string): number {
  const text = normaliseUnit(symbol);
  const dimension = dimensionOfUnit(text);
  const unit = dimension && findUnit(text, dimension, false);
  if (unit) return toDocumentUnit(new UnitDecimal(value), unit);
  throw new InconsistentInputError(`"${symbol}" is not a unit that is known here.`, {
    code: 'unknown-unit',
    field: 'symbol',
    value: symbol,
  });
}
