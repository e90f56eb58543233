import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { phyPresets } from './phy.table.ts';
import { poll } from './poll.ts';
import type { PollInput } from './poll.ts';

const oqpsk = phyPresets['oqpsk-2450'];
const empty: PollInput = { dataRequestOctets: 12, framePending: false, busyProbability: 0 };
const pending: PollInput = { ...empty, framePending: true, responsePsduOctets: 50, responseDelayS: 2e-3 };

const us = (seconds: number): number => Math.round(seconds * 1e9) / 1e3;

describe('poll', () => {
  test('takes 2560 µs when no data are pending, of which 576 sending and 672 listening', () => {
    const { durationS, transmitS, listenS, missedProbability } = poll(oqpsk, empty);
    expect([durationS, transmitS, listenS].map(us)).toEqual([2560, 576, 672]);
    expect(missedProbability).toBe(0);
  });

  test('adds delay, response, turnaround and acknowledgement when data are pending', () => {
    const answered = poll(oqpsk, pending);
    const { responseWaitS, responseS, responseTurnaroundS, responseAckS } = answered;
    expect([responseWaitS, responseS, responseTurnaroundS, responseAckS].map(us)).toEqual([2000, 1792, 192, 352]);
    expect(us(answered.durationS)).toBe(2560 + 2000 + 1792 + 192 + 352);
    expect(answered.responseProbability).toBe(1);
  });

  test('waits in vain for the longest frame wait when nothing comes', () => {
    const inVain = poll(oqpsk, { ...empty, framePending: true });
    expect(us(inVain.listenS)).toBe(672 + 31_776);
    expect(inVain).toMatchObject({ missedProbability: 1, responseProbability: 0, responseAckS: 0 });
  });

  test('waits as long as it is told when every response is missed', () => {
    const inVain = poll(oqpsk, { ...pending, waitS: 0.1, responseErrorRate: 1 });
    expect(us(inVain.listenS)).toBe(672 + 100_000);
  });

  test('takes the mean access of the parent as the delay that is not given', () => {
    expect(us(poll(oqpsk, { ...pending, responseDelayS: undefined }).responseWaitS)).toBe(1440);
  });

  test('waits for nothing when no data request gets through', () => {
    expect(poll(oqpsk, { ...pending, frameErrorRate: 1 })).toMatchObject({ responseWaitS: 0, responseProbability: 0 });
  });

  test('never takes longer in the mean than at the worst', () => {
    const probability = fc.double({ min: 0, max: 1, noNaN: true });
    const losses = fc.record({
      busyProbability: probability,
      frameErrorRate: probability,
      ackErrorRate: probability,
      responseErrorRate: probability,
      framePending: fc.boolean(),
    });
    fc.assert(
      fc.property(losses, (loss) => {
        const { durationS, worstCaseS, responseWaitS, worst } = poll(oqpsk, { ...pending, ...loss });
        expect(durationS).toBeLessThanOrEqual(worstCaseS * (1 + 1e-9));
        expect(responseWaitS).toBeLessThanOrEqual(worst.responseWaitS * (1 + 1e-9));
      }),
    );
  });

  test('throws when the response begins after the wait for it is over', () => {
    const error = errorOf(InconsistentInputError, () => poll(oqpsk, { ...pending, waitS: 1e-3 }));
    expect(error).toMatchObject({ code: 'response-too-late', field: 'responseDelayS', relatedFields: ['waitS'] });
  });

  test.each([
    [{ dataRequestOctets: 128 }, 'dataRequestOctets'],
    [{ responsePsduOctets: 128 }, 'responsePsduOctets'],
    [{ responseDelayS: -1 }, 'responseDelayS'],
    [{ waitS: -1 }, 'waitS'],
    [{ responseErrorRate: 2 }, 'responseErrorRate'],
  ])('throws for %o', (wrong, field) => {
    const error = errorOf(OutOfRangeError, () => poll(oqpsk, { ...pending, ...wrong }));
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});
