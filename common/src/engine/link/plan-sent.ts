import type { ExchangeDuration } from '../scenario/scenario.types.ts';
import { acknowledgedExchange, unacknowledgedExchange } from './acknowledged-exchange.ts';
import { assemblePlan, phaseOf } from './assemble-plan.ts';
import type { AcknowledgedExchange } from './exchange-over-access.ts';
import type { ExchangePlan } from './exchange-plan.types.ts';
import { frameLayout } from './frame-layout.ts';
import { addFigure, planPhy } from './plan-context.ts';
import type { PlanContext } from './plan-context.ts';
import {
  accessInput,
  AIRTIME,
  CSMA_SOURCE,
  exchangePhases,
  IMMEDIATE_ACK_OCTETS,
  RETRY_SOURCE,
} from './plan-exchange.ts';
import { ackLossOf, frameLossOf } from './plan-losses.ts';

type Of<P extends ExchangeDuration['pattern']> = PlanContext<Extract<ExchangeDuration, { pattern: P }>>;

/**
 * A frame on the air and nothing else, in whatever state the step types.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `frameLayout` throws.
 * @example planFrame(context).meanS === planFrame(context).frame?.airtimeS
 */
export function planFrame(context: Of<'frame'>): ExchangePlan {
  const { exchange, link } = context;
  const frame = frameLayout(planPhy(link), exchange, link);
  const { airtimeS } = frame;
  return assemblePlan(context, {
    phases: [phaseOf('frame', { meanS: airtimeS, worstS: airtimeS }, AIRTIME)],
    frame,
    deliveredProbability: null,
    payloadOctets: exchange.payloadOctets ?? null,
    onAirMeanS: airtimeS,
    onAirWorstS: airtimeS,
  });
}

/**
 * A frame that nothing acknowledges: channel access, frame.
 *
 * @param context Of the plan.
 * @returns The plan; delivery fails with the access or with the frame.
 * @throws What `unacknowledgedExchange` and `frameLayout` throw.
 * @example planUnacknowledged(context).phases.map(({ id }) => id) // ['backoff', 'assessment', 'turnaround', 'frame']
 */
export function planUnacknowledged(context: Of<'unacknowledged'>): ExchangePlan {
  const { exchange, link } = context;
  const phy = planPhy(link);
  const frame = frameLayout(phy, exchange, link);
  const sent = unacknowledgedExchange(phy, {
    ...accessInput(context),
    psduOctets: frame.psduOctets,
    frameErrorRate: frameLossOf(context, phy, frame.psduOctets),
    ...airOptions(context),
  });
  accessFigure(context, sent.accessFailureProbability);
  return assemblePlan(context, {
    phases: exchangePhases(context, phy, sent),
    worstS: sent.worstCaseS,
    frame,
    deliveredProbability: sent.receivedProbability,
    payloadOctets: exchange.payloadOctets ?? null,
    onAirMeanS: sent.transmitS,
    onAirWorstS: sent.worst.transmitS,
  });
}

/**
 * A frame that is acknowledged, with retries: channel access, frame, wait, acknowledgement.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `acknowledgedExchange` and `frameLayout` throw.
 * @example planAcknowledged(context).deliveredProbability
 */
export function planAcknowledged(context: Of<'acknowledged'>): ExchangePlan {
  const { exchange, link } = context;
  const phy = planPhy(link);
  const frame = frameLayout(phy, exchange, link);
  const { ackPsduOctets = IMMEDIATE_ACK_OCTETS } = exchange;
  const sent = acknowledgedExchange(phy, {
    ...accessInput(context),
    psduOctets: frame.psduOctets,
    ackPsduOctets,
    frameErrorRate: frameLossOf(context, phy, frame.psduOctets),
    ackErrorRate: ackLossOf(context, phy, ackPsduOctets),
    macMaxFrameRetries: link.macMaxFrameRetries,
    ...airOptions(context),
  });
  acknowledgedFigures(context, sent);
  return assemblePlan(context, {
    phases: exchangePhases(context, phy, sent),
    worstS: sent.worstCaseS,
    worstAttempts: Math.round(sent.worst.transmitS / sent.frameS),
    frame,
    deliveredProbability: sent.receivedProbability,
    payloadOctets: exchange.payloadOctets ?? null,
    onAirMeanS: sent.transmitS,
    onAirWorstS: sent.worst.transmitS,
  });
}

/**
 * What of the link settings the formulas of frames and exchanges take.
 *
 * @param context Of the plan.
 * @returns Preamble, coding and whether the interframe space counts.
 * @example airOptions(context).preambleOctets
 */
export function airOptions({ link }: PlanContext): {
  preambleOctets?: number;
  forwardErrorCorrection?: boolean;
  includeInterframeSpace?: boolean;
} {
  const { preambleOctets, forwardErrorCorrection, includeInterframeSpace } = link;
  return { preambleOctets, forwardErrorCorrection, includeInterframeSpace };
}

/**
 * Adds the probability of giving the access up.
 *
 * @param context Gets the figure.
 * @param value The probability.
 * @example accessFigure(context, 0.001)
 */
export function accessFigure(context: PlanContext, value: number): void {
  addFigure(context, {
    id: 'accessFailure',
    name: 'Probability that the access is given up, the channel being busy each time',
    value,
    unit: 'probability',
    formula: 'c = a^(macMaxCSMABackoffs + 1), of each access',
    source: CSMA_SOURCE,
  });
}

/**
 * Adds what an acknowledged exchange comes to: accesses, transmissions, outcomes, duplicates.
 *
 * @param context Gets the figures.
 * @param sent The exchange.
 * @example acknowledgedFigures(context, acknowledgedExchange(phy, input))
 */
export function acknowledgedFigures(context: PlanContext, sent: AcknowledgedExchange): void {
  const add = (id: string, name: string, value: number, unit: 'probability' | 'count', formula: string): void =>
    addFigure(context, { id, name, value, unit, formula, source: RETRY_SOURCE });
  add('accessAttempts', 'Channel accesses', sent.meanAccessAttempts, 'count', 'N = Σ_{j≤R} r^j, r = (1 − c)(1 − p)');
  add('transmissions', 'Transmissions', sent.meanTransmissions, 'count', '(1 − c) · N');
  add(
    'acknowledged',
    'Probability of an acknowledgement',
    sent.acknowledgedProbability,
    'probability',
    '(1 − c) · p · N',
  );
  add('accessFailure', 'Probability that an access is given up', sent.accessFailureProbability, 'probability', 'c · N');
  add(
    'noAcknowledgement',
    'Probability that all retries stay unanswered',
    sent.noAckProbability,
    'probability',
    'r^(R + 1)',
  );
  add(
    'received',
    'Probability that the receiver has the frame',
    sent.receivedProbability,
    'probability',
    '(1 − c)(1 − e_f) · Σ_{j≤R} ((1 − c) · e_f)^j',
  );
  add(
    'duplicates',
    'Copies beyond the first at the receiver',
    sent.meanDuplicates,
    'count',
    '(1 − c)(1 − e_f) · N − P(received)',
  );
}
