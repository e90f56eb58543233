import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { bitErrorRate, frameLoss, SENSITIVITY_SINR_DB, steppedLevelDbm } from './bit-error.ts';
import { phyPresets } from './phy.table.ts';

const oqpsk = phyPresets['oqpsk-2450'];
const SENSITIVITY_DBM = -95;
const lossAt = (receivedLevelDbm: number, psduOctets = 20): number =>
  frameLoss(oqpsk, { psduOctets, receivedLevelDbm, sensitivityDbm: SENSITIVITY_DBM }).frameErrorRate;

describe('bitErrorRate', () => {
  test('is one half without a signal', () => {
    expect(bitErrorRate(0)).toBeCloseTo(0.5, 12);
  });

  test('is the first term alone where the signal is strong', () => {
    expect(bitErrorRate(10) / (((8 / 15) * 120 * Math.exp(-100)) / 16)).toBeCloseTo(1, 9);
  });

  test('never rises with the signal, from one hundredth of a decibel to the next', () => {
    const rates = Array.from({ length: 8001 }, (_, step) => bitErrorRate(10 ** ((step / 100 - 50) / 10)));
    expect(rates.filter((rate, step) => rate > (rates[step - 1] ?? 0.5))).toEqual([]);
  });

  test('throws for a negative ratio', () => {
    expect(errorOf(OutOfRangeError, () => bitErrorRate(-1))).toMatchObject({ code: 'out-of-range', field: 'sinr' });
  });
});

describe('frameLoss', () => {
  test('loses 1 % of frames with a PSDU of 20 octets at the sensitivity', () => {
    expect(lossAt(SENSITIVITY_DBM)).toBeCloseTo(0.01, 10);
  });

  test('stands the sensitivity about half a decibel above the noise, and takes noise that is given instead', () => {
    expect(SENSITIVITY_SINR_DB).toBeCloseTo(0.5087, 4);
    const input = { psduOctets: 20, receivedLevelDbm: -90, sensitivityDbm: SENSITIVITY_DBM };
    expect(frameLoss(oqpsk, input).noiseDbm).toBeCloseTo(-95.5087, 4);
    expect(frameLoss(oqpsk, { ...input, noiseDbm: -91 })).toMatchObject({ noiseDbm: -91, sinrDb: 1 });
  });

  test('loses each bit on the air independently, SHR and PHR counted', () => {
    const { bitErrorRate: rate, frameErrorRate } = frameLoss(oqpsk, {
      psduOctets: 127,
      receivedLevelDbm: -95,
      noiseDbm: -95,
    });
    expect(frameErrorRate).toBeCloseTo(1 - (1 - rate) ** (8 * 133), 12);
  });

  test('tells losses far below the rounding of numbers next to 1', () => {
    expect(lossAt(-87)).toBeGreaterThan(0);
    expect(lossAt(-87)).toBeLessThan(1e-16);
  });

  test('loses no more at a higher level, and no less with more octets', () => {
    const level = fc.double({ min: -110, max: -60, noNaN: true });
    fc.assert(
      fc.property(level, fc.double({ min: 0, max: 40, noNaN: true }), fc.nat({ max: 126 }), (dbm, moreDb, octets) => {
        expect(lossAt(dbm + moreDb, octets)).toBeLessThanOrEqual(lossAt(dbm, octets));
        expect(lossAt(dbm, octets + 1)).toBeGreaterThanOrEqual(lossAt(dbm, octets));
      }),
    );
  });

  test('counts the level rounded down to the steps of the receiver', () => {
    const stepped = frameLoss(oqpsk, {
      psduOctets: 20,
      receivedLevelDbm: -94,
      receivedLevelStepDb: 3,
      sensitivityDbm: SENSITIVITY_DBM,
    });
    expect(stepped.levelDbm).toBe(-96);
    expect(stepped.frameErrorRate).toBe(lossAt(-96));
  });

  test('throws without noise and sensitivity', () => {
    const error = errorOf(InconsistentInputError, () => frameLoss(oqpsk, { psduOctets: 20, receivedLevelDbm: -90 }));
    expect(error).toMatchObject({ code: 'noise-missing', field: 'noiseDbm', relatedFields: ['sensitivityDbm'] });
  });

  test('throws for a PHY without a formula', () => {
    const input = { psduOctets: 20, receivedLevelDbm: -90, noiseDbm: -95 };
    const error = errorOf(InconsistentInputError, () => frameLoss(phyPresets['bpsk-868'], input));
    expect(error).toMatchObject({ code: 'no-bit-error-formula', field: 'phy', value: 'bpsk-868' });
  });

  test.each([
    [{ psduOctets: 128 }, 'psduOctets'],
    [{ receivedLevelDbm: Number.NEGATIVE_INFINITY }, 'receivedLevelDbm'],
    [{ receivedLevelStepDb: 0 }, 'receivedLevelStepDb'],
    [{ noiseDbm: Number.NaN }, 'noiseDbm'],
  ])('throws for %o', (wrong, field) => {
    const input = { psduOctets: 20, receivedLevelDbm: -90, noiseDbm: -95 };
    const error = errorOf(OutOfRangeError, () => frameLoss(oqpsk, { ...input, ...wrong }));
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});

describe('steppedLevelDbm', () => {
  test.each([
    [-85, 3, -87],
    [-87, 3, -87],
    [-85, undefined, -85],
    [-0.3, 0.1, -0.3],
  ])('tells %d dBm in steps of %s dB as %d dBm', (levelDbm, stepDb, expected) => {
    expect(steppedLevelDbm(levelDbm, stepDb)).toBeCloseTo(expected, 12);
  });
});
