import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Dimension } from './dimensions.table.ts';
import { DIMENSIONS } from './dimensions.table.ts';
import { exampleOf, formatForEdit, formatRangeForEdit } from './format-for-edit.ts';
import { parseQuantity, parseQuantityRange } from './parse-quantity.ts';
import { defaultUnitOf, findUnit, fromUnit } from './unit-lookup.ts';

const dimensions = fc.constantFrom(
  ...Object.keys(DIMENSIONS).filter((key): key is Dimension => Object.hasOwn(DIMENSIONS, key)),
);
const finite = fc.double({ noNaN: true, noDefaultInfinity: true });

describe('formatForEdit', () => {
  it.each<[number, Dimension, string | undefined, string]>([
    [1.7e-6, 'current', undefined, '1.7 µA'],
    [0.5e-6, 'current', 'µA', '0.5 µA'],
    [0, 'current', 'µA', '0 µA'],
    [810, 'charge', 'mAh', '225 mAh'],
    [34, 'charge', 'mAh', '34 C'],
    [900, 'duration', undefined, '15 min'],
    [90, 'duration', undefined, '90 s'],
    [0.000192, 'duration', undefined, '192 µs'],
    [129_600, 'duration', undefined, '36 h'],
    [157_788_000, 'duration', undefined, '5 y'],
    [-18, 'temperature', undefined, '−18 °C'],
    [0, 'temperature', 'K', '0 °C'],
    [0.0235, 'mass', undefined, '23.5 g'],
    [0.03, 'share', undefined, '3 %'],
    [250_000, 'bit-rate', undefined, '250 kbit/s'],
    [1.5, 'number', undefined, '1.5'],
    [5e-324, 'current', undefined, '5e-309 fA'],
  ])('writes %d as %s with unit %s: %s', (value, dimension, unit, text) => {
    expect(formatForEdit(value, dimension, unit)).toBe(text);
  });

  it('parseQuantity gives the same double back for every finite double', () => {
    fc.assert(
      fc.property(finite, dimensions, (value, dimension) => {
        const parsed = parseQuantity(formatForEdit(value, dimension), { dimension });
        return parsed.kind === 'value' && parsed.value === value;
      }),
      { numRuns: 2_000 },
    );
  });

  it('parseQuantity gives the same double back when the field has a unit of its own', () => {
    const fields = fc.constantFrom<[Dimension, string]>(
      ['current', 'µA'],
      ['charge', 'mAh'],
      ['duration', 'y'],
      ['temperature', 'K'],
      ['energy', 'Wh'],
      ['volume', 'mm³'],
    );
    fc.assert(
      fc.property(finite, fields, (value, [dimension, defaultUnit]) => {
        const parsed = parseQuantity(formatForEdit(value, dimension, defaultUnit), { dimension, defaultUnit });
        return parsed.kind === 'value' && parsed.value === value;
      }),
      { numRuns: 1_000 },
    );
  });

  it('u reads like µ in what it writes', () => {
    fc.assert(
      fc.property(finite, dimensions, (value, dimension) => {
        const text = formatForEdit(value, dimension).replace('µ', 'u');
        const parsed = parseQuantity(text, { dimension });
        return parsed.kind === 'value' && parsed.value === value;
      }),
    );
  });
});

describe('formatRangeForEdit', () => {
  it('leaves places empty that are absent', () => {
    expect(formatRangeForEdit({ min: 1e-6, typical: 2e-6 }, 'current')).toBe('1 µA … 2 µA …');
  });

  it('parseQuantityRange gives the same figures back', () => {
    const figures = fc.tuple(finite, finite, finite).map((three) => [...three].sort((a, b) => a - b));
    fc.assert(
      fc.property(figures, dimensions, ([min = 0, typical = 0, max = 0], dimension) => {
        const text = formatRangeForEdit({ min, typical, max }, dimension);
        const parsed = parseQuantityRange(text, { dimension });
        return parsed.kind === 'value' && parsed.min === min && parsed.typical === typical && parsed.max === max;
      }),
    );
  });
});

describe('exampleOf', () => {
  it('is accepted by its own dimension, for every dimension', () => {
    fc.assert(
      fc.property(dimensions, (dimension) =>
        exampleOf(dimension)
          .split(' or ')
          .every((text) => parseQuantity(text, { dimension }).kind === 'value'),
      ),
    );
  });
});

describe('fromUnit', () => {
  it.each([
    [225, 'mAh', 810],
    [1.7, 'uA', 1.7e-6],
    [10, 'y', 315_576_000],
    [2.5, '%/year', 0.025],
    [-20, '°C', -20],
    [23.5, 'g', 0.0235],
    [0.1, 'mAh', 0.36],
  ])('takes %d %s as %d', (value, symbol, expected) => {
    expect(fromUnit(value, symbol)).toBe(expected);
  });

  it('throws for a unit that nobody knows', () => {
    expect(() => fromUnit(1, 'furlong')).toThrow('"furlong" is not a unit');
  });
});

describe('findUnit', () => {
  it('keeps milli and mega apart though it ignores the case of the unit', () => {
    expect([findUnit('ma', 'current', true)?.symbol, findUnit('Ma', 'current', true)?.symbol]).toEqual(['mA', 'MA']);
  });

  it('is null for a unit of another dimension', () => {
    expect(findUnit('V', 'current', true)).toBeNull();
  });
});

describe('defaultUnitOf', () => {
  it('is the first unit of the dimension without a wish', () => {
    expect(defaultUnitOf('duration').symbol).toBe('s');
  });
});
