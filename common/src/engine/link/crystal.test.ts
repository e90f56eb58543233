import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { crystalCaution, crystalTolerance, phyLimitPpm } from './crystal.ts';

const PULLING = {
  motionalCapacitanceF: 3e-15,
  shuntCapacitanceF: 1e-12,
  loadCapacitanceF: 9e-12,
  mountedCapacitanceF: 9e-12,
};

describe('crystalTolerance', () => {
  test('adds make, temperature and ageing', () => {
    expect(crystalTolerance({ tolerancePpm: 10, temperaturePpm: 15, ageingPpm: 3 }).totalPpm).toBe(28);
  });

  test('runs fast under a load that is too small', () => {
    const { pullingPpm, totalPpm } = crystalTolerance({ pulling: { ...PULLING, mountedCapacitanceF: 7e-12 } });
    // 1.5 fF · (1/8 pF − 1/10 pF)
    expect(pullingPpm).toBeCloseTo(37.5, 9);
    expect(totalPpm).toBeCloseTo(37.5, 9);
  });

  test('runs slow under a load that is too large, and counts that by its size', () => {
    const { pullingPpm, totalPpm } = crystalTolerance({ pulling: { ...PULLING, mountedCapacitanceF: 14e-12 } });
    expect(pullingPpm).toBeCloseTo(-50, 9);
    expect(totalPpm).toBeCloseTo(50, 9);
  });

  test('is not pulled by the load that the crystal was made for', () => {
    expect(crystalTolerance({ pulling: PULLING }).pullingPpm).toBe(0);
  });

  test('never runs faster with more load', () => {
    const load = fc.double({ min: 1e-12, max: 40e-12, noNaN: true });
    fc.assert(
      fc.property(load, load, (a, b) => {
        const pulled = (mountedCapacitanceF: number) =>
          crystalTolerance({ pulling: { ...PULLING, mountedCapacitanceF } }).pullingPpm;
        expect(pulled(Math.max(a, b))).toBeLessThanOrEqual(pulled(Math.min(a, b)));
      }),
    );
  });

  test('names the terms that are not given', () => {
    expect(crystalTolerance({ tolerancePpm: 10 }).notGiven).toEqual(['temperaturePpm', 'ageingPpm', 'pulling']);
  });

  test.each(['motionalCapacitanceF', 'loadCapacitanceF', 'mountedCapacitanceF'])('throws for a %s of 0', (name) => {
    const error = errorOf(OutOfRangeError, () => crystalTolerance({ pulling: { ...PULLING, [name]: 0 } }));
    expect(error).toMatchObject({ code: 'out-of-range', field: `crystal.pulling.${name}` });
  });
});

describe('crystalCaution', () => {
  test('is none at the limit of 40 ppm', () => {
    expect(crystalCaution(40, 'oqpsk-2450')).toBeNull();
  });

  test('says how far a crystal is beyond the limit', () => {
    const caution = crystalCaution(52, 'oqpsk-2450');
    expect(caution).toMatchObject({ code: 'crystal-beyond-phy', field: 'link.crystal' });
    expect(caution?.message).toContain('52 ppm');
    expect(caution?.message).toContain('±40 ppm');
  });

  test('is none for a PHY whose limit no source gives', () => {
    expect(phyLimitPpm('sun-fsk-50')).toBeNull();
    expect(crystalCaution(500, 'sun-fsk-50')).toBeNull();
  });
});
