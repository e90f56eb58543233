import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { acknowledgedExchange } from './acknowledged-exchange.ts';
import { listenBeforeTalk } from './listen-before-talk.ts';
import type { ListenBeforeTalkInput } from './listen-before-talk.ts';
import { phyPresets } from './phy.table.ts';

const oqpsk = phyPresets['oqpsk-2450'];
const RETUNE_S = 200e-6;
const clean: ListenBeforeTalkInput = {
  psduOctets: 40,
  busyProbability: 0,
  frameErrorRate: 0,
  ackErrorRate: 0,
  channels: 3,
  retuneS: RETUNE_S,
};

describe('listenBeforeTalk', () => {
  test('assesses one channel once when all are idle, exactly', () => {
    const exchange = listenBeforeTalk(oqpsk, clean);
    expect(exchange).toMatchObject({ meanChannels: 1, retuneS: 0, backoffS: 0, assessmentS: 128e-6 });
    expect(exchange.meanAccessS).toBeCloseTo(320e-6, 12);
  });

  test('goes through the whole list and sends nothing when all channels are busy, exactly', () => {
    const exchange = listenBeforeTalk(oqpsk, { ...clean, busyProbability: 1 });
    expect(exchange).toMatchObject({ accessFailureProbability: 1, meanChannels: 3, transmitS: 0 });
    expect(exchange.retuneS).toBeCloseTo(2 * RETUNE_S, 12);
    expect(exchange.assessmentS).toBeCloseTo(3 * 128e-6, 12);
  });

  test('fails only when every channel is busy', () => {
    const { accessFailureProbability } = listenBeforeTalk(oqpsk, { ...clean, busyProbability: 0.2 });
    expect(accessFailureProbability).toBeCloseTo(0.008, 12);
  });

  test('is an acknowledged exchange on a list of one channel with backoff', () => {
    const busy = { ...clean, busyProbability: 0.4, frameErrorRate: 0.2, ackErrorRate: 0.1 };
    const alone = listenBeforeTalk(oqpsk, { ...busy, channels: 1, perChannel: 'backoff' });
    const { meanDurationS, worstCaseS, acknowledgedProbability, ifAcknowledged } = acknowledgedExchange(oqpsk, busy);
    expect(alone.meanDurationS).toBeCloseTo(meanDurationS, 12);
    expect(alone.worstCaseS).toBeCloseTo(worstCaseS, 12);
    expect(alone.acknowledgedProbability).toBeCloseTo(acknowledgedProbability, 12);
    expect(alone.ifAcknowledged.meanDurationS).toBeCloseTo(ifAcknowledged.meanDurationS, 12);
  });

  test('counts two changes of channel in each of four longest attempts at the worst', () => {
    const { worstCaseS, worst } = listenBeforeTalk(oqpsk, clean);
    expect(worst.retuneS).toBeCloseTo(8 * RETUNE_S, 12);
    expect(worstCaseS).toBeCloseTo(4 * (3 * 128e-6 + 2 * RETUNE_S + 192e-6 + 46 * 32e-6 + 864e-6), 12);
  });

  test('fails no more often with one channel more, and never takes longer in the mean than at the worst', () => {
    const probability = fc.double({ min: 0, max: 1, noNaN: true });
    const input = fc.record({
      busyProbability: probability,
      frameErrorRate: probability,
      ackErrorRate: probability,
      channels: fc.integer({ min: 1, max: 16 }),
      perChannel: fc.constantFrom('assessment' as const, 'backoff' as const),
    });
    fc.assert(
      fc.property(input, (differs) => {
        const fewer = listenBeforeTalk(oqpsk, { ...clean, ...differs });
        const more = listenBeforeTalk(oqpsk, { ...clean, ...differs, channels: differs.channels + 1 });
        expect(more.acknowledgedProbability).toBeGreaterThanOrEqual(fewer.acknowledgedProbability / (1 + 1e-9));
        expect(fewer.meanDurationS).toBeLessThanOrEqual(fewer.worstCaseS * (1 + 1e-9));
      }),
    );
  });

  test.each([
    [{ channels: 0 }, 'channels'],
    [{ channels: 1.5 }, 'channels'],
    [{ retuneS: -1 }, 'retuneS'],
    [{ busyProbability: 2 }, 'busyProbability'],
  ])('throws for %o', (wrong, field) => {
    const error = errorOf(OutOfRangeError, () => listenBeforeTalk(oqpsk, { ...clean, ...wrong }));
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});
