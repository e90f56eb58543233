import { describe, expect, it } from 'vitest';
import type { Dimension } from './dimensions.table.ts';
import type { ParseOptions } from './parse-quantity.ts';
import { parseQuantity, parseQuantityRange } from './parse-quantity.ts';

const value = (text: string, dimension: Dimension, options: Partial<ParseOptions> = {}): number | string => {
  const parsed = parseQuantity(text, { dimension, ...options });
  return parsed.kind === 'value' ? parsed.value : parsed.code;
};

describe('parseQuantity: reads', () => {
  const rows: [string, Dimension, number][] = [
    ['1.7 µA', 'current', 1.7e-6],
    ['1.7 \u03bcA', 'current', 1.7e-6],
    ['1.7uA', 'current', 1.7e-6],
    ['1.7u', 'current', 1.7e-6],
    ['1,7 µA', 'current', 1.7e-6],
    ['350nA', 'current', 350e-9],
    ['  5   ma ', 'current', 5e-3],
    ['1.7e-6', 'current', 1.7e-6],
    ['1\u202f200 mA', 'current', 1.2],
    ['.5 A', 'current', 0.5],
    ['14 ms', 'duration', 14e-3],
    ['192 µs', 'duration', 192e-6],
    ['0.5 s', 'duration', 0.5],
    ['15 min', 'duration', 900],
    ['2 h', 'duration', 7_200],
    ['3 d', 'duration', 259_200],
    ['5 y', 'duration', 157_788_000],
    ['5 years', 'duration', 157_788_000],
    ['225 mAh', 'charge', 810],
    ['2.9 Ah', 'charge', 10_440],
    ['0.81 C', 'charge', 0.81],
    ['3.0 V', 'voltage', 3],
    ['350 mV', 'voltage', 0.35],
    ['18 Ω', 'resistance', 18],
    ['18 \u2126', 'resistance', 18],
    ['18 ohm', 'resistance', 18],
    ['60 mohm', 'resistance', 0.06],
    ['4.7k', 'resistance', 4_700],
    ['470 µF', 'capacitance', 470e-6],
    ['\u221218 °C', 'temperature', -18],
    ['-18', 'temperature', -18],
    ['\u2212 18 °C', 'temperature', -18],
    ['253.15 K', 'temperature', -20],
    ['6 K', 'temperature-difference', 6],
    ['3 %', 'share', 0.03],
    ['2.5 %/yr', 'loss-per-year', 0.025],
    ['50 kJ/mol', 'molar-energy', 50_000],
    ['23.5 g', 'mass', 0.0235],
    ['8.3 cm³', 'volume', 8.3e-6],
    ['250 kbit/s', 'bit-rate', 250_000],
    ['140 a day', 'rate-per-day', 140],
    ['−97 dBm', 'level', -97],
    ['24 bytes', 'octets', 24],
    ['1.5', 'number', 1.5],
  ];
  it.each(rows)('%s as %s', (text, dimension, expected) => {
    expect(value(text, dimension)).toBe(expected);
  });
});

describe('parseQuantity: the unit of the field', () => {
  it('a bare number takes it', () => {
    expect(value('1.7', 'current', { defaultUnit: 'µA' })).toBe(1.7e-6);
  });

  it('a bare prefix goes before its unprefixed form', () => {
    expect(value('225 m', 'charge', { defaultUnit: 'mAh' })).toBe(810);
  });

  it('throws when it is none of the dimension', () => {
    expect(() => parseQuantity('1', { dimension: 'current', defaultUnit: 'V' })).toThrow('no unit of a current');
  });
});

describe('parseQuantity: refuses', () => {
  const rows: [string, Dimension, Partial<ParseOptions>, string][] = [
    ['', 'current', {}, 'empty'],
    ['lots', 'current', {}, 'not-a-number'],
    ['1.2.3 µA', 'current', {}, 'not-a-number'],
    ['1,234.5 µA', 'current', {}, 'not-a-number'],
    ['NaN', 'current', {}, 'not-a-number'],
    ['Infinity', 'current', {}, 'not-a-number'],
    ['0x10', 'current', {}, 'unknown-unit'],
    ['1'.repeat(41), 'number', {}, 'not-a-number'],
    ['1,200 mAh', 'charge', {}, 'ambiguous-comma'],
    ['15 m', 'duration', {}, 'ambiguous-unit'],
    ['1.7 xA', 'current', {}, 'unknown-unit'],
    ['4.7 K', 'resistance', {}, 'wrong-dimension'],
    ['3 V', 'current', {}, 'wrong-dimension'],
    ['5 A', 'duration', {}, 'wrong-dimension'],
    ['1e400 A', 'current', {}, 'out-of-range'],
    ['−1 µA', 'current', { min: 0 }, 'out-of-range'],
    ['2 A', 'current', { max: 1 }, 'out-of-range'],
    ['0 s', 'duration', { above: 0 }, 'out-of-range'],
    ['100 %', 'share', { below: 1 }, 'out-of-range'],
    ['1.5 µs', 'duration', { wholeMicroseconds: true }, 'not-whole-microseconds'],
    ['1.5', 'octets', { whole: true }, 'not-whole'],
  ];
  it.each(rows)('"%s" as %s with %o: %s', (text, dimension, options, code) => {
    expect(value(text, dimension, options)).toBe(code);
  });

  it('and says what would be right', () => {
    expect(parseQuantity('3 V', { dimension: 'current' })).toEqual({
      kind: 'problem',
      code: 'wrong-dimension',
      message: '"V" is a unit of voltage. Type a current such as 1.7 µA.',
    });
  });

  it('a value above the highest, naming that one in the unit of the field', () => {
    const parsed = parseQuantity('2 A', { dimension: 'current', max: 0.5, defaultUnit: 'mA' });
    expect(parsed).toMatchObject({ message: '"2 A" is out of range: the highest allowed is 500 mA.' });
  });

  it('part of a microsecond, naming its neighbours', () => {
    const parsed = parseQuantity('192.5 µs', { dimension: 'duration', wholeMicroseconds: true });
    expect(parsed).toMatchObject({ message: 'Times are kept as whole microseconds: 192 µs or 193 µs.' });
  });

  it('no time that is whole microseconds in decimals though not in doubles', () => {
    expect(value('0.000003 s', 'duration', { wholeMicroseconds: true })).toBe(0.000003);
  });
});

describe('parseQuantityRange', () => {
  const range = (text: string, dimension: Dimension = 'current') => parseQuantityRange(text, { dimension });
  const three = { kind: 'value', min: 1.2e-6, typical: 1.7e-6, max: 3.1e-6 };

  it.each(['1.2 … 1.7 … 3.1 µA', '1.2/1.7/3.1 µA', '1.2...1.7...3.1uA', '1200 nA; 1.7 µA; 3.1 µA'])(
    'reads %s',
    (text) => {
      expect(range(text)).toEqual(three);
    },
  );

  it('reads one figure as the typical one', () => {
    expect(range('1.7 µA')).toEqual({ kind: 'value', typical: 1.7e-6 });
  });

  it('leaves out an empty outer place', () => {
    expect(range('… 1.7 … 3.1 µA')).toEqual({ kind: 'value', typical: 1.7e-6, max: 3.1e-6 });
  });

  it('keeps a slash for the unit where units have one', () => {
    expect(range('1 … 2 … 3 %/y', 'loss-per-year')).toEqual({ kind: 'value', min: 0.01, typical: 0.02, max: 0.03 });
  });

  it.each([
    ['1 … 2 µA', 'range-needs-three'],
    ['1 … … 3 µA', 'range-needs-three'],
    ['3 … 2 … 1 µA', 'out-of-order'],
    ['3 … … ', 'range-needs-three'],
    ['1 … 2 … 3 V', 'wrong-dimension'],
    ['1 … x … 3 µA', 'not-a-number'],
  ])('refuses %s: %s', (text, code) => {
    expect(range(text)).toMatchObject({ kind: 'problem', code });
  });
});
