import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { playSharedSlots } from '#test/support/link-simulation-shared-slots.ts';
import { meanOf } from '#test/support/seeded-random.ts';
import { sharedSlots } from './shared-slots.ts';

const CLEAN = { collisionProbability: 0, frameErrorRate: 0, ackErrorRate: 0 };

describe('sharedSlots', () => {
  test('sends once and lets no slot pass where nothing is lost', () => {
    expect(sharedSlots(CLEAN)).toMatchObject({
      meanTransmissions: 1,
      meanSkippedSlots: 0,
      acknowledgedProbability: 1,
      receivedProbability: 1,
    });
  });

  test('lets 3, 7 and 15 slots pass at worst before its three retries', () => {
    expect(sharedSlots(CLEAN)).toMatchObject({ worstTransmissions: 4, worstSkippedSlots: 3 + 7 + 15 });
  });

  test('uses every transmission where all collide, and is never received', () => {
    expect(sharedSlots({ ...CLEAN, collisionProbability: 1 })).toMatchObject({
      meanTransmissions: 4,
      meanSkippedSlots: 12.5,
      receivedProbability: 0,
      acknowledgedProbability: 0,
    });
  });

  test('agrees with frames played one by one', () => {
    const setup = { collision: 0.3, frameLoss: 0.1, ackLoss: 0.05, minBE: 1, maxBE: 3, retries: 5 };
    const played = playSharedSlots({ frames: 50_000, seed: 11, ...setup });
    const closed = sharedSlots({
      collisionProbability: setup.collision,
      frameErrorRate: setup.frameLoss,
      ackErrorRate: setup.ackLoss,
      macMinBE: setup.minBE,
      macMaxBE: setup.maxBE,
      macMaxFrameRetries: setup.retries,
    });
    const near = (samples: number[], value: number) => {
      const { mean, standardError } = meanOf(samples);
      expect(Math.abs(mean - value)).toBeLessThan(3 * standardError);
    };
    near(
      played.map(({ transmissions }) => transmissions),
      closed.meanTransmissions,
    );
    near(
      played.map(({ skippedSlots }) => skippedSlots),
      closed.meanSkippedSlots,
    );
    near(
      played.map(({ isAcknowledged }) => (isAcknowledged ? 1 : 0)),
      closed.acknowledgedProbability,
    );
    near(
      played.map(({ isReceived }) => (isReceived ? 1 : 0)),
      closed.receivedProbability,
    );
  });

  test('throws for a largest exponent below the smallest', () => {
    const error = errorOf(OutOfRangeError, () => sharedSlots({ ...CLEAN, macMinBE: 4, macMaxBE: 3 }));
    expect(error.field).toBe('macMaxBE');
  });
});
