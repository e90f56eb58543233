import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { acknowledgedExchange, unacknowledgedExchange } from './acknowledged-exchange.ts';
import type { AcknowledgedExchangeInput } from './acknowledged-exchange.ts';
import type { AcknowledgedExchange } from './exchange-over-access.ts';
import { phyPresets } from './phy.table.ts';

const oqpsk = phyPresets['oqpsk-2450'];
const clean: AcknowledgedExchangeInput = { psduOctets: 127, busyProbability: 0, frameErrorRate: 0, ackErrorRate: 0 };
const rounding = 1 + 1e-9;

const probability = fc.double({ min: 0, max: 1, noNaN: true });
const arbitraryInput = fc.record({
  psduOctets: fc.integer({ min: 5, max: 127 }),
  busyProbability: probability,
  frameErrorRate: probability,
  ackErrorRate: probability,
  macMaxFrameRetries: fc.integer({ min: 0, max: 15 }),
  macMaxCSMABackoffs: fc.integer({ min: 0, max: 5 }),
});

describe('acknowledgedExchange', () => {
  test('takes 6240 µs for the longest frame on a clean channel, part by part', () => {
    const exchange = acknowledgedExchange(oqpsk, clean);
    const { backoffS, assessmentS, turnaroundS, transmitS, acknowledgementWaitS, acknowledgementS } = exchange;
    const parts = [backoffS, assessmentS, turnaroundS, transmitS, acknowledgementWaitS, acknowledgementS];
    expect(parts.map((partS) => Math.round(partS * 1e9) / 1e3)).toEqual([1120, 128, 192, 4256, 192, 352]);
    expect(exchange.meanDurationS).toBeCloseTo(6240e-6, 12);
    expect(exchange.ifAcknowledged.meanDurationS).toBeCloseTo(6240e-6, 12);
  });

  test('is acknowledged with certainty after one transmission on a clean channel, exactly', () => {
    expect(acknowledgedExchange(oqpsk, clean)).toMatchObject({
      meanAccessAttempts: 1,
      meanTransmissions: 1,
      acknowledgedProbability: 1,
      accessFailureProbability: 0,
      noAckProbability: 0,
      receivedProbability: 1,
      meanDuplicates: 0,
      ifReceived: { meanDuplicates: 0 },
    });
  });

  test('sends nothing on a channel that is always busy, exactly', () => {
    expect(acknowledgedExchange(oqpsk, { ...clean, busyProbability: 1 })).toMatchObject({
      meanAccessAttempts: 1,
      meanTransmissions: 0,
      accessFailureProbability: 1,
      receivedProbability: 0,
      transmitS: 0,
      ackListenS: 0,
    });
  });

  test('sends each frame and all retries when no frame arrives, exactly', () => {
    expect(acknowledgedExchange(oqpsk, { ...clean, frameErrorRate: 1, macMaxFrameRetries: 7 })).toMatchObject({
      meanTransmissions: 8,
      noAckProbability: 1,
      receivedProbability: 0,
      acknowledgementS: 0,
    });
  });

  test('leaves three duplicates at the receiver when each of four acknowledgements is missed', () => {
    const exchange = acknowledgedExchange(oqpsk, { ...clean, ackErrorRate: 1 });
    expect(exchange).toMatchObject({ receivedProbability: 1, noAckProbability: 1, meanDuplicates: 3 });
    expect(exchange.ifReceived.meanDuplicates).toBe(3);
  });

  test('counts four longest attempts at the worst', () => {
    const { worstCaseS } = acknowledgedExchange(oqpsk, { ...clean, busyProbability: 0.5 });
    expect(worstCaseS).toBeCloseTo(4 * (37_440e-6 + 192e-6 + 4256e-6 + 864e-6), 12);
  });

  test('adds the space after the acknowledgement only when asked to', () => {
    const withSpace = acknowledgedExchange(oqpsk, { ...clean, includeInterframeSpace: true });
    expect(withSpace.meanDurationS).toBeCloseTo(6880e-6, 12);
  });

  test('ends in one of three ways, with probabilities that add up to 1', () => {
    fc.assert(
      fc.property(arbitraryInput, (input) => {
        const exchange = acknowledgedExchange(oqpsk, input);
        const { acknowledgedProbability, accessFailureProbability, noAckProbability } = exchange;
        expect(acknowledgedProbability + accessFailureProbability + noAckProbability).toBeCloseTo(1, 12);
        expect(exchange.receivedProbability).toBeGreaterThanOrEqual(acknowledgedProbability / rounding);
      }),
    );
  });

  test('delivers no less often with one retry more', () => {
    fc.assert(
      fc.property(arbitraryInput, (input) => {
        const fewer = acknowledgedExchange(oqpsk, input);
        const more = acknowledgedExchange(oqpsk, { ...input, macMaxFrameRetries: input.macMaxFrameRetries + 1 });
        expect(more.receivedProbability).toBeGreaterThanOrEqual(fewer.receivedProbability / rounding);
        expect(more.acknowledgedProbability).toBeGreaterThanOrEqual(fewer.acknowledgedProbability / rounding);
      }),
    );
  });

  test('never takes longer in the mean than at the worst, as a whole and in each part', () => {
    fc.assert(
      fc.property(arbitraryInput, fc.boolean(), (input, includeInterframeSpace) => {
        const exchange = acknowledgedExchange(oqpsk, { ...input, includeInterframeSpace });
        expect(exchange.meanDurationS).toBeLessThanOrEqual(exchange.worstCaseS * rounding);
        expect(exchange.ifAcknowledged.meanDurationS).toBeLessThanOrEqual(exchange.worstCaseS * rounding);
        for (const part of partNames) {
          expect(exchange[part], part).toBeLessThanOrEqual(exchange.worst[part] * rounding);
        }
      }),
    );
  });

  test.each(['frameErrorRate', 'ackErrorRate'] as const)(
    'takes no less time in any state the higher the %s',
    (rate) => {
      fc.assert(
        fc.property(arbitraryInput, probability, (input, share) => {
          const less = acknowledgedExchange(oqpsk, input);
          const more = acknowledgedExchange(oqpsk, { ...input, [rate]: input[rate] + (1 - input[rate]) * share });
          for (const part of [
            'transmitS',
            'assessmentS',
            'backoffS',
            'turnaroundS',
            'ackListenS',
            'meanDurationS',
          ] as const) {
            expect(more[part], part).toBeGreaterThanOrEqual(less[part] / rounding);
          }
        }),
      );
    },
  );

  test('draws no less charge the more is lost, while receiving takes at most half as much again as listening', () => {
    const currentA = fc.double({ min: 0, max: 0.05, noNaN: true });
    const currents = fc.record({
      transmitA: currentA,
      listenA: currentA,
      receiveShare: fc.double({ min: 0, max: 1.5, noNaN: true }),
      backoffA: currentA,
      turnaroundA: currentA,
    });
    fc.assert(
      fc.property(arbitraryInput, currents, probability, (input, currentsA, share) => {
        const chargeC = (exchange: AcknowledgedExchange): number =>
          exchange.transmitS * currentsA.transmitA +
          (exchange.assessmentS + exchange.acknowledgementWaitS) * currentsA.listenA +
          exchange.acknowledgementS * currentsA.listenA * currentsA.receiveShare +
          exchange.backoffS * currentsA.backoffA +
          exchange.turnaroundS * currentsA.turnaroundA;
        const more = { ...input, frameErrorRate: input.frameErrorRate + (1 - input.frameErrorRate) * share };
        const lessC = chargeC(acknowledgedExchange(oqpsk, input));
        expect(chargeC(acknowledgedExchange(oqpsk, more))).toBeGreaterThanOrEqual(lessC / rounding);
      }),
    );
  });

  test.each([
    [{ frameErrorRate: -0.1 }, 'frameErrorRate'],
    [{ ackErrorRate: 1.1 }, 'ackErrorRate'],
    [{ macMaxFrameRetries: 1.5 }, 'macMaxFrameRetries'],
    [{ psduOctets: 128 }, 'psduOctets'],
    [{ ackPsduOctets: 128 }, 'ackPsduOctets'],
    [{ ackWaitS: -1 }, 'ackWaitS'],
  ])('throws for %o', (wrong, field) => {
    const error = errorOf(OutOfRangeError, () => acknowledgedExchange(oqpsk, { ...clean, ...wrong }));
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });

  test('throws and names the acknowledgement wait of SUN FSK, which no source gives, unless it is supplied', () => {
    const sun = phyPresets['sun-fsk-50'];
    const error = errorOf(InconsistentInputError, () => acknowledgedExchange(sun, clean));
    expect(error).toMatchObject({ code: 'constant-unknown', field: 'ackWaitS' });
    expect(acknowledgedExchange(sun, { ...clean, ackWaitS: 0.01 }).transmitS).toBe(0.0216);
  });
});

describe('unacknowledgedExchange', () => {
  const once = { psduOctets: 127, busyProbability: 0, frameErrorRate: 0.1 };

  test('takes 5696 µs for the longest frame on an idle channel', () => {
    const exchange = unacknowledgedExchange(oqpsk, once);
    expect(exchange.meanDurationS).toBeCloseTo(5696e-6, 12);
    expect(exchange).toMatchObject({ receivedProbability: 0.9, accessFailureProbability: 0, ackListenS: 0 });
  });

  test('ends with the access failure on a channel that is always busy', () => {
    const exchange = unacknowledgedExchange(oqpsk, { ...once, busyProbability: 1, includeInterframeSpace: true });
    expect(exchange).toMatchObject({ receivedProbability: 0, accessFailureProbability: 1, transmitS: 0 });
    expect(exchange.meanDurationS).toBeCloseTo(57.5 * 320e-6 + 5 * 128e-6, 12);
  });

  test('agrees with an acknowledged exchange that is never repeated up to the end of the frame', () => {
    fc.assert(
      fc.property(arbitraryInput, (input) => {
        const alone = unacknowledgedExchange(oqpsk, input);
        const withoutRetry = acknowledgedExchange(oqpsk, { ...input, macMaxFrameRetries: 0 });
        expect(alone.receivedProbability).toBeCloseTo(withoutRetry.receivedProbability, 12);
        expect(alone.meanDurationS).toBeCloseTo(withoutRetry.meanDurationS - withoutRetry.ackListenS, 12);
        expect(alone.meanDurationS).toBeLessThanOrEqual(alone.worstCaseS * rounding);
        expect(alone.ifSent.meanDurationS).toBeLessThanOrEqual(alone.worstCaseS * rounding);
      }),
    );
  });

  test('throws for a loss above 1', () => {
    const error = errorOf(OutOfRangeError, () => unacknowledgedExchange(oqpsk, { ...once, frameErrorRate: 2 }));
    expect(error).toMatchObject({ code: 'out-of-range', field: 'frameErrorRate' });
  });
});

const partNames = [
  'transmitS',
  'assessmentS',
  'backoffS',
  'turnaroundS',
  'ackListenS',
  'acknowledgementWaitS',
  'acknowledgementS',
  'retuneS',
  'interframeSpaceS',
] as const;
