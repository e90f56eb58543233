import { assemblePlan, phaseOf } from './assemble-plan.ts';
import type { PlanDraft } from './assemble-plan.ts';
import type { ExchangePhase, ExchangePlan } from './exchange-plan.types.ts';
import { frameLayout } from './frame-layout.ts';
import { addFigure, planPhy } from './plan-context.ts';
import type { PlanOf } from './plan-context.ts';
import { accessInput, AIRTIME } from './plan-exchange.ts';
import { ackLossOf, frameLossOf } from './plan-losses.ts';
import { airOptions } from './plan-sent.ts';
import type { Phy } from './phy.types.ts';
import { sharedSlots } from './shared-slots.ts';
import { slot, slotTemplateOf } from './slot.ts';
import type { Slot, SlotTimes } from './slot.ts';

/** Enhanced acknowledgement with time correction and no address: 5, and an information element of 2 + 2 octets. */
const ENHANCED_ACK_OCTETS = 9;
const RETRY_SOURCE = 'IEEE 802.15.4e-2012 5.1.1.4.3 as coded in Contiki-NG tsch-queue.c @9f80681';

/**
 * A slot of time-slotted channel hopping: sent in with retries in later slots, received in, or listened in.
 *
 * @param context Of the plan.
 * @returns The plan; its time is that of all slots that the frame takes.
 * @throws What `slot`, `sharedSlots` and `frameLayout` throw.
 * @example planSlot(context).meanS // 0.01
 */
export function planSlot(context: PlanOf<'slot'>): ExchangePlan {
  const { exchange, link } = context;
  const phy = planPhy(link);
  const { template } = exchange;
  if (exchange.slotUse === 'idle-listen') {
    const times = slot(phy, { use: 'idle-listen', template });
    const phases = [phaseOf('listen', both(times, 'listenS'), originOf(phy, times)), restPhase(phy, times)];
    return assemblePlan(context, { phases, frame: null, loadedOctets: null, onAirMeanS: 0, onAirWorstS: 0 });
  }
  return assemblePlan(context, exchange.slotUse === 'transmit' ? sentDraft(context, phy) : receivedDraft(context, phy));
}

function both({ mean, worst }: Slot, kind: keyof SlotTimes): { meanS: number; worstS: number } {
  return { meanS: mean[kind], worstS: worst[kind] };
}

function originOf(phy: Phy, { templateId }: Slot): { formula: string; source: string } {
  return { formula: `template ${templateId}`, source: slotTemplateOf(phy, templateId).source };
}

/** What the longest times leave of a slot is less than what the mean ones do; both are told. */
function restPhase(phy: Phy, times: Slot): ExchangePhase {
  const longestS = Math.max(times.mean.idleS, times.worst.idleS);
  return phaseOf(
    'interframe-space',
    { meanS: times.mean.idleS, worstS: longestS, name: 'rest of the slot' },
    originOf(phy, times),
  );
}

function sentDraft(context: PlanOf<'slot'>, phy: Phy): PlanDraft {
  const { exchange, link } = context;
  const { ackPsduOctets = ENHANCED_ACK_OCTETS, shared = false, template, psduOctets } = exchange;
  const frame = frameLayout(phy, { psduOctets }, link);
  const own = frameLossOf(context, phy, frame.psduOctets);
  const ackErrorRate = ackLossOf(context, phy, ackPsduOctets);
  const collisionProbability = shared ? accessInput(context).busyProbability : 0;
  const { macMaxFrameRetries } = link;
  const retries = sharedSlots({ collisionProbability, frameErrorRate: own, ackErrorRate, macMaxFrameRetries });
  const frameErrorRate = 1 - (1 - collisionProbability) * (1 - own);
  const sizes = { psduOctets: frame.psduOctets, ackPsduOctets };
  const times = slot(phy, {
    use: 'transmit',
    ...sizes,
    frameErrorRate,
    ackErrorRate,
    template,
    ...airOptions(context),
  });
  retryFigures(context, retries);
  const { meanTransmissions, worstTransmissions } = retries;
  const all = (phase: ExchangePhase): ExchangePhase => ({
    ...phase,
    meanS: phase.meanS * meanTransmissions,
    worstS: phase.worstS * worstTransmissions,
    formula: `transmissions · ${phase.formula}`,
  });
  const origin = originOf(phy, times);
  return {
    phases: [
      phaseOf('frame', both(times, 'transmitS'), AIRTIME),
      phaseOf('acknowledgement-wait', both(times, 'listenS'), origin),
      phaseOf('acknowledgement', both(times, 'receiveS'), origin),
      restPhase(phy, times),
    ].map(all),
    worstS: worstTransmissions * times.slotS,
    worstAttempts: worstTransmissions,
    frame,
    deliveredProbability: retries.receivedProbability,
    onAirMeanS: meanTransmissions * times.mean.transmitS,
    onAirWorstS: worstTransmissions * times.worst.transmitS,
  };
}

function retryFigures(context: PlanOf<'slot'>, retries: ReturnType<typeof sharedSlots>): void {
  const add = (id: string, name: string, value: number): void =>
    addFigure(context, {
      id,
      name,
      value,
      unit: 'count',
      formula: 'Σ_{j≤R} q^j, q = 1 − (1 − e_f)(1 − e_a)',
      source: RETRY_SOURCE,
    });
  add('transmissions', 'Transmissions, each in a slot', retries.meanTransmissions);
  if (context.exchange.shared !== true) return;
  addFigure(context, {
    id: 'skippedSlots',
    name: 'Shared slots let pass between transmissions',
    value: retries.meanSkippedSlots,
    unit: 'count',
    formula: 'Σ_j q^j · (2^min(macMinBE + j, macMaxBE) − 1)/2',
    source: RETRY_SOURCE,
  });
}

function receivedDraft(context: PlanOf<'slot'>, phy: Phy): PlanDraft {
  const { exchange, link } = context;
  const { ackPsduOctets = ENHANCED_ACK_OCTETS, template, psduOctets } = exchange;
  const frame = frameLayout(phy, { psduOctets }, link);
  const frameErrorRate = frameLossOf(context, phy, frame.psduOctets);
  const sizes = { psduOctets: frame.psduOctets, ackPsduOctets };
  const times = slot(phy, { use: 'receive', ...sizes, frameErrorRate, template, ...airOptions(context) });
  const origin = originOf(phy, times);
  return {
    phases: [
      phaseOf('listen', both(times, 'listenS'), origin),
      phaseOf('frame', { ...both(times, 'receiveS'), role: 'receive' }, AIRTIME),
      phaseOf('acknowledgement', { ...both(times, 'transmitS'), role: 'transmit' }, origin),
      restPhase(phy, times),
    ],
    worstS: times.slotS,
    frame,
    loadedOctets: null,
    deliveredProbability: 1 - frameErrorRate,
    onAirMeanS: times.mean.transmitS,
    onAirWorstS: times.worst.transmitS,
  };
}
