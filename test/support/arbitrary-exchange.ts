/** Exchange steps for tests: one of every pattern with its variants, and random ones with random link settings. */
import fc from 'fast-check';
import type { ExchangeDuration, ExchangePattern, LinkSettings } from '#common/engine/scenario/scenario.types.ts';

/** One of every pattern that fits the 2450 MHz O-QPSK PHY, and its variants. */
export const everyPattern: readonly ExchangePattern[] = [
  { pattern: 'frame', payloadOctets: 24 },
  { pattern: 'acknowledged', payloadOctets: 24 },
  { pattern: 'unacknowledged', psduOctets: 40 },
  { pattern: 'listen-before-talk', payloadOctets: 24, channels: 3, retuneS: 0.0002 },
  { pattern: 'poll', pendingProbability: { typical: 0 } },
  { pattern: 'poll', pendingProbability: { typical: 0.2 } },
  { pattern: 'poll', dataRequestOctets: 18, pendingProbability: { typical: 0.2 }, responsePsduOctets: 50 },
  { pattern: 'beacon', beaconOrder: 6, superframeOrder: 4, beaconPsduOctets: 20, contentionS: 0.01 },
  { pattern: 'slot', slotUse: 'transmit', psduOctets: 60 },
  { pattern: 'slot', slotUse: 'transmit', psduOctets: 60, shared: true },
  { pattern: 'slot', slotUse: 'receive', psduOctets: 60 },
  { pattern: 'slot', slotUse: 'idle-listen' },
  { pattern: 'sampled-listener', periodUnits: 3125, sampleS: 0.001 },
  { pattern: 'sampled-sender', periodUnits: 3125, psduOctets: 40 },
  { pattern: 'sampled-sender', periodUnits: 3125, psduOctets: 40, synchronised: true },
  { pattern: 'guard', intervalS: 60, jitterS: 0.0001 },
  { pattern: 'guard', intervalS: 60, psduOctets: 30 },
  { pattern: 'chirp', spreadingFactor: 9, bandwidthHz: 125_000, codingRate: 1, payloadOctets: 24 },
  {
    pattern: 'chirp',
    spreadingFactor: 7,
    bandwidthHz: 125_000,
    codingRate: 1,
    payloadOctets: 24,
    receiveWindows: [
      { delayS: 1, openS: 0.03 },
      { delayS: 2, openS: 0.05 },
    ],
  },
  { pattern: 'advertising', advertisingPhy: '1M', dataOctets: 20, channels: 3 },
  { pattern: 'advertising', advertisingPhy: 'coded-s8', dataOctets: 20, channels: 3, scanResponse: true },
  { pattern: 'receive', payloadOctets: 24, listenS: 0.002 },
  { pattern: 'forward', payloadOctets: 24 },
  { pattern: 'overhear', payloadOctets: 24 },
  { pattern: 'overhear', payloadOctets: 24, stopsAfterHeader: true },
  { pattern: 'scan', channels: 3, scanDuration: 2, retuneS: 0.0002 },
];

const share = (maxPercent: number): fc.Arbitrary<number> =>
  fc.integer({ min: 0, max: maxPercent }).map((percent) => percent / 100);

/** Link settings of the 2450 MHz O-QPSK PHY; each figure may be left to the defaults. */
export const arbitraryLink: fc.Arbitrary<LinkSettings> = fc
  .record({
    busy: fc.option(share(100), { nil: undefined }),
    frameLoss: fc.option(share(100), { nil: undefined }),
    ackLoss: fc.option(share(100), { nil: undefined }),
    macMaxFrameRetries: fc.option(fc.integer({ min: 0, max: 7 }), { nil: undefined }),
    macMaxCSMABackoffs: fc.option(fc.integer({ min: 0, max: 5 }), { nil: undefined }),
    includeInterframeSpace: fc.boolean(),
    backoffIn: fc.constantFrom<LinkSettings['backoffIn']>('idle', 'sleep'),
    startUpUs: fc.option(fc.integer({ min: 0, max: 2000 }), { nil: undefined }),
  })
  .map(({ busy, frameLoss, ackLoss, startUpUs, ...others }): LinkSettings => ({
    phy: 'oqpsk-2450',
    ...others,
    ...(busy === undefined ? {} : { busyProbability: { typical: busy } }),
    ...(frameLoss === undefined ? {} : { frameErrorRate: { typical: frameLoss } }),
    ...(ackLoss === undefined ? {} : { ackErrorRate: { typical: ackLoss } }),
    ...(startUpUs === undefined ? {} : { crystal: { startUpS: startUpUs / 1e6 } }),
  }));

/** A random exchange with link settings of its own. */
export const arbitraryExchange: fc.Arbitrary<ExchangeDuration> = fc
  .record({ pattern: fc.constantFrom(...everyPattern), link: arbitraryLink })
  .map(({ pattern, link }): ExchangeDuration => ({ kind: 'exchange', ...pattern, link }));
