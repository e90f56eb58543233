import { requireNumber } from './checks.ts';
import { frameAirtimeS, type FrameAirtimeOptions } from './frame-airtime.ts';
import { guardWindow } from './guard-window.ts';
import type { Phy } from './phy.types.ts';

/** Unit of macCslPeriod, symbols of the MAC. */
const PERIOD_UNIT_SYMBOLS = 10;
const MAX_PERIOD_UNITS = 65_535;
/**
 * Wake-up frame: frame control 2, destination PAN 2, short destination 2, rendezvous time in an information element 2 + 2,
 * FCS 2, octets. From memory of IEEE 802.15.4e; no source found.
 */
export const WAKE_UP_PSDU_OCTETS = 12;

/** A listener that samples the channel. */
export interface SampledListeningInput {
  /** Sampling period in units of 10 symbols (macCslPeriod), whole, 1 to 65535. */
  periodUnits: number;
  /** Receiver on at each sample, s. */
  sampleS: number;
}

/** Times of coordinated sampled listening. */
export interface SampledListening {
  periodS: number;
  /** Share of time that the listener's receiver is on. */
  dutyCycle: number;
  /** How long a sender that does not know the listener's phase has to send wake-up frames. */
  wakeUpSequenceS: number;
}

/**
 * Coordinated sampled listening from the listener's side, and the wake-up sequence that reaches it unsynchronised: as long as
 * the period, so that one sample falls into it.
 *
 * Source: IEEE 15-09-0828-00-004e (units of 10 symbols, range 0 to 65535, wake-up sequence as long as macCSLMaxPeriod);
 * OpenThread include/openthread/platform/radio.h (unit of 160 µs).
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Period in units of 10 symbols; sample, s, 0 or more and at most the period.
 * @returns Period and wake-up sequence, s; share of time.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @example sampledListening(phyPresets['oqpsk-2450'], { periodUnits: 3125, sampleS: 0.001 }).dutyCycle // 0.002
 */
export function sampledListening(phy: Phy, { periodUnits, sampleS }: SampledListeningInput): SampledListening {
  const periodS = periodOf(phy, periodUnits);
  requireNumber(sampleS, { field: 'sampleS', min: 0, max: periodS, unit: 's' });
  return { periodS, dutyCycle: sampleS / periodS, wakeUpSequenceS: periodS };
}

function periodOf(phy: Phy, periodUnits: number): number {
  requireNumber(periodUnits, { field: 'periodUnits', min: 1, max: MAX_PERIOD_UNITS, whole: true });
  return periodUnits * PERIOD_UNIT_SYMBOLS * phy.macSymbolS;
}

/** Clocks of two nodes that have heard each other before. */
export interface SharedPhase {
  /** Since the phase was last heard, s. */
  elapsedS: number;
  tolerancePpmA: number;
  tolerancePpmB: number;
  /** Default 0. */
  jitterS?: number;
}

/** A sender to a sampling listener. */
export interface SampledSenderInput extends FrameAirtimeOptions {
  periodUnits: number;
  /** The frame that follows the sequence, octets. */
  psduOctets: number;
  /** Default `WAKE_UP_PSDU_OCTETS`. */
  wakeUpPsduOctets?: number;
  /** Null: the listener's phase is not known. */
  phase: SharedPhase | null;
}

/** What a sender sends to reach a sampling listener. */
export interface SampledSender {
  wakeUpFrameS: number;
  wakeUpFrames: number;
  /** All wake-up frames back to back, s. */
  wakeUpSequenceS: number;
  /** The frame that follows, s. */
  frameS: number;
  transmitS: number;
}

/**
 * What a sender needs to reach a sampling listener: whole wake-up frames back to back over the listener's period where the
 * phase is not known, over the guard window where it is, at least one; then the frame. One more than what just covers the
 * time, so that a sample that falls into a running wake-up frame still meets a whole one.
 *
 * Source: IEEE 15-09-0828-00-004e; that the sequence covers no more than the drift once the phase is known: the same.
 * The one frame more: common practice, no source.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Period in units of 10 symbols, frames in octets, elapsed time, s, and tolerances, ± ppm, where the phase is known.
 * @returns Numbers and times, s.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @throws InconsistentInputError what `frameAirtimeS` throws.
 * @example sampledSender(phyPresets['oqpsk-2450'], { periodUnits: 3125, psduOctets: 33, phase: null }).wakeUpFrames // 870
 */
export function sampledSender(phy: Phy, input: SampledSenderInput): SampledSender {
  const { periodUnits, psduOctets, wakeUpPsduOctets = WAKE_UP_PSDU_OCTETS, phase } = input;
  const periodS = periodOf(phy, periodUnits);
  const coveredS = phase === null ? periodS : Math.min(periodS, phaseWindowS(phase));
  const wakeUpFrameS = frameAirtimeS(phy, wakeUpPsduOctets, input);
  const frameS = frameAirtimeS(phy, psduOctets, input);
  // A window that is a whole number of frames but for rounding takes no frame more.
  const wakeUpFrames = Math.ceil(coveredS / wakeUpFrameS - 1e-9) + 1;
  const wakeUpSequenceS = wakeUpFrames * wakeUpFrameS;
  return { wakeUpFrameS, wakeUpFrames, wakeUpSequenceS, frameS, transmitS: wakeUpSequenceS + frameS };
}

function phaseWindowS({ elapsedS, ...clocks }: SharedPhase): number {
  return guardWindow({ intervalS: elapsedS, ...clocks }).windowS;
}

/** A listener that knows when the other's sample falls, and how early and late it keeps its receiver on. */
export interface SynchronisedWindowInput {
  periodS: number;
  elapsedS: number;
  tolerancePpmA: number;
  tolerancePpmB: number;
  /** Uncertainty of both clocks beside their tolerance, s. */
  uncertaintyS: number;
  /** Synchronisation and PHY header ahead of the frame, s. */
  headerS: number;
  /** Lead that the radio needs to be ready, s. */
  leadS: number;
  /** Time the receiver stays on after the expected frame start, s. */
  afterS: number;
}

/**
 * Receive window of a synchronised listener around the expected start of the MAC header:
 * `ahead = min(P/2, drift + uncertainty + header + lead)`, `after = min(P/2, drift + uncertainty + after)`.
 *
 * Source: OpenThread src/core/mac/sub_mac_csl_receiver.cpp @0486979; its defaults are header 192 µs, lead 320 µs, after 5504 µs
 * (src/core/config/mac.h), platforms override the last down to 0.
 *
 * @param input Times, s, tolerances, ± ppm; all 0 or more, the period above 0.
 * @returns Time ahead and after, s, and both together.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @example synchronisedWindow({ periodS: 0.5, elapsedS: 60, tolerancePpmA: 20, tolerancePpmB: 20, uncertaintyS: 40e-6,
 *   headerS: 192e-6, leadS: 320e-6, afterS: 0 }).aheadS // 0.002952
 */
export function synchronisedWindow(input: SynchronisedWindowInput): {
  aheadS: number;
  afterS: number;
  windowS: number;
} {
  const { periodS, elapsedS, tolerancePpmA, tolerancePpmB, uncertaintyS } = input;
  requireNumber(periodS, { field: 'periodS', min: Number.MIN_VALUE, unit: 's' });
  for (const field of ['headerS', 'leadS', 'afterS'] as const)
    requireNumber(input[field], { field, min: 0, unit: 's' });
  requireNumber(uncertaintyS, { field: 'uncertaintyS', min: 0, unit: 's' });
  const { halfS } = guardWindow({ intervalS: elapsedS, tolerancePpmA, tolerancePpmB, jitterS: uncertaintyS });
  const aheadS = Math.min(periodS / 2, halfS + input.headerS + input.leadS);
  const afterS = Math.min(periodS / 2, halfS + input.afterS);
  return { aheadS, afterS, windowS: aheadS + afterS };
}
