import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { playBeacons } from '#test/support/link-simulation-beacon.ts';
import { meanOf } from '#test/support/seeded-random.ts';
import { phyPresets } from './phy.table.ts';
import { beaconTracking, superframe, type BeaconTrackingInput } from './superframe.ts';

const PHY = phyPresets['oqpsk-2450'];
const TRACKING: BeaconTrackingInput = {
  beaconOrder: 6,
  superframeOrder: 2,
  beaconPsduOctets: 13,
  tolerancePpmA: 40,
  tolerancePpmB: 40,
  jitterS: 50e-6,
  missedBeaconProbability: 0.02,
};

describe('superframe', () => {
  test('doubles interval and active part with each order', () => {
    const times = superframe(PHY, { beaconOrder: 6, superframeOrder: 2 });
    expect(times.beaconIntervalS).toBeCloseTo(0.98304, 12);
    expect(times.superframeDurationS).toBeCloseTo(0.06144, 12);
    expect(times.slotS).toBeCloseTo(0.00384, 12);
    expect(times.dutyCycle).toBe(1 / 16);
  });

  test('throws when the active part exceeds the interval', () => {
    const error = errorOf(InconsistentInputError, () => superframe(PHY, { beaconOrder: 3, superframeOrder: 4 }));
    expect(error).toMatchObject({ code: 'superframe-too-long', field: 'superframeOrder', expected: '0 to 3' });
  });

  test.each(['beaconOrder', 'superframeOrder'])('throws for a %s of 15', (field) => {
    const orders = { beaconOrder: 14, superframeOrder: 0, [field]: 15 };
    expect(errorOf(OutOfRangeError, () => superframe(PHY, orders)).field).toBe(field);
  });
});

describe('beaconTracking', () => {
  test('listens one guard and receives the beacon where none is missed', () => {
    const tracking = beaconTracking(PHY, { ...TRACKING, missedBeaconProbability: 0 });
    const halfS = 80e-6 * 0.98304 + 50e-6;
    expect(tracking.listenS).toBeCloseTo(halfS, 12);
    expect(tracking.receiveS).toBeCloseTo(19 * 32e-6, 12);
    expect(tracking.lostProbability).toBe(0);
  });

  test('waits the whole window for a missed beacon', () => {
    const { missedBeaconS, guardHalfS, beaconS } = beaconTracking(PHY, TRACKING);
    expect(missedBeaconS).toBe(2 * guardHalfS + beaconS);
  });

  test('waits at worst the window of four intervals of drift', () => {
    const { worstListenS, beaconS } = beaconTracking(PHY, TRACKING);
    expect(worstListenS).toBeCloseTo(2 * (80e-6 * 4 * 0.98304 + 50e-6) + beaconS, 12);
  });

  test('receives nothing and stays off afterwards where every beacon is missed', () => {
    const tracking = beaconTracking(PHY, { ...TRACKING, missedBeaconProbability: 1, contentionS: 0.01 });
    expect(tracking).toMatchObject({ receiveS: 0, contentionS: 0, worstContentionS: 0.01, lostProbability: 0.25 });
  });

  test.each([0.02, 0.3, 0.7])('agrees with beacons played one by one at a miss probability of %d', (missed) => {
    const tracking = beaconTracking(PHY, { ...TRACKING, missedBeaconProbability: missed });
    const guardHalfS = (before: number) => 80e-6 * (before + 1) * 0.98304 + 50e-6;
    const played = playBeacons({ beacons: 100_000, seed: 7, missed, guardHalfS, beaconS: tracking.beaconS });
    const near = (samples: number[], value: number) => {
      const { mean, standardError } = meanOf(samples);
      expect(Math.abs(mean - value)).toBeLessThan(3 * standardError + 1e-9);
    };
    near(
      played.map(({ listenS }) => listenS),
      tracking.listenS,
    );
    near(
      played.map(({ receiveS }) => receiveS),
      tracking.receiveS,
    );
    // At 2 % the fourth miss in a row comes up too rarely to be played.
    if (missed > 0.1) {
      near(
        played.map(({ isLost }) => (isLost ? 1 : 0)),
        tracking.lostProbability,
      );
    }
  });

  test('means stay within the longest, and listening grows with the miss probability', () => {
    const probability = fc.double({ min: 0, max: 1, noNaN: true });
    fc.assert(
      fc.property(probability, probability, (a, b) => {
        const at = (missedBeaconProbability: number) => beaconTracking(PHY, { ...TRACKING, missedBeaconProbability });
        const [low, high] = [at(Math.min(a, b)), at(Math.max(a, b))];
        expect(low.listenS).toBeLessThanOrEqual(high.listenS * (1 + 1e-12));
        expect(high.listenS).toBeLessThanOrEqual(high.worstListenS);
        expect(high.receiveS).toBeLessThanOrEqual(high.worstReceiveS);
      }),
    );
  });

  test('throws for a contention period that the active part does not hold', () => {
    const error = errorOf(InconsistentInputError, () => beaconTracking(PHY, { ...TRACKING, contentionS: 0.0615 }));
    expect(error).toMatchObject({ code: 'contention-too-long', field: 'contentionS' });
  });
});
