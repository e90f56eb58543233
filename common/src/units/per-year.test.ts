import { describe, expect, it } from 'vitest';
import { perDayOf, perYearOf } from './per-year.ts';

describe('perYearOf', () => {
  it('counts a year of 365.25 days', () => {
    expect(perYearOf(2)).toBe(730.5);
  });

  it('undoes perDayOf', () => {
    expect(perYearOf(perDayOf(7))).toBeCloseTo(7, 12);
  });
});
