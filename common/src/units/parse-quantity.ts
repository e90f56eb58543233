import type { Decimal } from 'decimal.js';
import type { Dimension } from './dimensions.table.ts';
import { DIMENSIONS } from './dimensions.table.ts';
import { formatForEdit } from './format-for-edit.ts';
import type { Unit } from './unit-lookup.ts';
import {
  defaultUnitOf,
  dimensionOfUnit,
  findUnit,
  normaliseUnit,
  toDocumentUnit,
  UnitDecimal,
  unitOf,
} from './unit-lookup.ts';

export type QuantityProblemCode =
  | 'empty'
  | 'not-a-number'
  | 'ambiguous-comma'
  | 'ambiguous-unit'
  | 'unknown-unit'
  | 'wrong-dimension'
  | 'out-of-range'
  | 'not-whole-microseconds'
  | 'not-whole'
  | 'range-needs-three'
  | 'out-of-order';

/** Why a typed text is no figure of the field, and what would be right. */
export interface QuantityProblem {
  kind: 'problem';
  code: QuantityProblemCode;
  message: string;
}

export type ParsedQuantity = { kind: 'value'; value: number } | QuantityProblem;
export type ParsedRange = { kind: 'value'; min?: number; typical: number; max?: number } | QuantityProblem;

export interface ParseOptions {
  dimension: Dimension;
  /** Unit of a bare number, such as `µA`; a bare prefix (`1.7u`) goes before its unprefixed form. Default: the dimension's first unit. */
  defaultUnit?: string;
  /** Allowed values in the document's unit: from `min` to `max`, or more than `above` and less than `below`. */
  min?: number;
  max?: number;
  above?: number;
  below?: number;
  /** Times that the document keeps as whole microseconds. */
  wholeMicroseconds?: boolean;
  /** Counts. */
  whole?: boolean;
}

const NUMBER = /^([+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:e[+-]?\d{1,4})?)(.*)$/i;
/** Digits beyond this say nothing about a physical figure, and would leave the exact arithmetic. */
const MAX_NUMBER_LENGTH = 40;

const problem = (code: QuantityProblemCode, message: string): QuantityProblem => ({ kind: 'problem', code, message });

const likeThis = (options: ParseOptions): string =>
  `Type ${DIMENSIONS[options.dimension].name} such as ${DIMENSIONS[options.dimension].example}.`;

interface Split {
  number: Decimal;
  unitText: string;
}

/** One minus sign, and digits in one piece where they were grouped by spaces. */
function tidy(typed: string): string {
  return typed
    .trim()
    .replace(/[\u2212\ufe63\uff0d]/g, '-')
    .replace(/^[\u2012\u2013]/, '-')
    .replace(/^([+-])\s+/, '$1')
    .replace(/^([+-]?\d{1,3})((?:[ \u00a0\u2009\u202f]\d{3})+)(?!\d)/, (_, head: string, groups: string) =>
      head.concat(groups.replace(/\D/g, '')),
    );
}

/** Why the digits at the beginning cannot be read, or null. */
function digitsProblem(text: string, options: ParseOptions): QuantityProblem | null {
  const head = /^[+-]?[\d.,]*/.exec(text)?.[0] ?? '';
  if ((head.match(/[.,]/g)?.length ?? 0) > 1) {
    return problem('not-a-number', `"${head}" has more than one decimal sign. ${likeThis(options)}`);
  }
  if (!/^[+-]?[1-9]\d{0,2},\d{3}$/.test(head)) return null;
  const readings = `type ${head.replace(',', '.')} or ${head.replace(',', '')}`;
  return problem('ambiguous-comma', `"${head}" can be read in two ways: ${readings}.`);
}

function splitNumber(typed: string, options: ParseOptions): Split | QuantityProblem {
  const text = tidy(typed);
  if (text === '') return problem('empty', `Nothing typed. ${likeThis(options)}`);
  const unreadable = digitsProblem(text, options);
  if (unreadable) return unreadable;
  const match = NUMBER.exec(text.replace(',', '.'));
  const number = match?.[1];
  if (number === undefined || number.length > MAX_NUMBER_LENGTH) {
    return problem('not-a-number', `"${typed.trim()}" is not a number with a unit. ${likeThis(options)}`);
  }
  return { number: new UnitDecimal(number), unitText: normaliseUnit(match?.[2] ?? '') };
}

function unitFor(unitText: string, options: ParseOptions): Unit | QuantityProblem {
  const { dimension } = options;
  const fallback = defaultUnitOf(dimension, options.defaultUnit);
  if (unitText === '') return fallback;
  const exact = findUnit(unitText, dimension, false);
  if (exact) return exact;
  if (dimension === 'duration' && unitText === 'm') {
    return problem('ambiguous-unit', '"m" can be milliseconds or minutes: type ms or min.');
  }
  if (unitText.length === 1 && fallback.row.prefixes?.includes(unitText)) {
    return unitOf(dimension, fallback.row, unitText);
  }
  const other = dimensionOfUnit(unitText);
  const loose = other ? null : findUnit(unitText, dimension, true);
  if (loose) return loose;
  return other
    ? problem('wrong-dimension', `"${unitText}" is a unit of ${bareName(other)}. ${likeThis(options)}`)
    : problem('unknown-unit', `The unit "${unitText}" is not known here. ${likeThis(options)}`);
}

const bareName = (dimension: Dimension): string => DIMENSIONS[dimension].name.replace(/^an? /, '');

function checkValue(value: number, typed: string, options: ParseOptions): QuantityProblem | null {
  const show = (limit: number): string => formatForEdit(limit, options.dimension, options.defaultUnit);
  const { min = -Infinity, max = Infinity, above = -Infinity, below = Infinity } = options;
  const outside = (rule: string): QuantityProblem =>
    problem('out-of-range', `"${typed.trim()}" is out of range: ${rule}.`);
  if (!Number.isFinite(value)) return outside('no number of this size can be kept');
  if (value < min) return outside(`the lowest allowed is ${show(min)}`);
  if (value > max) return outside(`the highest allowed is ${show(max)}`);
  if (value <= above) return outside(`it must be more than ${show(above)}`);
  if (value >= below) return outside(`it must be less than ${show(below)}`);
  return null;
}

function checkWhole(exact: Decimal, options: ParseOptions): QuantityProblem | null {
  if (options.whole && !exact.isInteger()) {
    return problem(
      'not-whole',
      `A whole number is needed, such as ${exact.floor().toFixed()} or ${exact.ceil().toFixed()}.`,
    );
  }
  const microseconds = exact.mul(1e6);
  if (!options.wholeMicroseconds || microseconds.isInteger()) return null;
  const neighbours = `${microseconds.floor().toFixed()} µs or ${microseconds.ceil().toFixed()} µs`;
  return problem('not-whole-microseconds', `Times are kept as whole microseconds: ${neighbours}.`);
}

/**
 * Reads one typed figure. The conversion is exact: the decimal that was typed, times the unit, rounded once to a double.
 *
 * @param text What was typed, such as `1.7 µA`, `1.7u`, `350nA`, `1,7 µA`, `15 min`, `−18 °C`, `3 %`.
 * @param options Dimension, unit of a bare number, and what is allowed.
 * @returns The value in the document's unit, or the problem in words.
 * @throws InconsistentInputError if `defaultUnit` is no unit of the dimension.
 * @example parseQuantity('1.7u', { dimension: 'current' }) // { kind: 'value', value: 0.0000017 }
 */
export function parseQuantity(text: string, options: ParseOptions): ParsedQuantity {
  const split = splitNumber(text, options);
  if ('kind' in split) return split;
  const unit = unitFor(split.unitText, options);
  if ('kind' in unit) return unit;
  const value = toDocumentUnit(split.number, unit);
  const exact = split.number.mul(unit.scale).add(unit.offset);
  return checkValue(value, text, options) ?? checkWhole(exact, options) ?? { kind: 'value', value };
}

/** A slash parts figures only where no unit of the dimension contains one. */
function rangePieces(text: string, dimension: Dimension): string[] {
  const byDots = text.split(/…|\.{2,3}|;/);
  if (byDots.length > 1) return byDots;
  const hasSlashUnit = DIMENSIONS[dimension].units.some((row) => row.symbols.some((symbol) => symbol.includes('/')));
  return hasSlashUnit ? byDots : text.split('/');
}

/** Gives figures without a unit that of the last figure, so that `1.2 / 1.7 / 3.1 µA` reads as everyone means it. */
function withSharedUnit(pieces: string[], options: ParseOptions): string[] {
  const last = [...pieces].reverse().find((piece) => piece.trim() !== '');
  const split = last === undefined ? null : splitNumber(last, options);
  if (!split || 'kind' in split) return pieces;
  return pieces.map((piece) => {
    const own = splitNumber(piece, options);
    return 'kind' in own || own.unitText !== '' ? piece : `${piece} ${split.unitText}`;
  });
}

/**
 * Reads a figure with its range from one field: `1.2 … 1.7 … 3.1 µA` or `1.2/1.7/3.1 µA` are min, typical and max; one figure
 * alone is the typical one; an empty first or last place leaves that side out (`… 1.7 … 3.1 µA`).
 *
 * @param text What was typed.
 * @param options As for `parseQuantity`, applied to each figure.
 * @returns The figures in the document's unit, or the first problem in words.
 * @throws InconsistentInputError if `defaultUnit` is no unit of the dimension.
 * @example parseQuantityRange('1.2/1.7/3.1 µA', { dimension: 'current' }).kind // 'value'
 */
export function parseQuantityRange(text: string, options: ParseOptions): ParsedRange {
  const pieces = rangePieces(text, options.dimension);
  if (pieces.length === 1) {
    const single = parseQuantity(text, options);
    return single.kind === 'value' ? { kind: 'value', typical: single.value } : single;
  }
  const [low = '', middle = '', high = ''] = withSharedUnit(pieces, options);
  if (pieces.length !== 3 || middle.trim() === '') {
    return problem(
      'range-needs-three',
      'Type lowest … typical … highest, such as 1.2 … 1.7 … 3.1; an outer one may be left out.',
    );
  }
  return parseThree(low, middle, high, options);
}

/** An outer place that was left out is no figure and no problem. */
function parseOuter(piece: string, options: ParseOptions): { kind: 'value'; value?: number } | QuantityProblem {
  return piece.trim() === '' ? { kind: 'value' } : parseQuantity(piece, options);
}

function parseThree(low: string, middle: string, high: string, options: ParseOptions): ParsedRange {
  const min = parseOuter(low, options);
  const typical = parseQuantity(middle, options);
  const max = parseOuter(high, options);
  if (min.kind === 'problem') return min;
  if (typical.kind === 'problem') return typical;
  if (max.kind === 'problem') return max;
  const figures = [min.value, typical.value, max.value].filter((figure) => figure !== undefined);
  if (figures.some((figure, index) => figure < (figures[index - 1] ?? -Infinity))) {
    return problem('out-of-order', 'The figures must rise from lowest to typical to highest.');
  }
  return {
    kind: 'value',
    typical: typical.value,
    ...(min.value !== undefined && { min: min.value }),
    ...(max.value !== undefined && { max: max.value }),
  };
}
