import { meanByAttempt, powerSum } from './attempts.ts';
import { accessS, csmaAccess } from './channel-access.ts';
import type { AccessParts, ChannelAccess } from './channel-access.ts';
import { requireNumber } from './checks.ts';
import type { BackoffSettings } from './csma-ca.ts';
import { exchangeOverAccess } from './exchange-over-access.ts';
import type { AcknowledgedExchange, ExchangeInput } from './exchange-over-access.ts';
import { phyConstant } from './phy-constant.ts';
import type { Phy } from './phy.types.ts';

/** How the channels of a list are tried one after the other. */
export interface ChannelListInput extends BackoffSettings {
  /** Probability that an assessment finds a channel busy, the same on each, 0 to 1. */
  busyProbability: number;
  /** Channels in the list; whole, 1 to 255. */
  channels: number;
  /** Time of a change of channel, s, 0 or more. */
  retuneS: number;
  /** On each channel one assessment without backoff (default), or carrier sense with a backoff of its own. */
  perChannel?: 'assessment' | 'backoff';
}

export type ListenBeforeTalkInput = ChannelListInput & ExchangeInput;

/** As an acknowledged exchange; an access fails when every channel of the list is busy. */
export interface ListenBeforeTalk extends AcknowledgedExchange {
  /** Of one access: channels tried in the mean over all outcomes, and given that one was free. */
  meanChannels: number;
  ifSuccess: { meanChannels: number };
  /** From the start of the access to the first preamble bit, given success, s. */
  meanAccessS: number;
}

/**
 * Acknowledged exchange in which a busy channel makes the sender change to the next one of a list.
 *
 * With `f` the probability that one channel is found busy (one assessment: `a`; with backoff: as `csmaCa`) and `n` channels:
 * `P(access failure) = f^n`, `E[channels] = Σ_{j<n} f^j`, one change of channel before each channel but the first. A retry
 * begins on the channel where the last frame was sent, and may again go through the whole list. Rest as `exchangeOverAccess`.
 *
 * Source: derived; per channel as `csmaCa`. A retune time that no source gives must be supplied.
 * Valid for: channels that are busy independently of each other and of time, all with the same probability.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Channel list, busy channel, frames, losses, retries.
 * @returns Means over all outcomes, times by part with `retuneS`, probabilities, worst case.
 * @throws As `acknowledgedExchange`.
 * @example listenBeforeTalk(phy, { channels: 3, retuneS: 0.0002, busyProbability: 0.1, psduOctets: 40, frameErrorRate: 0, ackErrorRate: 0 })
 */
export function listenBeforeTalk(phy: Phy, input: ListenBeforeTalkInput): ListenBeforeTalk {
  const { channels } = input;
  const one = oneChannel(phy, input);
  const access = channelListAccess(one, input);
  const busy = one.failureProbability;
  return {
    ...exchangeOverAccess(phy, access, input),
    meanChannels: powerSum(busy, channels),
    ifSuccess: { meanChannels: meanByAttempt(busy, channels, (before) => before + 1) },
    meanAccessS: accessS(access.ifSuccess) + phyConstant(phy, 'turnaroundS'),
  };
}

function oneChannel(phy: Phy, input: ChannelListInput): ChannelAccess {
  const { busyProbability, perChannel = 'assessment' } = input;
  if (perChannel === 'backoff') return csmaAccess(phy, input);
  requireNumber(busyProbability, { field: 'busyProbability', min: 0, max: 1 });
  const once: AccessParts = { backoffS: 0, assessmentS: phyConstant(phy, 'ccaS'), retuneS: 0 };
  return {
    failureProbability: busyProbability,
    mean: once,
    ifSuccess: once,
    ifFailure: once,
    worst: once,
    longestBackoffS: 0,
  };
}

function channelListAccess(one: ChannelAccess, { channels, retuneS }: ChannelListInput): ChannelAccess {
  requireNumber(channels, { field: 'channels', min: 1, max: 255, whole: true });
  requireNumber(retuneS, { field: 'retuneS', min: 0, unit: 's' });
  const busy = one.failureProbability;
  const tried = powerSum(busy, channels);
  const before = meanByAttempt(busy, channels, (attempt) => attempt);
  const each = (parts: AccessParts, count: number): AccessParts => ({
    backoffS: count * parts.backoffS,
    assessmentS: count * parts.assessmentS,
    retuneS: (count - 1) * retuneS,
  });
  return {
    failureProbability: busy ** channels,
    mean: each(one.mean, tried),
    ifSuccess: {
      backoffS: before * one.ifFailure.backoffS + one.ifSuccess.backoffS,
      assessmentS: before * one.ifFailure.assessmentS + one.ifSuccess.assessmentS,
      retuneS: before * retuneS,
    },
    ifFailure: each(one.ifFailure, channels),
    worst: each(one.worst, channels),
    longestBackoffS: one.longestBackoffS,
  };
}
