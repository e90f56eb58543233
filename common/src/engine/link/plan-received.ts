import { acknowledgedExchange } from './acknowledged-exchange.ts';
import { assemblePlan, phaseOf } from './assemble-plan.ts';
import type { ExchangePhase, ExchangePlan } from './exchange-plan.types.ts';
import { frameLayout } from './frame-layout.ts';
import { standardFrame } from './link-defaults.table.ts';
import { macHeader } from './mac-header.ts';
import { overhear, receptionOf } from './overhearing.ts';
import { planPhy } from './plan-context.ts';
import type { PlanOf } from './plan-context.ts';
import { accessInput, AIRTIME, exchangePhases, IMMEDIATE_ACK_OCTETS } from './plan-exchange.ts';
import { frameLossOf } from './plan-losses.ts';
import { acknowledgedFigures, acknowledgedInput, airOptions } from './plan-sent.ts';
import { scanTimes } from './scan.ts';

const RECEPTION = {
  formula: '(1 − e_f) · (aTurnaroundTime, T_ack)',
  source: 'IEEE 802.15.4-2006 7.5.6.4.2 as coded in ns-3 lr-wpan-mac.cc @1406464',
};
const GIVEN = { formula: 'as given', source: 'given in the step' };

/**
 * A frame received and acknowledged.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `receptionOf` and `frameLayout` throw.
 * @example planReceive(context).phases.map(({ id }) => id) // ['frame', 'turnaround', 'acknowledgement']
 */
export function planReceive(context: PlanOf<'receive'>): ExchangePlan {
  const { exchange, link } = context;
  const phy = planPhy(link);
  const frame = frameLayout(phy, exchange, link);
  const { ackPsduOctets = IMMEDIATE_ACK_OCTETS, listenS } = exchange;
  const frameErrorRate = frameLossOf(context, phy, frame.psduOctets);
  const sizes = { psduOctets: frame.psduOctets, ackPsduOctets };
  const { mean, worst } = receptionOf(phy, { ...sizes, frameErrorRate, listenS, ...airOptions(context) });
  return assemblePlan(context, {
    phases: [
      phaseOf('listen', { meanS: mean.listenS, worstS: worst.listenS, name: 'listening for the frame' }, GIVEN),
      phaseOf('frame', { meanS: mean.receiveS, worstS: worst.receiveS, role: 'receive' }, AIRTIME),
      phaseOf(
        'turnaround',
        { meanS: mean.turnaroundS, worstS: worst.turnaroundS, name: 'turnaround before the acknowledgement' },
        RECEPTION,
      ),
      phaseOf('acknowledgement', { meanS: mean.transmitS, worstS: worst.transmitS, role: 'transmit' }, RECEPTION),
    ],
    worstS: worst.durationS,
    frame,
    loadedOctets: null,
    deliveredProbability: 1 - frameErrorRate,
    payloadOctets: exchange.payloadOctets,
    onAirMeanS: mean.transmitS,
    onAirWorstS: worst.transmitS,
  });
}

/**
 * A frame received, acknowledged and sent on in an acknowledged exchange, which happens only when it arrived.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `receptionOf`, `acknowledgedExchange` and `frameLayout` throw.
 * @example planForward(context).phases[0]?.id // 'response'
 */
export function planForward(context: PlanOf<'forward'>): ExchangePlan {
  const { exchange, link } = context;
  const phy = planPhy(link);
  const frame = frameLayout(phy, exchange, link);
  const input = { ...accessInput(context), ...acknowledgedInput(context, phy, frame) };
  const { psduOctets, frameErrorRate, ackPsduOctets = IMMEDIATE_ACK_OCTETS } = input;
  const { mean, worst } = receptionOf(phy, { psduOctets, ackPsduOctets, frameErrorRate, ...airOptions(context) });
  const sent = acknowledgedExchange(phy, input);
  acknowledgedFigures(context, sent);
  const arrived = 1 - frameErrorRate;
  const onwards = exchangePhases(context, phy, sent).map((phase): ExchangePhase => {
    const isTurnaround = phase.id === 'turnaround';
    return {
      ...phase,
      meanS: arrived * phase.meanS + (isTurnaround ? mean.turnaroundS : 0),
      worstS: phase.worstS + (isTurnaround ? worst.turnaroundS : 0),
      formula: `(1 − e_f) · ${phase.formula}`,
    };
  });
  return assemblePlan(context, {
    phases: [
      phaseOf('response', { meanS: mean.receiveS, worstS: worst.receiveS, name: 'frame to be forwarded' }, AIRTIME),
      phaseOf(
        'response-acknowledgement',
        { meanS: mean.transmitS, worstS: worst.transmitS, name: 'acknowledgement of the frame to be forwarded' },
        RECEPTION,
      ),
      ...onwards,
    ],
    worstS: worst.durationS + sent.worstCaseS,
    worstAttempts: Math.round(sent.worst.transmitS / sent.frameS),
    frame,
    deliveredProbability: arrived * sent.receivedProbability,
    payloadOctets: exchange.payloadOctets,
    onAirMeanS: mean.transmitS + arrived * sent.transmitS,
    onAirWorstS: worst.transmitS + sent.worst.transmitS,
  });
}

/**
 * A frame for another node: received whole, or until its header tells.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `overhear` and `frameLayout` throw.
 * @example planOverhear(context).phases[0]?.role // 'receive'
 */
export function planOverhear(context: PlanOf<'overhear'>): ExchangePlan {
  const { exchange, link } = context;
  const phy = planPhy(link);
  const frame = frameLayout(phy, exchange, link);
  const stopsAfterOctets = exchange.stopsAfterHeader === true ? headerOctets(context) : null;
  const { receiveS } = overhear(phy, { psduOctets: frame.psduOctets, stopsAfterOctets, ...airOptions(context) });
  const origin = {
    formula: stopsAfterOctets === null ? AIRTIME.formula : 'SHR, PHR and MAC header · octet time',
    source: stopsAfterOctets === null ? AIRTIME.source : 'common practice, no source',
  };
  return assemblePlan(context, {
    phases: [
      phaseOf('frame', { meanS: receiveS, worstS: receiveS, role: 'receive', name: 'frame for another node' }, origin),
    ],
    frame,
    loadedOctets: null,
    payloadOctets: exchange.payloadOctets,
    onAirMeanS: 0,
    onAirWorstS: 0,
  });
}

function headerOctets({ link }: PlanOf<'overhear'>): number {
  return macHeader({ ...standardFrame, ...link.frame, maxPsduOctets: Number.MAX_SAFE_INTEGER }).headerOctets;
}

/**
 * A passive scan for a parent over all channels of a list.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `scanTimes` throws.
 * @example planScan(context).phases.map(({ id }) => id) // ['retune', 'listen']
 */
export function planScan(context: PlanOf<'scan'>): ExchangePlan {
  const { channels, scanDuration, retuneS } = context.exchange;
  const times = scanTimes(planPhy(context.link), { channels, scanDuration, retuneS, requestPsduOctets: null });
  return assemblePlan(context, {
    phases: [
      phaseOf(
        'retune',
        { meanS: times.retuneS, worstS: times.retuneS, longestS: retuneS },
        { formula: 'channels · retune time', source: 'given in the step' },
      ),
      phaseOf(
        'listen',
        { meanS: times.listenS, worstS: times.listenS, longestS: times.channelS, name: 'listening for beacons' },
        { formula: 'channels · 960 · (2^n + 1) · T_symbol', source: 'IEEE 802.15.4-2006 7.5.2.1' },
      ),
    ],
    frame: null,
    loadedOctets: null,
    onAirMeanS: 0,
    onAirWorstS: 0,
  });
}
