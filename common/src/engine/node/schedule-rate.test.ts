import { describe, expect, test } from 'vitest';
import { cyclesPerDay, exactCyclesPerDay, isOnAt, isOnInMonth, monthsOn } from './schedule-rate.ts';

describe('cyclesPerDay', () => {
  test('is a day over the period', () => {
    expect(cyclesPerDay({ kind: 'every', periodS: 900 }, 1)).toBe(96);
  });

  test('is the mean rate of random events', () => {
    expect(cyclesPerDay({ kind: 'random', meanPerDay: 140, busiestPerDay: 400 }, 1)).toBe(140);
  });

  test('is none a day for once', () => {
    expect(cyclesPerDay({ kind: 'once', afterS: 10 }, 1)).toBe(0);
  });

  test('is back to back for always, and none for a cycle without length', () => {
    expect(cyclesPerDay({ kind: 'always' }, 0.5)).toBe(172_800);
    expect(cyclesPerDay({ kind: 'always' }, 0)).toBe(0);
  });

  test.each([
    [8, 18, 3_600, 10],
    [8, 18, 3_599, 11],
    [8, 18, 40_000, 1],
    [22, 6, 3_600, 8],
    [6.1, 7.3, 60, 72],
    [0, 24, 900, 96],
    [5, 5, 900, 0],
  ])('counts a window from %s h to %s h every %s s as %s cycles', (fromHour, toHour, periodS, cycles) => {
    expect(cyclesPerDay({ kind: 'window', fromHour, toHour, periodS }, 1)).toBe(cycles);
  });

  test('agrees with its decimal form', () => {
    expect(exactCyclesPerDay({ kind: 'every', periodS: 0.1 }, 1).toFixed()).toBe('864000');
    expect(exactCyclesPerDay({ kind: 'always' }, 0.3).toFixed()).toBe('288000');
  });
});

describe('isOnAt', () => {
  test('leaves no gap and no overlap between below and above the same temperature', () => {
    const on = (temperatureC: number) => [isOnAt({ belowC: 2 }, temperatureC), isOnAt({ aboveC: 2 }, temperatureC)];
    expect([on(1.9), on(2), on(2.1)]).toEqual([
      [true, false],
      [false, true],
      [false, true],
    ]);
  });

  test('is always on without a condition', () => {
    expect(isOnAt(undefined, -40)).toBe(true);
  });
});

describe('monthsOn and isOnInMonth', () => {
  test('count a month once and all twelve without a condition', () => {
    expect([monthsOn({ months: [1, 2, 2] }), monthsOn({ belowC: 2 }), monthsOn(undefined)]).toEqual([2, 12, 12]);
    expect([isOnInMonth({ months: [11] }, 11), isOnInMonth({ months: [11] }, 1), isOnInMonth(undefined, 1)]).toEqual([
      true,
      false,
      true,
    ]);
  });
});
