import { InconsistentInputError } from '#common/errors.ts';
import { requireNumber } from './checks.ts';
import { frameAirtimeS, type FrameAirtimeOptions } from './frame-airtime.ts';
import { guardWindow } from './guard-window.ts';
import type { Phy } from './phy.types.ts';

/** aBaseSlotDuration, symbols, and aNumSuperframeSlots. */
const BASE_SLOT_SYMBOLS = 60;
const SLOTS = 16;
/** aBaseSuperframeDuration, symbols of the MAC. */
export const BASE_SUPERFRAME_SYMBOLS = BASE_SLOT_SYMBOLS * SLOTS;
const MAX_ORDER = 14;
/** Beacons missed in a row after which a device has lost its coordinator (aMaxLostBeacons). */
const MAX_LOST_BEACONS = 4;

/** Orders of a beacon-enabled superframe, whole, 0 to 14. */
export interface SuperframeInput {
  beaconOrder: number;
  /** At most the beacon order. */
  superframeOrder: number;
}

/** Times of a beacon-enabled superframe. */
export interface Superframe {
  beaconIntervalS: number;
  /** Active part. */
  superframeDurationS: number;
  /** One of the 16 slots of the active part. */
  slotS: number;
  /** Active share. */
  dutyCycle: number;
}

/**
 * Times of a beacon-enabled superframe: beacon interval `960 · 2^BO`, active part `960 · 2^SO`, slot `60 · 2^SO` MAC symbols.
 *
 * Source: Zephyr include/zephyr/net/ieee802154_radio.h @045e3a8 (cites IEEE 802.15.4-2020); openDSME mac_services/pib
 * @f9b26a7 (cites 802.15.4-2015 Tables 8-80, 8-81).
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Orders, `0 ≤ superframeOrder ≤ beaconOrder ≤ 14`.
 * @returns Times, s, and the active share.
 * @throws OutOfRangeError code `out-of-range` for an order outside 0 to 14.
 * @throws InconsistentInputError code `superframe-too-long` when the active part exceeds the interval.
 * @example superframe(phyPresets['oqpsk-2450'], { beaconOrder: 0, superframeOrder: 0 }).beaconIntervalS // 0.01536
 */
export function superframe(phy: Phy, { beaconOrder, superframeOrder }: SuperframeInput): Superframe {
  requireNumber(beaconOrder, { field: 'beaconOrder', min: 0, max: MAX_ORDER, whole: true });
  requireNumber(superframeOrder, { field: 'superframeOrder', min: 0, max: MAX_ORDER, whole: true });
  if (superframeOrder > beaconOrder) {
    throw new InconsistentInputError(
      `The superframe order is ${superframeOrder}, the beacon order ${beaconOrder}; the active part cannot exceed the interval.`,
      {
        code: 'superframe-too-long',
        field: 'superframeOrder',
        value: superframeOrder,
        expected: `0 to ${beaconOrder}`,
        relatedFields: ['beaconOrder'],
      },
    );
  }
  const slotS = BASE_SLOT_SYMBOLS * 2 ** superframeOrder * phy.macSymbolS;
  return {
    beaconIntervalS: BASE_SUPERFRAME_SYMBOLS * 2 ** beaconOrder * phy.macSymbolS,
    superframeDurationS: SLOTS * slotS,
    slotS,
    dutyCycle: 2 ** (superframeOrder - beaconOrder),
  };
}

/** A device that wakes for each beacon. */
export interface BeaconTrackingInput extends SuperframeInput, FrameAirtimeOptions {
  beaconPsduOctets: number;
  /** Both clocks, ± ppm. */
  tolerancePpmA: number;
  tolerancePpmB: number;
  /** Default 0. */
  jitterS?: number;
  /** Probability that a beacon is not heard, each on its own; 0 to 1. */
  missedBeaconProbability: number;
  /** Time that the receiver stays on after a heard beacon, s; default 0. */
  contentionS?: number;
}

/** Times of one beacon interval, and what missed beacons cost. */
export interface BeaconTracking {
  beaconIntervalS: number;
  /** Airtime of the beacon, s. */
  beaconS: number;
  /** Guard on one side while no beacon was missed before, s. */
  guardHalfS: number;
  /** Receiver on without a beacon on the air, mean over missed and heard beacons, s. */
  listenS: number;
  /** Beacon received, mean, s. */
  receiveS: number;
  /** Receiver on after the beacon, mean: not after a missed one, which leaves the contention period unknown, s. */
  contentionS: number;
  /** Longest listening for one beacon: the one that is missed as fourth in a row, s. */
  worstListenS: number;
  worstReceiveS: number;
  worstContentionS: number;
  /** Longest time that the receiver stays on: such a beacon heard at the very end of its window, and the contention period. */
  worstDurationS: number;
  /** Listening that a first missed beacon costs in place of guard and beacon: the whole window, s. */
  missedBeaconS: number;
  /** Probability per beacon that it is the fourth missed in a row, after which the coordinator counts as lost. */
  lostProbability: number;
}

/**
 * Beacon tracking of one interval. The receiver opens one guard early. A heard beacon comes on average in the middle of the
 * window: one guard of listening, then the beacon. A missed beacon costs the whole window, two guards and the beacon's
 * airtime. The guard grows with the intervals since the last beacon heard: after k missed ones `(k + 1)` intervals of drift;
 * `P(k) = m^k / (1 + m + m² + m³)`. After four in a row the coordinator counts as lost: what a scan then costs is not in here.
 *
 * Source: aMaxLostBeacons 4 from ns-3 src/lr-wpan/model/lr-wpan-constants.h @1406464 (other stacks use 2); that the receiver
 * waits the whole window, and that misses are independent: common practice, no source.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Orders, beacon, octets, tolerances, ± ppm, probability 0 to 1, times, s.
 * @returns Times of one interval, s.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @throws InconsistentInputError code `contention-too-long` when beacon and contention exceed the active part, and what
 *   `superframe` and `frameAirtimeS` throw.
 * @example beaconTracking(phyPresets['oqpsk-2450'], { beaconOrder: 6, superframeOrder: 0, beaconPsduOctets: 13,
 *   tolerancePpmA: 40, tolerancePpmB: 40, missedBeaconProbability: 0.02 }).beaconS // 0.000608
 */
export function beaconTracking(phy: Phy, input: BeaconTrackingInput): BeaconTracking {
  const { beaconPsduOctets, missedBeaconProbability: missed, contentionS = 0 } = input;
  requireNumber(missed, { field: 'missedBeaconProbability', min: 0, max: 1 });
  requireNumber(contentionS, { field: 'contentionS', min: 0, unit: 's' });
  const { beaconIntervalS, superframeDurationS } = superframe(phy, input);
  const beaconS = frameAirtimeS(phy, beaconPsduOctets, input);
  requireContention(contentionS, superframeDurationS - beaconS);
  const halves = Array.from({ length: MAX_LOST_BEACONS }, (_, before) => guardHalfS(input, beaconIntervalS, before));
  const weights = halves.map((_, before) => missed ** before);
  const sum = weights.reduce((total, weight) => total + weight, 0);
  const listenS = halves.reduce((total, halfS, before) => {
    const ifMissedS = 2 * halfS + beaconS;
    return total + ((weights[before] ?? 0) / sum) * ((1 - missed) * halfS + missed * ifMissedS);
  }, 0);
  const [firstHalfS = 0] = halves;
  const lastHalfS = halves.at(-1) ?? 0;
  return {
    beaconIntervalS,
    beaconS,
    guardHalfS: firstHalfS,
    listenS,
    receiveS: (1 - missed) * beaconS,
    contentionS: (1 - missed) * contentionS,
    worstListenS: 2 * lastHalfS + beaconS,
    worstReceiveS: beaconS,
    worstContentionS: contentionS,
    worstDurationS: 2 * lastHalfS + beaconS + contentionS,
    missedBeaconS: 2 * firstHalfS + beaconS,
    lostProbability: missed ** MAX_LOST_BEACONS / sum,
  };
}

function guardHalfS(input: BeaconTrackingInput, beaconIntervalS: number, missedBefore: number): number {
  const { tolerancePpmA, tolerancePpmB, jitterS = 0 } = input;
  return guardWindow({ intervalS: (missedBefore + 1) * beaconIntervalS, tolerancePpmA, tolerancePpmB, jitterS }).halfS;
}

function requireContention(contentionS: number, roomS: number): void {
  if (contentionS <= roomS) return;
  const longestS = Math.max(0, roomS);
  throw new InconsistentInputError(
    `The receiver is to stay on for ${contentionS} s after the beacon; the active part leaves ${longestS} s.`,
    {
      code: 'contention-too-long',
      field: 'contentionS',
      value: contentionS,
      unit: 's',
      expected: `at most ${longestS} s`,
      relatedFields: ['superframeOrder'],
    },
  );
}
