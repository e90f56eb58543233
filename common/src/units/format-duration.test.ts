import { describe, expect, it } from 'vitest';
import { formatDuration, formatLifeRange, formatLifeYears, monthName } from './format-duration.ts';
import { NO_BREAK_SPACE } from './format-quantity.ts';
import { DAY_S, HOUR_S, MONTH_S, YEAR_S } from './si.ts';

const plain = (text: string): string => text.replaceAll(NO_BREAK_SPACE, ' ');

describe('formatDuration', () => {
  it.each([
    [0, '0 s'],
    [0.000192, '192 µs'],
    [0.014, '14 ms'],
    [0.5, '500 ms'],
    [30, '30 s'],
    [900, '15 min'],
    [90, '1.5 min'],
    [6 * HOUR_S, '6 h'],
    [DAY_S, '1 day'],
    [41 * DAY_S, '41 days'],
    [YEAR_S, '1 year'],
    [6.2 * YEAR_S, '6.2 years'],
    [Infinity, '—'],
  ])('shows %d s as %s', (durationS, text) => {
    expect(plain(formatDuration(durationS))).toBe(text);
  });
});

describe('formatLifeYears', () => {
  it.each([
    [6.2 * YEAR_S, '6.2 years'],
    [2 * YEAR_S, '2.0 years'],
    [18 * MONTH_S, '18 months'],
    [41 * DAY_S, '41 days'],
    [26 * HOUR_S, '26 hours'],
    [HOUR_S, '1 hour'],
    [0, '0 hours'],
  ])('shows %d s as %s', (lifeS, text) => {
    expect(plain(formatLifeYears(lifeS))).toBe(text);
  });

  it('shows half years only on request', () => {
    expect(plain(formatLifeYears(6.2 * YEAR_S, { toHalfYears: true }))).toBe('6.0 years');
  });
});

describe('formatLifeRange', () => {
  it('names the unit once when both have the same', () => {
    expect(plain(formatLifeRange(4.9 * YEAR_S, 7.4 * YEAR_S))).toBe('4.9 to 7.4 years');
  });

  it('names both units when they differ', () => {
    expect(plain(formatLifeRange(20 * MONTH_S, 2.4 * YEAR_S))).toBe('20 months to 2.4 years');
  });

  it('shows one life when both read the same', () => {
    expect(plain(formatLifeRange(3 * YEAR_S, 3.01 * YEAR_S))).toBe('3.0 years');
  });
});

describe('monthName', () => {
  it('counts from 1', () => {
    expect([monthName(1), monthName(12)]).toEqual(['January', 'December']);
  });

  it.each([0, 13, 1.5])('throws for month %d', (month) => {
    expect(() => monthName(month)).toThrow('months count from 1 to 12');
  });
});
