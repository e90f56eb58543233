import { acknowledgedExchange, unacknowledgedExchange } from './acknowledged-exchange.ts';
import { assemblePlan, phaseOf } from './assemble-plan.ts';
import type { PlanDraft } from './assemble-plan.ts';
import type { AcknowledgedExchange, ExchangeInput } from './exchange-over-access.ts';
import type { ExchangePlan, FrameLayout } from './exchange-plan.types.ts';
import { frameLayout } from './frame-layout.ts';
import { listenBeforeTalk } from './listen-before-talk.ts';
import type { Phy } from './phy.types.ts';
import { addFigure, planPhy } from './plan-context.ts';
import type { PlanContext, PlanOf } from './plan-context.ts';
import {
  accessInput,
  AIRTIME,
  CSMA_SOURCE,
  exchangePhases,
  IMMEDIATE_ACK_OCTETS,
  RETRY_SOURCE,
} from './plan-exchange.ts';
import { ackLossOf, frameLossOf } from './plan-losses.ts';

/**
 * A frame on the air and nothing else, in whatever state the step types.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `frameLayout` throws.
 * @example planFrame(context).meanS === planFrame(context).frame?.airtimeS
 */
export function planFrame(context: PlanOf<'frame'>): ExchangePlan {
  const { exchange, link } = context;
  const frame = frameLayout(planPhy(link), exchange, link);
  const { airtimeS } = frame;
  return assemblePlan(context, {
    phases: [phaseOf('frame', { meanS: airtimeS, worstS: airtimeS }, AIRTIME)],
    frame,
    payloadOctets: exchange.payloadOctets,
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
export function planUnacknowledged(context: PlanOf<'unacknowledged'>): ExchangePlan {
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
    payloadOctets: exchange.payloadOctets,
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
export function planAcknowledged(context: PlanOf<'acknowledged'>): ExchangePlan {
  const phy = planPhy(context.link);
  const frame = frameLayout(phy, context.exchange, context.link);
  const sent = acknowledgedExchange(phy, { ...accessInput(context), ...acknowledgedInput(context, phy, frame) });
  return assemblePlan(context, acknowledgedDraft(context, phy, { frame, sent }));
}

/**
 * As `planAcknowledged`, where a busy channel makes the sender change to the next one of a list.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `listenBeforeTalk` and `frameLayout` throw.
 * @example planListenBeforeTalk(context).phases[0]?.id // 'retune'
 */
export function planListenBeforeTalk(context: PlanOf<'listen-before-talk'>): ExchangePlan {
  const { exchange, link } = context;
  const { channels, retuneS } = exchange;
  const phy = planPhy(link);
  const frame = frameLayout(phy, exchange, link);
  const input = { ...accessInput(context), ...acknowledgedInput(context, phy, frame), channels, retuneS };
  const sent = listenBeforeTalk(phy, input);
  addFigure(context, {
    id: 'channels',
    name: 'Channels tried at an access',
    value: sent.meanChannels,
    unit: 'count',
    formula: 'Σ_{j<n} a^j',
    source: 'derived, for channels that are busy independently of each other',
  });
  return assemblePlan(context, acknowledgedDraft(context, phy, { frame, sent: { ...sent, oneRetuneS: retuneS } }));
}

/**
 * What `acknowledgedExchange` takes beside the channel access.
 *
 * @param context Of the plan; gets figures and cautions of the losses.
 * @param phy The PHY.
 * @param frame The frame.
 * @returns Sizes, losses, retries, settings on the air.
 * @example acknowledgedInput(context, phy, frame).ackPsduOctets // 5
 */
export function acknowledgedInput(
  context: PlanOf<'acknowledged' | 'listen-before-talk' | 'forward'>,
  phy: Phy,
  { psduOctets }: Pick<FrameLayout, 'psduOctets'>,
): ExchangeInput {
  const { ackPsduOctets = IMMEDIATE_ACK_OCTETS } = context.exchange;
  return {
    psduOctets,
    ackPsduOctets,
    frameErrorRate: frameLossOf(context, phy, psduOctets),
    ackErrorRate: ackLossOf(context, phy, ackPsduOctets),
    macMaxFrameRetries: context.link.macMaxFrameRetries,
    ...airOptions(context),
  };
}

function acknowledgedDraft(
  context: PlanOf<'acknowledged' | 'listen-before-talk'>,
  phy: Phy,
  { frame, sent }: { frame: FrameLayout; sent: AcknowledgedExchange & { oneRetuneS?: number } },
): PlanDraft {
  acknowledgedFigures(context, sent);
  return {
    phases: exchangePhases(context, phy, sent),
    worstS: sent.worstCaseS,
    worstAttempts: Math.round(sent.worst.transmitS / sent.frameS),
    frame,
    deliveredProbability: sent.receivedProbability,
    payloadOctets: context.exchange.payloadOctets,
    onAirMeanS: sent.transmitS,
    onAirWorstS: sent.worst.transmitS,
  };
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
  const {
    meanAccessAttempts,
    meanTransmissions,
    acknowledgedProbability,
    accessFailureProbability,
    noAckProbability,
    receivedProbability,
    meanDuplicates,
  } = sent;
  const rows: [id: string, value: number, unit: 'probability' | 'count'][] = [
    ['accessAttempts', meanAccessAttempts, 'count'],
    ['transmissions', meanTransmissions, 'count'],
    ['acknowledged', acknowledgedProbability, 'probability'],
    ['accessFailure', accessFailureProbability, 'probability'],
    ['noAcknowledgement', noAckProbability, 'probability'],
    ['received', receivedProbability, 'probability'],
    ['duplicates', meanDuplicates, 'count'],
  ];
  for (const [id, value, unit] of rows) {
    const [name = id, formula = ''] = EXCHANGE_WORDS[id] ?? [];
    addFigure(context, { id, name, value, unit, formula, source: RETRY_SOURCE });
  }
}

/** Name and formula by figure: a busy, c access failure, e_f frame and e_a acknowledgement loss, R retries. */
const EXCHANGE_WORDS: Readonly<Record<string, [name: string, formula: string]>> = {
  accessAttempts: ['Channel accesses', 'N = Σ_{j≤R} r^j, r = (1 − c)(1 − p), p = (1 − e_f)(1 − e_a)'],
  transmissions: ['Transmissions', '(1 − c) · N'],
  acknowledged: ['Probability of an acknowledgement', '(1 − c) · p · N'],
  accessFailure: ['Probability that an access is given up', 'c · N'],
  noAcknowledgement: ['Probability that all retries stay unanswered', 'r^(R + 1)'],
  received: ['Probability that the receiver has the frame', '(1 − c)(1 − e_f) · Σ_{j≤R} ((1 − c) · e_f)^j'],
  duplicates: ['Copies beyond the first at the receiver', '(1 − c)(1 − e_f) · N − P(received)'],
};
