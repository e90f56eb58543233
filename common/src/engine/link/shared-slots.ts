import { requireNumber } from './checks.ts';

/** Sending in slots that several nodes share. */
export interface SharedSlotsInput {
  /** Probability that another node sends in the same slot and the frame is lost to it; 0 to 1. */
  collisionProbability: number;
  /** Probability that the frame is lost otherwise, and that its acknowledgement is; 0 to 1. */
  frameErrorRate: number;
  ackErrorRate: number;
  /** Defaults: exponents 1 and 5, three retries after the first transmission. */
  macMinBE?: number;
  macMaxBE?: number;
  macMaxFrameRetries?: number;
}

/** What a frame comes to in shared slots. */
export interface SharedSlots {
  meanTransmissions: number;
  worstTransmissions: number;
  /** Shared slots let pass between transmissions, mean over all outcomes and at worst. */
  meanSkippedSlots: number;
  worstSkippedSlots: number;
  acknowledgedProbability: number;
  /** Probability that the receiver has the frame. */
  receivedProbability: number;
}

/**
 * Retries in shared slots. The first transmission takes the next shared slot. After each one that is not acknowledged the
 * exponent grows by one from macMinBE up to macMaxBE, and the node lets 0 to 2^BE − 1 shared slots pass, each number as likely.
 *
 * Source: IEEE 802.15.4e-2012 5.1.1.4.3 as coded in Contiki-NG os/net/mac/tsch/tsch-queue.c @9f80681 (macMinBE 1, macMaxBE 5).
 * Conflict: earlier revisions of it have macMaxBE 7; macMaxFrameRetries is 3 in most stacks, 7 in recent ones: 3 is taken.
 *
 * @param input Probabilities 0 to 1, exponents and retries, whole, 0 or more.
 * @returns Transmissions, slots let pass and probabilities; each transmission costs one transmit slot of `slot`.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @example sharedSlots({ collisionProbability: 0, frameErrorRate: 0, ackErrorRate: 0 }).meanTransmissions // 1
 */
export function sharedSlots(input: SharedSlotsInput): SharedSlots {
  const {
    collisionProbability,
    frameErrorRate,
    ackErrorRate,
    macMinBE = 1,
    macMaxBE = 5,
    macMaxFrameRetries = 3,
  } = input;
  const chances = { collisionProbability, frameErrorRate, ackErrorRate };
  for (const [field, value] of Object.entries(chances)) requireNumber(value, { field, min: 0, max: 1 });
  requireNumber(macMinBE, { field: 'macMinBE', min: 0, max: 8, whole: true });
  requireNumber(macMaxBE, { field: 'macMaxBE', min: macMinBE, max: 8, whole: true });
  requireNumber(macMaxFrameRetries, { field: 'macMaxFrameRetries', min: 0, max: 7, whole: true });
  const lost = 1 - (1 - collisionProbability) * (1 - frameErrorRate);
  const failed = 1 - (1 - lost) * (1 - ackErrorRate);
  const result = { meanTransmissions: 0, meanSkippedSlots: 0, worstSkippedSlots: 0 };
  for (let transmission = 0; transmission <= macMaxFrameRetries; transmission += 1) {
    const longest = transmission === 0 ? 0 : 2 ** Math.min(macMinBE + transmission, macMaxBE) - 1;
    result.meanTransmissions += failed ** transmission;
    result.meanSkippedSlots += (failed ** transmission * longest) / 2;
    result.worstSkippedSlots += longest;
  }
  return {
    ...result,
    worstTransmissions: macMaxFrameRetries + 1,
    acknowledgedProbability: 1 - failed ** (macMaxFrameRetries + 1),
    receivedProbability: 1 - lost ** (macMaxFrameRetries + 1),
  };
}
