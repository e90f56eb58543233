import { describe, expect, it } from 'vitest';
import {
  formatChargeMah,
  formatCurrent,
  formatNumber,
  formatQuantity,
  formatShare,
  formatSpan,
  formatTemperature,
  formatVoltage,
  NO_BREAK_SPACE,
} from './format-quantity.ts';

/** Tests read better with plain spaces; one test checks that they are no-break spaces. */
const plain = (text: string): string => text.replaceAll(NO_BREAK_SPACE, ' ');

describe('formatCurrent', () => {
  it.each([
    [1.7e-6, '1.7 µA'],
    [0.000017, '17 µA'],
    [0.0123456, '12.3 mA'],
    [999.96e-6, '1 mA'],
    [350e-9, '350 nA'],
    [-2e-6, '−2 µA'],
    [0, '0 A'],
    [1e-18, '0.001 fA'],
    [Number.NaN, '—'],
  ])('shows %d as %s', (currentA, text) => {
    expect(plain(formatCurrent(currentA))).toBe(text);
  });

  it('uses the micro sign U+00B5 and a no-break space', () => {
    expect(formatCurrent(1.7e-6)).toBe('1.7\u00a0\u00b5A');
  });

  it('keeps zeros at the end on request', () => {
    expect(plain(formatCurrent(1.7e-6, { significantDigits: 3, keepZeros: true }))).toBe('1.70 µA');
  });

  it('shows as many digits as asked', () => {
    expect(plain(formatCurrent(1.23456e-6, { significantDigits: 5 }))).toBe('1.2346 µA');
  });
});

describe('formatQuantity', () => {
  it.each([
    [0.00047, 'capacitance', '470 µF'],
    [18, 'resistance', '18 Ω'],
    [0.0235, 'mass', '23.5 g'],
    [250_000, 'bit-rate', '250 kbit/s'],
    [0.0000083, 'volume', '8.3 cm³'],
    [50_000, 'molar-energy', '50 kJ/mol'],
  ] as const)('shows %d as %s: %s', (value, dimension, text) => {
    expect(plain(formatQuantity(value, dimension))).toBe(text);
  });
});

describe('formatNumber', () => {
  it('has no noise of binary fractions', () => {
    expect(formatNumber(0.1 + 0.2)).toBe('0.3');
  });
});

describe('formatChargeMah', () => {
  it.each([
    [810, '225 mAh'],
    [68_400, '19000 mAh'],
    [0.00001, '2.778 nAh'],
    [0, '0 mAh'],
  ])('shows %d as %s', (chargeC, text) => {
    expect(plain(formatChargeMah(chargeC))).toBe(text);
  });
});

describe('formatVoltage', () => {
  it.each([
    [2, '2.0 V'],
    [2.951, '2.95 V'],
    [0.35, '350 mV'],
    [-1, '−1.0 V'],
    [12, '12.0 V'],
    [0, '0 V'],
  ])('shows %d as %s', (voltageV, text) => {
    expect(plain(formatVoltage(voltageV))).toBe(text);
  });
});

describe('formatTemperature', () => {
  it.each([
    [-18, '−18 °C'],
    [4.26, '4.3 °C'],
    [-0.01, '0 °C'],
  ])('shows %d as %s', (temperatureC, text) => {
    expect(plain(formatTemperature(temperatureC))).toBe(text);
  });
});

describe('formatShare', () => {
  it.each([
    [0.03, '3 %'],
    [0.1234, '12.3 %'],
    [0.0000123, '0.00123 %'],
    [1, '100 %'],
  ])('shows %d as %s', (share, text) => {
    expect(plain(formatShare(share))).toBe(text);
  });
});

describe('formatSpan', () => {
  it('names the unit once', () => {
    expect(plain(formatSpan(1.2e-6, 3.1e-6, 'current'))).toBe('1.2 to 3.1 µA');
  });

  it('uses the prefix of the upper value for both', () => {
    expect(plain(formatSpan(200e-9, 3.1e-6, 'current'))).toBe('0.2 to 3.1 µA');
  });

  it('shows one value when both read the same', () => {
    expect(plain(formatSpan(2, 2, 'resistance'))).toBe('2 Ω');
  });

  it('shows a lower value of zero in the unit of the upper', () => {
    expect(plain(formatSpan(0, 3.1e-6, 'current'))).toBe('0 to 3.1 µA');
  });
});
