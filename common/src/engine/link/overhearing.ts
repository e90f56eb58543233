import { requireNumber } from './checks.ts';
import { frameAirtimeS, type FrameAirtimeOptions } from './frame-airtime.ts';
import { phyConstant } from './phy-constant.ts';
import type { Phy } from './phy.types.ts';

/** A frame that is meant for another node. */
export interface OverhearInput extends FrameAirtimeOptions {
  psduOctets: number;
  /** Octets of the MAC header up to the addresses, after which the receiver stops; null: the frame is received whole. */
  stopsAfterOctets: number | null;
}

/**
 * Time that an overheard frame keeps the receiver: the whole frame, or preamble to the end of its MAC header.
 *
 * Source: definition; that a receiver which filters addresses stops at the end of the MAC header: common practice, no source.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Octets, whole; a header longer than the frame counts as the frame.
 * @returns Receiver on, and the frame's airtime, s.
 * @throws OutOfRangeError code `out-of-range` for octets outside their range.
 * @throws InconsistentInputError what `frameAirtimeS` throws.
 * @example overhear(phyPresets['oqpsk-2450'], { psduOctets: 127, stopsAfterOctets: 9 }).receiveS // 0.00048
 */
export function overhear(phy: Phy, input: OverhearInput): { receiveS: number; airtimeS: number } {
  const { psduOctets, stopsAfterOctets } = input;
  const airtimeS = frameAirtimeS(phy, psduOctets, input);
  if (stopsAfterOctets === null) return { receiveS: airtimeS, airtimeS };
  requireNumber(stopsAfterOctets, { field: 'stopsAfterOctets', min: 0, whole: true, unit: 'octets' });
  return { receiveS: frameAirtimeS(phy, Math.min(stopsAfterOctets, psduOctets), input), airtimeS };
}

/** A frame that is received, for oneself or to be forwarded. */
export interface ReceptionInput extends FrameAirtimeOptions {
  psduOctets: number;
  /** Null: the frame is not acknowledged. */
  ackPsduOctets: number | null;
  /** Probability that the frame is lost, 0 to 1: then it is received and not acknowledged. */
  frameErrorRate: number;
  /** Receiver on before the frame begins, s; default 0. */
  listenS?: number;
}

/** Times of a reception, s. */
export interface ReceptionTimes {
  listenS: number;
  receiveS: number;
  turnaroundS: number;
  /** Acknowledgement. */
  transmitS: number;
  durationS: number;
}

/**
 * Times of receiving a frame: listening before it, the frame, and after one that is not lost the turnaround and the
 * acknowledgement. A forwarded frame is this and then an acknowledged exchange of one's own.
 *
 * Source: IEEE 802.15.4-2006 7.5.6.4.2 as coded in ns-3 src/lr-wpan/model/lr-wpan-mac.cc @1406464: the acknowledgement starts
 * aTurnaroundTime after the frame.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Octets, whole; probability 0 to 1; listening, s.
 * @returns Means, and the longest: the frame that is not lost, s.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @throws InconsistentInputError code `constant-unknown` when the PHY gives no turnaround and the frame is acknowledged.
 * @example receptionOf(phyPresets['oqpsk-2450'], { psduOctets: 33, ackPsduOctets: 5, frameErrorRate: 0 }).mean.durationS // 0.001792
 */
export function receptionOf(phy: Phy, input: ReceptionInput): { mean: ReceptionTimes; worst: ReceptionTimes } {
  const { psduOctets, ackPsduOctets, frameErrorRate, listenS = 0 } = input;
  requireNumber(frameErrorRate, { field: 'frameErrorRate', min: 0, max: 1 });
  requireNumber(listenS, { field: 'listenS', min: 0, unit: 's' });
  const frameS = frameAirtimeS(phy, psduOctets, input);
  const ackS = ackPsduOctets === null ? 0 : frameAirtimeS(phy, ackPsduOctets, input);
  const turnS = ackPsduOctets === null ? 0 : phyConstant(phy, 'turnaroundS');
  const at = (answered: number): ReceptionTimes => ({
    listenS,
    receiveS: frameS,
    turnaroundS: answered * turnS,
    transmitS: answered * ackS,
    durationS: listenS + frameS + answered * (turnS + ackS),
  });
  return { mean: at(1 - frameErrorRate), worst: at(1) };
}
