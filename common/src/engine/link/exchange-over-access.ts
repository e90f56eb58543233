import { meanByAttempt, powerSum } from './attempts.ts';
import { accessS } from './channel-access.ts';
import type { ChannelAccess } from './channel-access.ts';
import { requireNumber } from './checks.ts';
import { frameAirtimeS } from './frame-airtime.ts';
import type { FrameAirtimeOptions } from './frame-airtime.ts';
import { interframeSpaceS } from './interframe-space.ts';
import { phyConstant } from './phy-constant.ts';
import type { Phy } from './phy.types.ts';

/** Immediate acknowledgement: frame control 2, sequence number 1, FCS 2 octets. */
const IMMEDIATE_ACK_OCTETS = 5;

/** An exchange but for the way in which it gets the channel. */
export interface ExchangeInput extends FrameAirtimeOptions {
  /** PSDU of the frame, FCS counted. */
  psduOctets: number;
  /** PSDU of the acknowledgement, default 5. */
  ackPsduOctets?: number;
  /** Probability that the receiver does not get a frame that was sent, 0 to 1. */
  frameErrorRate: number;
  /** Probability that the sender misses the acknowledgement of a frame that arrived, 0 to 1. */
  ackErrorRate: number;
  /** Transmissions after the first one, default 3; whole, 0 to 255. */
  macMaxFrameRetries?: number;
  /** Wait for an acknowledgement from the last bit of the frame, s; default that of the PHY. */
  ackWaitS?: number;
  /** Whether the space after an acknowledgement counts; default false. */
  includeInterframeSpace?: boolean;
}

/** Times of an exchange by what the radio does, s. `ackListenS` is the sum of the two acknowledgement times. */
export interface ExchangeParts {
  transmitS: number;
  assessmentS: number;
  backoffS: number;
  /** Receiver to transmitter before each frame. */
  turnaroundS: number;
  /** Receiver on for acknowledgements. */
  ackListenS: number;
  /** Of it: from the last bit of the frame to the acknowledgement's first preamble bit, or through the whole wait. */
  acknowledgementWaitS: number;
  /** Of it: acknowledgements that arrive, preamble included. */
  acknowledgementS: number;
  /** Change to another channel; 0 where there is none. */
  retuneS: number;
  /** 0 unless asked for. */
  interframeSpaceS: number;
}

/** Means over all outcomes, ending with the acknowledgement or the last wait. */
export interface AcknowledgedExchange extends ExchangeParts {
  /** Channel accesses begun. */
  meanAccessAttempts: number;
  meanTransmissions: number;
  /** The three outcomes add up to 1. */
  acknowledgedProbability: number;
  accessFailureProbability: number;
  noAckProbability: number;
  /** That the receiver has the frame, whether or not the sender knows. */
  receivedProbability: number;
  /** Copies that the receiver gets beyond the first, because an acknowledgement was missed. */
  meanDuplicates: number;
  meanDurationS: number;
  /** All retries with the longest access and the longest wait, s. */
  worstCaseS: number;
  /** Each part at its worst, s; not all at once, as an exchange without acknowledgement receives none. */
  worst: ExchangeParts;
  /** Longest single backoff, s. */
  longestBackoffS: number;
  /** Time on air of one frame and of one acknowledgement, s. */
  frameS: number;
  ackS: number;
  /** Given the acknowledgement; where none can come, the limit. */
  ifAcknowledged: { meanTransmissions: number; meanDurationS: number };
  /** Given that the receiver has the frame; 0 where it cannot. */
  ifReceived: { meanDuplicates: number };
}

interface Times {
  frameS: number;
  ackS: number;
  turnaroundS: number;
  waitS: number;
  spaceS: number;
}

interface Outcomes {
  attempts: number;
  /** Probability that one more attempt follows. */
  again: number;
  /** Accesses begun, in the mean. */
  accesses: number;
  sent: number;
  /** That a frame sent is acknowledged. */
  good: number;
  acknowledged: number;
  received: number;
  duplicates: number;
}

/**
 * Acknowledged exchange with retries over any channel access. Access failure probability `c`, frame error `e_f`,
 * acknowledgement error `e_a`, `p = (1 − e_f)(1 − e_a)`, `r = (1 − c)(1 − p)`, at most `R` retries; an access failure ends it.
 *
 * `N = Σ_{j≤R} r^j` accesses, `(1 − c)N` transmissions; `P(acknowledged) = (1 − c)pN`, `P(access failure) = cN`,
 * `P(no acknowledgement) = r^(R+1)`, `P(received) = (1 − c)(1 − e_f)·Σ_{j≤R} ((1 − c)e_f)^j`; copies at the receiver
 * `(1 − c)(1 − e_f)N`, duplicates what exceeds `P(received)`. Listening for acknowledgements
 * `(1 − c)N·[p(turnaround + ack) + (1 − p)·wait]`. Worst case `(R + 1)(access + turnaround + frame + wait)`; where an
 * acknowledgement is longer than the wait, that counts instead. An interframe space follows an acknowledgement.
 *
 * Source: IEEE 802.15.4-2006 7.5.6.4, 7.5.1.3 as coded in ns-3 src/lr-wpan/model/lr-wpan-mac.cc @1406464; expectations derived.
 * Valid for: losses independent of each other; unslotted operation.
 *
 * @param phy A preset or a PHY of one's own.
 * @param access How the channel is got.
 * @param input Frames, losses, retries.
 * @returns Means over all outcomes and worst case.
 * @throws As `acknowledgedExchange`.
 * @example exchangeOverAccess(phy, csmaAccess(phy, { busyProbability: 0 }), { psduOctets: 127, frameErrorRate: 0, ackErrorRate: 0 })
 */
export function exchangeOverAccess(phy: Phy, access: ChannelAccess, input: ExchangeInput): AcknowledgedExchange {
  const times = timesOf(phy, input);
  const outcomes = outcomesOf(access.failureProbability, input);
  const { attempts, again, accesses, sent, acknowledged, received, duplicates } = outcomes;
  const parts = meanParts(access, times, outcomes);
  const worst = worstParts(access, times, attempts);
  const ifTransmissions = meanByAttempt(again, attempts, (attempt) => attempt + 1);
  const attemptS = accessS(access.ifSuccess) + times.turnaroundS + times.frameS;
  const answeredS = times.turnaroundS + times.ackS;
  return {
    // Named one by one: a spread of so many fields costs more than all of the arithmetic.
    transmitS: parts.transmitS,
    assessmentS: parts.assessmentS,
    backoffS: parts.backoffS,
    turnaroundS: parts.turnaroundS,
    ackListenS: parts.ackListenS,
    acknowledgementWaitS: parts.acknowledgementWaitS,
    acknowledgementS: parts.acknowledgementS,
    retuneS: parts.retuneS,
    interframeSpaceS: parts.interframeSpaceS,
    meanAccessAttempts: accesses,
    meanTransmissions: sent,
    acknowledgedProbability: acknowledged,
    accessFailureProbability: access.failureProbability * accesses,
    noAckProbability: again ** attempts,
    receivedProbability: received,
    meanDuplicates: duplicates,
    meanDurationS: durationS(parts),
    worstCaseS:
      attempts * (accessS(access.worst) + times.turnaroundS + times.frameS + Math.max(times.waitS, answeredS)) +
      times.spaceS,
    worst,
    longestBackoffS: access.longestBackoffS,
    frameS: times.frameS,
    ackS: times.ackS,
    ifAcknowledged: {
      meanTransmissions: ifTransmissions,
      meanDurationS: ifTransmissions * attemptS + (ifTransmissions - 1) * times.waitS + answeredS + times.spaceS,
    },
    ifReceived: { meanDuplicates: received === 0 ? 0 : duplicates / received },
  };
}

/** Sum of the parts of an exchange, s. */
function durationS(parts: ExchangeParts): number {
  const { transmitS, assessmentS, backoffS, turnaroundS, ackListenS, retuneS, interframeSpaceS } = parts;
  return transmitS + assessmentS + backoffS + turnaroundS + ackListenS + retuneS + interframeSpaceS;
}

function timesOf(phy: Phy, input: ExchangeInput): Times {
  const { psduOctets, ackPsduOctets = IMMEDIATE_ACK_OCTETS, ackWaitS, includeInterframeSpace = false } = input;
  const max = phy.maxPsduOctets ?? Infinity;
  requireNumber(ackPsduOctets, { field: 'ackPsduOctets', min: 0, max, whole: true, unit: 'octets' });
  return {
    frameS: frameAirtimeS(phy, psduOctets, input),
    ackS: frameAirtimeS(phy, ackPsduOctets, input),
    turnaroundS: phyConstant(phy, 'turnaroundS'),
    waitS:
      ackWaitS === undefined
        ? phyConstant(phy, 'ackWaitS')
        : requireNumber(ackWaitS, { field: 'ackWaitS', min: 0, unit: 's' }),
    spaceS: includeInterframeSpace ? interframeSpaceS(phy, psduOctets) : 0,
  };
}

function outcomesOf(accessFailure: number, input: ExchangeInput): Outcomes {
  const { frameErrorRate, ackErrorRate, macMaxFrameRetries = 3 } = input;
  requireNumber(frameErrorRate, { field: 'frameErrorRate', min: 0, max: 1 });
  requireNumber(ackErrorRate, { field: 'ackErrorRate', min: 0, max: 1 });
  requireNumber(macMaxFrameRetries, { field: 'macMaxFrameRetries', min: 0, max: 255, whole: true });
  const attempts = macMaxFrameRetries + 1;
  const accessed = 1 - accessFailure;
  const good = (1 - frameErrorRate) * (1 - ackErrorRate);
  const again = accessed * (1 - good);
  const accesses = powerSum(again, attempts);
  const arriving = accessed * (1 - frameErrorRate);
  const received = arriving * powerSum(accessed * frameErrorRate, attempts);
  return {
    attempts,
    again,
    accesses,
    sent: accessed * accesses,
    good,
    acknowledged: accessed * good * accesses,
    received,
    duplicates: Math.max(0, arriving * accesses - received),
  };
}

function meanParts(access: ChannelAccess, times: Times, outcomes: Outcomes): ExchangeParts {
  const { accesses, sent, good, acknowledged } = outcomes;
  const acknowledgementWaitS = sent * (good * times.turnaroundS + (1 - good) * times.waitS);
  const acknowledgementS = acknowledged * times.ackS;
  return {
    transmitS: sent * times.frameS,
    assessmentS: accesses * access.mean.assessmentS,
    backoffS: accesses * access.mean.backoffS,
    turnaroundS: sent * times.turnaroundS,
    ackListenS: acknowledgementWaitS + acknowledgementS,
    acknowledgementWaitS,
    acknowledgementS,
    retuneS: accesses * access.mean.retuneS,
    interframeSpaceS: acknowledged * times.spaceS,
  };
}

function worstParts(access: ChannelAccess, times: Times, attempts: number): ExchangeParts {
  return {
    transmitS: attempts * times.frameS,
    assessmentS: attempts * access.worst.assessmentS,
    backoffS: attempts * access.worst.backoffS,
    turnaroundS: attempts * times.turnaroundS,
    ackListenS: attempts * Math.max(times.waitS, times.turnaroundS + times.ackS),
    acknowledgementWaitS: attempts * Math.max(times.waitS, times.turnaroundS),
    acknowledgementS: times.ackS,
    retuneS: attempts * access.worst.retuneS,
    interframeSpaceS: times.spaceS,
  };
}
