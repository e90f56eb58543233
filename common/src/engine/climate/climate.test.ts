import { describe, expect, test } from 'vitest';
import { dekadsOfYear, winterStartMonth, wintersPassed } from '#common/engine/index.ts';
import { winterOfLife } from './winters.ts';

/** Month m has a mean of m °C and an amplitude of m/2 K, January being 0. */
const months = Array.from({ length: 12 }, (_, month) => ({ meanC: month, amplitudeK: month / 2 }));
const northern = [-3, -4, 0, 5, 10, 15, 18, 17, 12, 7, 2, -2].map((meanC) => ({ meanC, amplitudeK: 0 }));

describe('dekadsOfYear', () => {
  const dekads = dekadsOfYear({ months });

  test('36 dekads, three a month; the middle one has the values of mid-month', () => {
    expect(dekads).toHaveLength(36);
    expect(dekads[16]).toMatchObject({
      dekadOfYear: 16,
      month: 6,
      meanC: 5,
      amplitudeK: 2.5,
      coldestC: 2.5,
      hottestC: 7.5,
    });
  });

  test('between mid-months temperatures vary linearly', () => {
    expect(dekads[17]?.meanC).toBeCloseTo(5 + 1 / 3, 9);
    expect(dekads[18]?.meanC).toBeCloseTo(5 + 2 / 3, 9);
  });

  test('round the turn of the year', () => {
    expect(dekads[35]?.meanC).toBeCloseTo(11 - 11 / 3, 9);
    expect(dekads[0]?.meanC).toBeCloseTo(11 - 22 / 3, 9);
  });

  test('extremes apply in the middle dekad of their month, and only where they are extreme', () => {
    const extremes = { coldest: { temperatureC: -30, month: 1 }, hottest: { temperatureC: 45, month: 8 } };
    const changed = dekadsOfYear({ months, extremes });
    expect(changed.filter(({ coldestC }) => coldestC === -30).map(({ dekadOfYear }) => dekadOfYear)).toEqual([1]);
    expect(changed.filter(({ hottestC }) => hottestC === 45).map(({ dekadOfYear }) => dekadOfYear)).toEqual([22]);
    const mild = dekadsOfYear({ months, extremes: { coldest: { temperatureC: 9, month: 6 } } });
    expect(mild[16]?.coldestC).toBe(2.5);
  });
});

describe('winters', () => {
  test('winterStartMonth: the three coldest months, also over the turn of the year', () => {
    expect(winterStartMonth(northern)).toBe(12);
    expect(winterStartMonth(northern.map(({ meanC }) => ({ meanC: -meanC, amplitudeK: 0 })))).toBe(6);
    expect(winterStartMonth(months.map(() => ({ meanC: 8, amplitudeK: 0 })))).toBe(1);
  });

  test('wintersPassed: a winter counts when its last dekad has passed', () => {
    // Life from the first dekad of March, winter from December to February: 36 dekads.
    expect([0, 35, 36, 71, 72].map((lived) => wintersPassed(6, lived, 12))).toEqual([0, 0, 1, 1, 2]);
  });

  test('wintersPassed: a winter that life begins in counts when it ends', () => {
    expect([5, 6, 42].map((lived) => wintersPassed(0, lived, 12))).toEqual([0, 1, 2]);
  });

  test('winterOfLife: changes at midsummer, and begins with the first winter', () => {
    // Life from May: the summer before the first winter counts to it.
    expect([0, 20, 28, 40, 45].map((dekad) => winterOfLife(12, dekad, 12))).toEqual([1, 1, 1, 1, 2]);
    // Life from January: the first winter is the one that has begun.
    expect([0, 5, 19, 20, 36].map((dekad) => winterOfLife(0, dekad, 12))).toEqual([1, 1, 1, 2, 2]);
  });
});
