import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { guardWindow, longestResynchronisationS } from './guard-window.ts';

const ppm = fc.double({ min: 0, max: 1_000, noNaN: true });
const timeS = fc.double({ min: 0, max: 100_000, noNaN: true });
const jitterS = fc.double({ min: 0, max: 0.01, noNaN: true });

describe('guardWindow', () => {
  test('adds up both tolerances over the interval, and the jitter', () => {
    const { halfS, windowS } = guardWindow({ intervalS: 300, tolerancePpmA: 50, tolerancePpmB: 20, jitterS: 100e-6 });
    expect(halfS).toBeCloseTo(21.1e-3, 12);
    expect(windowS).toBeCloseTo(42.2e-3, 12);
  });

  test('never narrows with a longer interval, a worse clock or more jitter', () => {
    const inputs = fc.record({ intervalS: timeS, tolerancePpmA: ppm, tolerancePpmB: ppm, jitterS });
    const names = fc.constantFrom('intervalS', 'tolerancePpmA', 'tolerancePpmB', 'jitterS');
    fc.assert(
      fc.property(inputs, names, timeS, (input, name, more) => {
        const wider = guardWindow({ ...input, [name]: input[name] + more });
        expect(wider.halfS).toBeGreaterThanOrEqual(guardWindow(input).halfS);
      }),
    );
  });

  test.each(['intervalS', 'tolerancePpmA', 'tolerancePpmB', 'jitterS'])('throws for a negative %s', (field) => {
    const error = errorOf(OutOfRangeError, () =>
      guardWindow({ intervalS: 1, tolerancePpmA: 1, tolerancePpmB: 1, jitterS: 0, [field]: -1 }),
    );
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});

describe('longestResynchronisationS', () => {
  test('is the interval whose guard is the one given', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.02, max: 1, noNaN: true }), jitterS, (guardS, jitter) => {
        const clocks = { tolerancePpmA: 40, tolerancePpmB: 10, jitterS: jitter };
        const intervalS = longestResynchronisationS({ ...clocks, guardS }) ?? NaN;
        expect(guardWindow({ ...clocks, intervalS }).halfS).toBeCloseTo(guardS, 9);
      }),
    );
  });

  test('is null between exact clocks', () => {
    expect(longestResynchronisationS({ guardS: 0.001, tolerancePpmA: 0, tolerancePpmB: 0 })).toBeNull();
  });

  test('is 0 where the jitter takes the whole guard', () => {
    expect(longestResynchronisationS({ guardS: 1e-3, tolerancePpmA: 1, tolerancePpmB: 1, jitterS: 2e-3 })).toBe(0);
  });
});
