import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { meanOf, seededRandom } from '#test/support/seeded-random.ts';
import { chirpAirtimeS } from './chirp-airtime.ts';
import { chirpWindows, windowOpenS } from './chirp-windows.ts';

const WINDOWS = [
  { delayS: 1, openS: 0.03 },
  { delayS: 2, openS: 0.1 },
];

describe('chirpWindows', () => {
  test('idles until each window and listens in both where nothing is heard', () => {
    const { windows, meanS, worstS } = chirpWindows({ uplinkS: 0.06, windows: WINDOWS, heardProbability: 0 });
    expect(windows.map(({ listenS, receiveS }) => [listenS, receiveS])).toEqual([
      [0.03, 0],
      [0.1, 0],
    ]);
    expect(windows[0]?.idleS).toBe(1);
    expect(windows[1]?.idleS).toBeCloseTo(0.97, 12);
    expect(meanS).toBeCloseTo(2.16, 12);
    expect(worstS).toBeCloseTo(2.16, 12);
  });

  test('opens no second window where the first always hears a frame', () => {
    const { windows, meanS, worstS } = chirpWindows({
      uplinkS: 0.06,
      windows: WINDOWS,
      heardProbability: 1,
      heardS: 0.2,
    });
    expect(windows[1]).toMatchObject({ idleS: 0, listenS: 0, receiveS: 0 });
    expect(meanS).toBeCloseTo(1.26, 12);
    expect(worstS).toBeCloseTo(2.26, 12);
  });

  test('takes no longer than the uplink without windows', () => {
    expect(chirpWindows({ uplinkS: 0.06, windows: [], heardProbability: 0.1 })).toEqual({
      windows: [],
      meanS: 0.06,
      worstS: 0.06,
    });
  });

  test('agrees with uplinks played one by one', () => {
    const [heardProbability, heardS] = [0.3, 0.2];
    const random = seededRandom(3);
    const played = Array.from({ length: 20_000 }, () => {
      if (random() < heardProbability) return 0.06 + 1 + heardS;
      return 0.06 + 2 + (random() < heardProbability ? heardS : 0.1);
    });
    const { mean, standardError } = meanOf(played);
    const { meanS } = chirpWindows({ uplinkS: 0.06, windows: WINDOWS, heardProbability, heardS });
    expect(Math.abs(meanS - mean)).toBeLessThan(3 * standardError);
  });

  test('has a mean within the longest for any probability', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1, noNaN: true }), (heardProbability) => {
        const { meanS, worstS } = chirpWindows({ uplinkS: 0.06, windows: WINDOWS, heardProbability, heardS: 0.2 });
        expect(meanS).toBeLessThanOrEqual(worstS);
      }),
    );
  });

  test('throws for a window that opens before the one before it has closed', () => {
    const windows = [
      { delayS: 1, openS: 0.03 },
      { delayS: 1.02, openS: 0.1 },
    ];
    const error = errorOf(InconsistentInputError, () => chirpWindows({ uplinkS: 0.06, windows, heardProbability: 0 }));
    expect(error).toMatchObject({ code: 'windows-overlap', field: 'receiveWindows[1].delayS' });
  });

  test('throws for a probability above 1', () => {
    const error = errorOf(OutOfRangeError, () => chirpWindows({ uplinkS: 0, windows: [], heardProbability: 2 }));
    expect(error.field).toBe('heardProbability');
  });
});

describe('windowOpenS', () => {
  test('is a number of symbols, each 2^SF over the bandwidth', () => {
    expect(windowOpenS(12, 125_000, 5)).toBeCloseTo(0.16384, 12);
  });
});

describe('chirpAirtimeS', () => {
  test('never shrinks with more octets', () => {
    const octets = fc.integer({ min: 0, max: 255 });
    fc.assert(
      fc.property(octets, octets, fc.integer({ min: 7, max: 12 }), (a, b, spreadingFactor) => {
        const at = (payloadOctets: number) =>
          chirpAirtimeS({
            spreadingFactor,
            payloadOctets,
            bandwidthHz: 125_000,
            codingRate: 1,
            preambleSymbols: 8,
            implicitHeader: false,
            crc: true,
            lowDataRateOptimisation: false,
          });
        expect(at(Math.min(a, b))).toBeLessThanOrEqual(at(Math.max(a, b)));
      }),
    );
  });
});
