import { requireNumber } from './checks.ts';
import { assemblePlan, phaseOf } from './assemble-plan.ts';
import type { ExchangePhase, ExchangePlan } from './exchange-plan.types.ts';
import { frameLayout } from './frame-layout.ts';
import { addFigure, planPhy } from './plan-context.ts';
import type { PlanContext, PlanOf } from './plan-context.ts';
import { accessInput, exchangePhases, IMMEDIATE_ACK_OCTETS, RETRY_SOURCE } from './plan-exchange.ts';
import type { Phy } from './phy.types.ts';
import { ackLossOf, frameLossOf } from './plan-losses.ts';
import { acknowledgedFigures, airOptions } from './plan-sent.ts';
import { poll } from './poll.ts';
import type { Poll } from './poll.ts';

const COMMAND_OCTETS = 1;
const POLL_SOURCE = 'IEEE 802.15.4-2006 7.5.6.3';

/**
 * A child asks its parent for data: data request, acknowledgement, and as often as data is pending the wait for the response, the
 * response and its acknowledgement.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `poll` and `frameLayout` throw.
 * @example planPoll(context).phases.map(({ id }) => id)
 */
export function planPoll(context: PlanOf<'poll'>): ExchangePlan {
  const { exchange, link } = context;
  const phy = planPhy(link);
  const size =
    exchange.dataRequestOctets === undefined
      ? { payloadOctets: 0, commandOctets: COMMAND_OCTETS }
      : { psduOctets: exchange.dataRequestOctets };
  const frame = frameLayout(phy, size, link);
  const pending = requireNumber(exchange.pendingProbability.typical, { field: 'pendingProbability', min: 0, max: 1 });
  const times = pollTimes(context, phy, { psduOctets: frame.psduOctets, framePending: pending > 0 });
  acknowledgedFigures(context, times.dataRequest);
  pollFigures(context, times, pending);
  const { dataRequest, worst } = times;
  const phases = exchangePhases(context, phy, dataRequest).map((phase) =>
    phase.id === 'turnaround'
      ? withResponse(phase, pending * times.responseTurnaroundS, worst.responseTurnaroundS)
      : phase,
  );
  return assemblePlan(context, {
    phases: [...phases, ...responsePhases(times, pending)],
    worstS: times.worstCaseS,
    worstAttempts: Math.round(dataRequest.worst.transmitS / dataRequest.frameS),
    frame,
    onAirMeanS: dataRequest.transmitS + pending * times.responseAckS,
    onAirWorstS: dataRequest.worst.transmitS + worst.responseAckS,
  });
}

function pollTimes(context: PlanOf<'poll'>, phy: Phy, request: { psduOctets: number; framePending: boolean }): Poll {
  const { exchange, link } = context;
  const { responsePsduOctets, responseDelayS, waitS } = exchange;
  if (responsePsduOctets === undefined && request.framePending) {
    const message =
      'Nothing says how long the response is: the child waits for it in vain, for the longest time, as often as data is pending.';
    context.cautions.push({ code: 'response-missing', message, field: 'responsePsduOctets' });
  }
  const frameErrorRate = frameLossOf(context, phy, request.psduOctets);
  return poll(phy, {
    ...accessInput(context),
    ...airOptions(context),
    dataRequestOctets: request.psduOctets,
    framePending: request.framePending,
    ackPsduOctets: IMMEDIATE_ACK_OCTETS,
    macMaxFrameRetries: link.macMaxFrameRetries,
    responsePsduOctets,
    responseDelayS,
    waitS,
    frameErrorRate,
    ackErrorRate: ackLossOf(context, phy, IMMEDIATE_ACK_OCTETS),
    responseErrorRate: frameErrorRate,
  });
}

/** The turnaround before the acknowledgement of the response is one like those before the frames. */
function withResponse(phase: ExchangePhase, meanS: number, worstS: number): ExchangePhase {
  return { ...phase, meanS: phase.meanS + meanS, worstS: phase.worstS + worstS };
}

function responsePhases({ worst, ...mean }: Poll, pending: number): ExchangePhase[] {
  const origin = (formula: string) => ({ formula: `P(pending) · P(acknowledged) · ${formula}`, source: POLL_SOURCE });
  const times = (meanS: number, worstS: number) => ({ meanS: pending * meanS, worstS });
  return [
    phaseOf(
      'response-wait',
      times(mean.responseWaitS, worst.responseWaitS),
      origin('((1 − e) · delay + e · macMaxFrameTotalWaitTime)'),
    ),
    phaseOf('response', times(mean.responseS, worst.responseS), origin('(1 − e) · T')),
    phaseOf('response-acknowledgement', times(mean.responseAckS, worst.responseAckS), origin('(1 − e) · T_ack')),
  ];
}

function pollFigures(context: PlanContext, times: Poll, pending: number): void {
  const add = (id: string, name: string, value: number): void =>
    addFigure(context, {
      id,
      name,
      value,
      unit: 'probability',
      formula: 'P(pending) · P(acknowledged) · …',
      source: POLL_SOURCE,
    });
  addFigure(context, {
    id: 'pendingProbability',
    name: 'Probability that data is pending',
    value: pending,
    unit: 'probability',
    formula: 'as given',
    source: 'given in the step',
  });
  add('response', 'Probability of a response', pending * times.responseProbability);
  add('responseMissed', 'Probability of a wait in vain', pending * times.missedProbability);
  addFigure(context, {
    id: 'responseWait',
    name: 'Longest wait for the response',
    value: times.worst.responseWaitS,
    unit: 's',
    formula: 'macMaxFrameTotalWaitTime unless given',
    source: `${POLL_SOURCE}, 7.4.2 equation (14); ${RETRY_SOURCE}`,
  });
}
