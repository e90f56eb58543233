import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { dutyCycleBands } from './duty-cycle-bands.table.ts';
import { dutyCycleBandOf, dutyCycleCaution, dutyCycleLimit } from './duty-cycle-limit.ts';

describe('dutyCycleLimit', () => {
  test('gives budget, frames, shortest period and silence', () => {
    const limit = dutyCycleLimit({ airtimeS: 0.061696, dutyCycle: 0.01, observationS: 3600 });
    expect(limit).toMatchObject({ budgetS: 36, frames: 583 });
    expect(limit.shortestPeriodS).toBeCloseTo(6.1696, 12);
    expect(limit.silenceS).toBeCloseTo(6.107904, 12);
  });

  test('holds a whole number of frames in spite of rounding', () => {
    expect(dutyCycleLimit({ airtimeS: 0.1, dutyCycle: 0.001, observationS: 300 }).frames).toBe(3);
  });

  test('never holds more frames that are longer, nor frames beyond its budget', () => {
    const airtime = fc.double({ min: 1e-3, max: 10, noNaN: true });
    fc.assert(
      fc.property(airtime, airtime, (a, b) => {
        const at = (airtimeS: number) => dutyCycleLimit({ airtimeS, dutyCycle: 0.01, observationS: 3600 });
        const longer = Math.max(a, b);
        expect(at(longer).frames).toBeLessThanOrEqual(at(Math.min(a, b)).frames);
        expect(at(longer).frames * longer).toBeLessThanOrEqual(36 * (1 + 1e-9));
      }),
    );
  });

  test.each([
    ['airtimeS', 0],
    ['dutyCycle', 0],
    ['dutyCycle', 1.1],
    ['observationS', -1],
  ])('throws for %s of %d', (field, value) => {
    const input = { airtimeS: 1, dutyCycle: 0.1, observationS: 1, [field]: value };
    expect(errorOf(OutOfRangeError, () => dutyCycleLimit(input)).field).toBe(field);
  });
});

describe('dutyCycleBands', () => {
  test('lie apart from each other in the order of frequency, each with its regulation', () => {
    dutyCycleBands.forEach((band, index) => {
      expect(band.fromHz).toBeLessThan(band.toHz);
      expect(band.fromHz).toBeGreaterThanOrEqual(dutyCycleBands[index - 1]?.toHz ?? 0);
      expect(band.regulation).toContain('EN 300 220-2');
    });
  });
});

describe('dutyCycleCaution', () => {
  test('is none at the limit', () => {
    expect(dutyCycleCaution('eu-863-865', 3.6)).toBeNull();
  });

  test('names band, limit and regulation beyond it', () => {
    const caution = dutyCycleCaution('eu-863-865', 4);
    expect(caution).toMatchObject({ code: 'duty-cycle-exceeded', field: 'link.dutyCycleBand' });
    expect(caution?.message).toContain('863 to 865 MHz (band K) allows 0.1 %, 3.6 s (ETSI EN 300 220-2 V3.2.1)');
  });

  test('finds each band by its id', () => {
    expect(dutyCycleBands.map(({ id }) => dutyCycleBandOf(id).id)).toEqual(dutyCycleBands.map(({ id }) => id));
  });
});
