import { accessS, csmaAccess } from './channel-access.ts';
import { requireNumber } from './checks.ts';
import type { BackoffSettings } from './csma-ca.ts';
import { exchangeOverAccess } from './exchange-over-access.ts';
import type { AcknowledgedExchange, ExchangeInput, ExchangeParts } from './exchange-over-access.ts';
import { frameAirtimeS } from './frame-airtime.ts';
import type { FrameAirtimeOptions } from './frame-airtime.ts';
import { interframeSpaceS } from './interframe-space.ts';
import { phyConstant } from './phy-constant.ts';
import type { Phy } from './phy.types.ts';

export interface AcknowledgedExchangeInput extends ExchangeInput, BackoffSettings {
  /** Probability that an assessment finds the channel busy, 0 to 1. */
  busyProbability: number;
}

/**
 * A frame sent over unslotted carrier sense, acknowledged, with retries. Time zero is the start of the first backoff.
 *
 * Formulas: `csmaCa` for the access, `exchangeOverAccess` for the rest. Means are over all outcomes and end with the
 * acknowledgement or the last wait. A PHY without an acknowledgement wait needs `ackWaitS`.
 *
 * Source: as `csmaCa` and `exchangeOverAccess`.
 * Valid for: losses and assessments independent of each other; unslotted operation.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Frames, busy channel, losses, retries, backoff settings, whether the interframe space counts.
 * @returns Means over all outcomes, times by part, probabilities, worst case.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @throws InconsistentInputError code `constant-unknown` for a constant that the PHY does not give; what `csmaCa`,
 *   `frameAirtimeS` and `interframeSpaceS` throw.
 * @example acknowledgedExchange(phyPresets['oqpsk-2450'], { psduOctets: 127, busyProbability: 0, frameErrorRate: 0, ackErrorRate: 0 }).meanDurationS // 0.00624
 */
export function acknowledgedExchange(phy: Phy, input: AcknowledgedExchangeInput): AcknowledgedExchange {
  return exchangeOverAccess(phy, csmaAccess(phy, input), input);
}

export interface UnacknowledgedExchangeInput extends BackoffSettings, FrameAirtimeOptions {
  /** PSDU of the frame, FCS counted. */
  psduOctets: number;
  /** Probability that an assessment finds the channel busy, 0 to 1. */
  busyProbability: number;
  /** Probability that the receiver does not get a frame that was sent, 0 to 1. */
  frameErrorRate: number;
  /** Whether the space after the frame counts; default false. */
  includeInterframeSpace?: boolean;
}

/** Means over all outcomes, ending with the frame or with the access failure. */
export interface UnacknowledgedExchange extends ExchangeParts {
  meanTransmissions: number;
  accessFailureProbability: number;
  receivedProbability: number;
  meanDurationS: number;
  worstCaseS: number;
  worst: ExchangeParts;
  longestBackoffS: number;
  frameS: number;
  /** Given that the frame was sent; where it cannot be, the limit. */
  ifSent: { meanDurationS: number };
}

/**
 * A frame sent once over unslotted carrier sense, without acknowledgement.
 *
 * `P(sent) = 1 − c` with access failure probability `c`; `P(received) = (1 − c)(1 − e_f)`.
 *
 * Source: as `csmaCa`.
 * Valid for: losses and assessments independent of each other; unslotted operation.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Frame, busy channel, loss, backoff settings, whether the interframe space counts.
 * @returns Means over all outcomes, times by part, probabilities, worst case.
 * @throws As `acknowledgedExchange`.
 * @example unacknowledgedExchange(phyPresets['oqpsk-2450'], { psduOctets: 127, busyProbability: 0, frameErrorRate: 0 }).meanDurationS // 0.005696
 */
export function unacknowledgedExchange(phy: Phy, input: UnacknowledgedExchangeInput): UnacknowledgedExchange {
  const { psduOctets, frameErrorRate, includeInterframeSpace = false } = input;
  requireNumber(frameErrorRate, { field: 'frameErrorRate', min: 0, max: 1 });
  const access = csmaAccess(phy, input);
  const turnaroundS = phyConstant(phy, 'turnaroundS');
  const frameS = frameAirtimeS(phy, psduOctets, input);
  const spaceS = includeInterframeSpace ? interframeSpaceS(phy, psduOctets) : 0;
  const sent = 1 - access.failureProbability;
  const afterAccessS = turnaroundS + frameS + spaceS;
  const partsOf = (parts: typeof access.mean, frames: number): ExchangeParts => ({
    ...parts,
    transmitS: frames * frameS,
    turnaroundS: frames * turnaroundS,
    ackListenS: 0,
    acknowledgementWaitS: 0,
    acknowledgementS: 0,
    interframeSpaceS: frames * spaceS,
  });
  return {
    ...partsOf(access.mean, sent),
    meanTransmissions: sent,
    accessFailureProbability: access.failureProbability,
    receivedProbability: sent * (1 - frameErrorRate),
    meanDurationS: accessS(access.mean) + sent * afterAccessS,
    worstCaseS: accessS(access.worst) + afterAccessS,
    worst: partsOf(access.worst, 1),
    longestBackoffS: access.longestBackoffS,
    frameS,
    ifSent: { meanDurationS: accessS(access.ifSuccess) + afterAccessS },
  };
}
