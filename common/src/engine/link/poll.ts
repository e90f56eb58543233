import { InconsistentInputError } from '#common/errors.ts';
import { acknowledgedExchange } from './acknowledged-exchange.ts';
import { requireNumber } from './checks.ts';
import { csmaCa } from './csma-ca.ts';
import type { BackoffSettings } from './csma-ca.ts';
import type { AcknowledgedExchange, ExchangeInput } from './exchange-over-access.ts';
import { frameAirtimeS } from './frame-airtime.ts';
import type { FrameAirtimeOptions } from './frame-airtime.ts';
import { maxFrameTotalWaitS } from './max-frame-total-wait.ts';
import { phyConstant } from './phy-constant.ts';
import type { Phy } from './phy.types.ts';

/** A child asks its parent for data. Losses default to none here; a caller that knows better says so. */
export interface PollInput
  extends
    BackoffSettings,
    FrameAirtimeOptions,
    Pick<ExchangeInput, 'ackPsduOctets' | 'macMaxFrameRetries' | 'ackWaitS'> {
  /** PSDU of the data request, FCS counted. */
  dataRequestOctets: number;
  /** Whether the acknowledgement announces data. */
  framePending: boolean;
  /** PSDU of the announced frame; absent: nothing comes, and the child waits in vain. */
  responsePsduOctets?: number;
  /** From the end of the acknowledgement to the response's first preamble bit, s; default the mean access of the parent, at most the wait. */
  responseDelayS?: number;
  /** Longest wait for the response, s; default macMaxFrameTotalWaitTime. */
  waitS?: number;
  /** Probability that an assessment finds the channel busy, 0 to 1. */
  busyProbability: number;
  /** Loss of data requests, default 0. */
  frameErrorRate?: number;
  /** Loss of acknowledgements, default 0. */
  ackErrorRate?: number;
  /** Probability that the child misses the announced frame, default 0. */
  responseErrorRate?: number;
}

/** What follows an acknowledgement that announces data, s. */
export interface PollResponse {
  /** Receiver on, before the response or in vain. */
  responseWaitS: number;
  /** The response itself. */
  responseS: number;
  /** Receiver to transmitter before the response's acknowledgement. */
  responseTurnaroundS: number;
  /** Acknowledgement of the response. */
  responseAckS: number;
}

/** Means over all outcomes, s. */
export interface Poll extends PollResponse {
  /** Data requests and the acknowledgement of the response. */
  transmitS: number;
  /** Receiver on: assessments, acknowledgements, wait and response. */
  listenS: number;
  durationS: number;
  worstCaseS: number;
  /** Each part of the response at its worst, s. */
  worst: PollResponse;
  /** Probability that the child gets a response; 0 where none is sent. */
  responseProbability: number;
  /** Probability that the child waits in vain. */
  missedProbability: number;
  /** The data request on its own. */
  dataRequest: AcknowledgedExchange;
}

const NO_RESPONSE: PollResponse = { responseWaitS: 0, responseS: 0, responseTurnaroundS: 0, responseAckS: 0 };

/**
 * Indirect delivery: data request, acknowledgement, and where that announces data, the wait for the frame and its acknowledgement.
 *
 * With `A` the probability that the request is acknowledged and `e` that the response is missed:
 * `listening = request + A·[(1 − e)(delay + response) + e·wait]`; a response that arrives is answered after the turnaround.
 * Whether the parent gets that acknowledgement does not matter here: what it repeats is another poll's business.
 *
 * Source: IEEE 802.15.4-2006 7.5.6.3; wait as `maxFrameTotalWaitS`, request as `acknowledgedExchange`.
 * Valid for: unslotted operation; the parent sends one frame per request.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Frames, whether data are pending, waits, busy channel and losses.
 * @returns Means over all outcomes and worst case, s.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @throws InconsistentInputError code `response-too-late` when the response begins after the longest wait; what
 *   `acknowledgedExchange` and `maxFrameTotalWaitS` throw.
 * @example poll(phyPresets['oqpsk-2450'], { dataRequestOctets: 12, framePending: false, busyProbability: 0 }).durationS // 0.00256
 */
export function poll(phy: Phy, input: PollInput): Poll {
  const { dataRequestOctets, framePending, frameErrorRate = 0, ackErrorRate = 0 } = input;
  requireOctets(phy, 'dataRequestOctets', dataRequestOctets);
  const dataRequest = acknowledgedExchange(phy, {
    ...input,
    psduOctets: dataRequestOctets,
    frameErrorRate,
    ackErrorRate,
  });
  const { acknowledgedProbability } = dataRequest;
  const announced = framePending ? responseOf(phy, input, dataRequest.ackS) : null;
  const answered = announced === null ? 0 : acknowledgedProbability * announced.received;
  const missed = announced === null ? 0 : acknowledgedProbability - answered;
  const { got = NO_RESPONSE, inVainS = 0, longestS = 0 } = announced ?? {};
  const means: PollResponse = {
    responseWaitS: answered * got.responseWaitS + missed * inVainS,
    responseS: answered * got.responseS,
    responseTurnaroundS: answered * got.responseTurnaroundS,
    responseAckS: answered * got.responseAckS,
  };
  const responseListenS = means.responseWaitS + means.responseS;
  return {
    ...means,
    transmitS: dataRequest.transmitS + means.responseAckS,
    listenS: dataRequest.assessmentS + dataRequest.ackListenS + responseListenS,
    durationS: dataRequest.meanDurationS + responseListenS + means.responseTurnaroundS + means.responseAckS,
    worstCaseS: dataRequest.worstCaseS + longestS,
    worst: { ...got, responseWaitS: Math.max(got.responseWaitS, inVainS) },
    responseProbability: answered,
    missedProbability: missed,
    dataRequest,
  };
}

interface Announced {
  /** Probability that the response arrives. */
  received: number;
  /** Times of a response that arrives. */
  got: PollResponse;
  /** Wait for a response that does not. */
  inVainS: number;
  longestS: number;
}

function responseOf(phy: Phy, input: PollInput, ackS: number): Announced {
  const inVainS = requireNumber(input.waitS ?? maxFrameTotalWaitS(phy, input), { field: 'waitS', min: 0, unit: 's' });
  const missed = requireNumber(input.responseErrorRate ?? 0, { field: 'responseErrorRate', min: 0, max: 1 });
  if (input.responsePsduOctets === undefined) return { received: 0, got: NO_RESPONSE, inVainS, longestS: inVainS };
  requireOctets(phy, 'responsePsduOctets', input.responsePsduOctets);
  const responseWaitS = responseDelayS(phy, input, inVainS);
  const got = {
    responseWaitS,
    responseS: frameAirtimeS(phy, input.responsePsduOctets, input),
    responseTurnaroundS: phyConstant(phy, 'turnaroundS'),
    responseAckS: ackS,
  };
  const gotS = got.responseWaitS + got.responseS + got.responseTurnaroundS + got.responseAckS;
  return { received: 1 - missed, got, inVainS, longestS: Math.max(gotS, inVainS) };
}

function responseDelayS(phy: Phy, input: PollInput, waitS: number): number {
  const delayS = input.responseDelayS;
  if (delayS === undefined) return Math.min(csmaCa(phy, input).meanAccessS, waitS);
  requireNumber(delayS, { field: 'responseDelayS', min: 0, unit: 's' });
  if (delayS <= waitS) return delayS;
  throw new InconsistentInputError(
    `The response begins after ${delayS} s, when the wait of ${waitS} s for it is over.`,
    {
      code: 'response-too-late',
      field: 'responseDelayS',
      value: delayS,
      unit: 's',
      expected: `at most the wait, ${waitS} s`,
      relatedFields: ['waitS'],
    },
  );
}

function requireOctets(phy: Phy, field: string, octets: number): void {
  requireNumber(octets, { field, min: 0, max: phy.maxPsduOctets ?? Infinity, whole: true, unit: 'octets' });
}
