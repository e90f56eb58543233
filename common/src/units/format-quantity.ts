import type { Decimal } from 'decimal.js';
import type { Dimension } from './dimensions.table.ts';
import { engineeringUnit } from './format-for-edit.ts';
import type { Unit } from './unit-lookup.ts';
import { defaultUnitOf, UnitDecimal } from './unit-lookup.ts';

/** Between number and unit: a line never breaks there. */
export const NO_BREAK_SPACE = '\u00a0';
const MINUS = '\u2212';
const DEFAULT_DIGITS = 3;

export interface FormatOptions {
  /** Default 3. */
  significantDigits?: number;
  /** Keeps zeros at the end, so that `1.70` says that three digits are meant. Default false. */
  keepZeros?: boolean;
}

/**
 * Puts number and unit together with a no-break space.
 *
 * @param number Number as text.
 * @param symbol Unit, or '' for none.
 * @returns The text.
 * @example withUnit('3', '%') // '3 %', the space a no-break space
 */
export function withUnit(number: string, symbol: string): string {
  return symbol === '' ? number : `${number}${NO_BREAK_SPACE}${symbol}`;
}

function digitsOf(number: Decimal, options: FormatOptions): string {
  const digits = options.significantDigits ?? DEFAULT_DIGITS;
  const rounded = number.toSignificantDigits(digits);
  const decimals = options.keepZeros ? Math.max(0, digits - 1 - rounded.e) : rounded.decimalPlaces();
  return rounded.toFixed(decimals).replace(/^-/, MINUS);
}

/**
 * A number without unit: unicode minus, no noise at the end.
 *
 * @param value Any number.
 * @param options Digits; by default 3 significant ones, zeros at the end left out.
 * @returns The text; `—` for a number that is not finite.
 * @example formatNumber(0.1 + 0.2) // '0.3'
 */
export function formatNumber(value: number, options: FormatOptions = {}): string {
  if (!Number.isFinite(value)) return '—';
  return value === 0 ? '0' : digitsOf(new UnitDecimal(value), options);
}

function inUnit(value: number, unit: Unit, options: FormatOptions): string {
  return withUnit(digitsOf(new UnitDecimal(value).sub(unit.offset).div(unit.scale), options), unit.symbol);
}

/**
 * A value with its unit and the prefix that leaves one to three digits before the decimal point.
 *
 * @param value Value in the document's unit.
 * @param dimension What it measures.
 * @param options Digits; by default 3 significant ones, zeros at the end left out.
 * @returns Number, no-break space, unit; `—` for a number that is not finite.
 * @example formatQuantity(0.00047, 'capacitance') // '470 µF'
 */
export function formatQuantity(value: number, dimension: Dimension, options: FormatOptions = {}): string {
  if (!Number.isFinite(value)) return '—';
  const base = defaultUnitOf(dimension);
  if (value === 0) return withUnit('0', base.symbol);
  // Rounded first, because 999.96 µA to three digits is 1 mA and not 1000 µA.
  const rounded = new UnitDecimal(value).toSignificantDigits(options.significantDigits ?? DEFAULT_DIGITS).toNumber();
  return inUnit(value, engineeringUnit(rounded, base), options);
}

/**
 * A current.
 *
 * @param currentA Current, A.
 * @param options Digits.
 * @returns Text such as `1.7 µA`.
 * @example formatCurrent(1.7e-6) // '1.7 µA'
 */
export function formatCurrent(currentA: number, options: FormatOptions = {}): string {
  return formatQuantity(currentA, 'current', options);
}

/**
 * A charge in milliampere-hours, the unit in which cells are sold.
 *
 * @param chargeC Charge, C.
 * @param options Digits; by default 4 significant ones.
 * @returns Text such as `225 mAh`; below 1 µAh the prefix changes.
 * @example formatChargeMah(810) // '225 mAh'
 */
export function formatChargeMah(chargeC: number, options: FormatOptions = {}): string {
  if (!Number.isFinite(chargeC)) return '—';
  const unit = defaultUnitOf('charge', 'mAh');
  if (chargeC === 0) return withUnit('0', unit.symbol);
  const isTiny = Math.abs(chargeC) < 3.6e-3;
  return inUnit(chargeC, isTiny ? engineeringUnit(chargeC, unit) : unit, { significantDigits: 4, ...options });
}

/**
 * A voltage: at least one decimal from 1 V, millivolts below.
 *
 * @param voltageV Voltage, V.
 * @param options Digits; by default 3 significant ones.
 * @returns Text such as `2.0 V`, `2.95 V` or `350 mV`.
 * @example formatVoltage(2) // '2.0 V'
 */
export function formatVoltage(voltageV: number, options: FormatOptions = {}): string {
  const text = formatQuantity(voltageV, 'voltage', options);
  return text
    .replace(new RegExp(`^(${MINUS}?\\d{1,2})${NO_BREAK_SPACE}V$`), `$1.0${NO_BREAK_SPACE}V`)
    .replace(/^0\.0/, '0');
}

/**
 * A temperature in degrees Celsius.
 *
 * @param temperatureC Temperature, °C.
 * @param decimals Most decimals shown; default 1, zeros left out.
 * @returns Text such as `−18 °C`.
 * @example formatTemperature(-18) // '−18 °C'
 */
export function formatTemperature(temperatureC: number, decimals = 1): string {
  if (!Number.isFinite(temperatureC)) return '—';
  const rounded = new UnitDecimal(temperatureC).toDecimalPlaces(decimals);
  const text = rounded.isZero() ? '0' : rounded.toFixed().replace(/^-/, MINUS);
  return withUnit(text, '°C');
}

/**
 * A share as a percentage.
 *
 * @param share Share of 1.
 * @param options Digits; by default 3 significant ones.
 * @returns Text such as `3 %`.
 * @example formatShare(0.03) // '3 %'
 */
export function formatShare(share: number, options: FormatOptions = {}): string {
  return formatQuantity(share, 'share', options);
}

/**
 * Two values of one kind in one unit, as `1.2 to 3.1 µA`.
 *
 * @param low Lower value in the document's unit.
 * @param high Upper value; its prefix serves both.
 * @param dimension What they measure.
 * @param options Digits.
 * @returns The text; one value alone when both read the same.
 * @example formatSpan(1.2e-6, 3.1e-6, 'current') // '1.2 to 3.1 µA'
 */
export function formatSpan(low: number, high: number, dimension: Dimension, options: FormatOptions = {}): string {
  const upper = formatQuantity(high, dimension, options);
  if (!Number.isFinite(low) || !Number.isFinite(high) || high === 0) {
    return `${formatQuantity(low, dimension, options)} to ${upper}`;
  }
  const unit = engineeringUnit(high, defaultUnitOf(dimension));
  const lower = low === 0 ? withUnit('0', unit.symbol) : inUnit(low, unit, options);
  if (lower === upper) return upper;
  const ending = `${NO_BREAK_SPACE}${unit.symbol}`;
  return upper.endsWith(ending)
    ? `${lower.slice(0, lower.length - ending.length)} to ${upper}`
    : `${lower} to ${upper}`;
}
