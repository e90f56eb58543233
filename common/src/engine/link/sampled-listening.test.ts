import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { phyPresets } from './phy.table.ts';
import { sampledListening, sampledSender, synchronisedWindow } from './sampled-listening.ts';

const PHY = phyPresets['oqpsk-2450'];
const PHASE = { elapsedS: 60, tolerancePpmA: 20, tolerancePpmB: 20 };

describe('sampledListening', () => {
  test('counts the period in units of ten MAC symbols', () => {
    expect(sampledListening(PHY, { periodUnits: 3125, sampleS: 1e-3 })).toEqual({
      periodS: 0.5,
      dutyCycle: 0.002,
      wakeUpSequenceS: 0.5,
    });
  });

  test('counts it in 20 µs symbols on SUN FSK at every rate', () => {
    expect(sampledListening(phyPresets['sun-fsk-150'], { periodUnits: 500, sampleS: 1e-3 }).periodS).toBeCloseTo(
      0.1,
      12,
    );
  });

  test('throws for a sample longer than the period', () => {
    const error = errorOf(OutOfRangeError, () => sampledListening(PHY, { periodUnits: 1, sampleS: 1e-3 }));
    expect(error.field).toBe('sampleS');
  });

  test.each([0, 65_536, 1.5])('throws for a period of %d units', (periodUnits) => {
    expect(errorOf(OutOfRangeError, () => sampledListening(PHY, { periodUnits, sampleS: 0 })).field).toBe(
      'periodUnits',
    );
  });
});

describe('sampledSender', () => {
  test('covers a whole period and one wake-up frame more where the phase is unknown', () => {
    const { wakeUpFrames, wakeUpFrameS, wakeUpSequenceS, frameS, transmitS } = sampledSender(PHY, {
      periodUnits: 3125,
      psduOctets: 33,
      phase: null,
    });
    expect(wakeUpFrameS).toBeCloseTo(18 * 32e-6, 12);
    // 0.5 s / 576 µs = 868.06
    expect(wakeUpFrames).toBe(870);
    expect(wakeUpSequenceS).toBeCloseTo(870 * 576e-6, 12);
    expect(transmitS).toBe(wakeUpSequenceS + frameS);
  });

  test('covers the drift where the phase is known', () => {
    // 2 · 40 ppm · 60 s = 4.8 ms: 8.3 wake-up frames
    expect(sampledSender(PHY, { periodUnits: 3125, psduOctets: 33, phase: PHASE }).wakeUpFrames).toBe(10);
  });

  test('never sends longer synchronised than not, nor less after a longer time', () => {
    const elapsed = fc.double({ min: 0, max: 1e6, noNaN: true });
    fc.assert(
      fc.property(elapsed, elapsed, (a, b) => {
        const at = (elapsedS: number | null) =>
          sampledSender(PHY, {
            periodUnits: 3125,
            psduOctets: 33,
            phase: elapsedS === null ? null : { ...PHASE, elapsedS },
          }).wakeUpFrames;
        expect(at(Math.min(a, b))).toBeLessThanOrEqual(at(Math.max(a, b)));
        expect(at(Math.max(a, b))).toBeLessThanOrEqual(at(null));
      }),
    );
  });
});

describe('synchronisedWindow', () => {
  const WINDOW = { periodS: 0.5, ...PHASE, uncertaintyS: 40e-6, headerS: 192e-6, leadS: 320e-6, afterS: 0 };

  test('opens by drift, uncertainty, header and lead early', () => {
    const { aheadS, afterS } = synchronisedWindow(WINDOW);
    expect(aheadS).toBeCloseTo(2952e-6, 12);
    expect(afterS).toBeCloseTo(2440e-6, 12);
  });

  test('never takes more than half a period on either side', () => {
    expect(synchronisedWindow({ ...WINDOW, elapsedS: 1e5 })).toEqual({ aheadS: 0.25, afterS: 0.25, windowS: 0.5 });
  });

  test('throws for a negative lead', () => {
    expect(errorOf(OutOfRangeError, () => synchronisedWindow({ ...WINDOW, leadS: -1 })).field).toBe('leadS');
  });
});
