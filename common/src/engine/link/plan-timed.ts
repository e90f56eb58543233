import { assemblePlan, phaseOf } from './assemble-plan.ts';
import type { ExchangePlan } from './exchange-plan.types.ts';
import { frameLayout } from './frame-layout.ts';
import { guardWindow, longestResynchronisationS } from './guard-window.ts';
import { assumedSinceHeardS } from './link-defaults.table.ts';
import { addFigure, planPhy, probabilityOf } from './plan-context.ts';
import type { PlanContext, PlanOf } from './plan-context.ts';
import { AIRTIME } from './plan-exchange.ts';
import { frameLossOf, tolerancesOf } from './plan-losses.ts';
import { airOptions } from './plan-sent.ts';
import { sampledListening, sampledSender } from './sampled-listening.ts';
import { beaconTracking } from './superframe.ts';
import type { BeaconTracking } from './superframe.ts';

const SUPERFRAME_SOURCE =
  'IEEE 802.15.4-2020 as coded in Zephyr ieee802154_radio.h @045e3a8; aMaxLostBeacons 4 from ns-3 lr-wpan-constants.h @1406464';
const GUARD = {
  formula: 'half = (ppm A + ppm B) · interval + jitter; window = 2 · half',
  source: 'common practice, no source; the same sum is in OpenThread sub_mac_csl_receiver.cpp @0486979',
};
const SAMPLING_SOURCE = 'IEEE 15-09-0828-00-004e; OpenThread radio.h';

function timeFigure(
  context: PlanContext,
  id: string,
  name: string,
  value: { s: number; formula: string; source: string },
): void {
  addFigure(context, { id, name, value: value.s, unit: 's', formula: value.formula, source: value.source });
}

/**
 * One beacon interval of a device that tracks beacons: guard, beacon, contention period.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `beaconTracking` throws.
 * @example planBeacon(context).phases.map(({ id }) => id) // ['guard', 'frame']
 */
export function planBeacon(context: PlanOf<'beacon'>): ExchangePlan {
  const { exchange, link } = context;
  const phy = planPhy(link);
  const { beaconOrder, superframeOrder, beaconPsduOctets, contentionS, missedBeaconProbability: quantity } = exchange;
  const frame = frameLayout(phy, { psduOctets: beaconPsduOctets }, link);
  const times = beaconTracking(phy, {
    beaconOrder,
    superframeOrder,
    beaconPsduOctets,
    contentionS,
    missedBeaconProbability: probabilityOf(context, 'missedBeaconProbability', {
      quantity,
      field: 'missedBeaconProbability',
    }),
    ...tolerancesOf(context),
    ...airOptions(context),
  });
  beaconFigures(context, times);
  const guard = {
    formula: `Σ_k P(k) · ((1 − m) · half_k + m · (2 · half_k + T)); ${GUARD.formula}`,
    source: SUPERFRAME_SOURCE,
  };
  return assemblePlan(context, {
    phases: [
      phaseOf('guard', { meanS: times.listenS, worstS: times.worstListenS }, guard),
      phaseOf(
        'frame',
        { meanS: times.receiveS, worstS: times.worstReceiveS, role: 'receive', name: 'beacon' },
        { ...AIRTIME, formula: `(1 − m) · T; ${AIRTIME.formula}` },
      ),
      phaseOf(
        'listen',
        { meanS: times.contentionS, worstS: times.worstContentionS, name: 'contention period' },
        { formula: '(1 − m) · time given', source: 'given in the step' },
      ),
    ],
    worstS: times.worstDurationS,
    frame,
    loadedOctets: null,
    onAirMeanS: 0,
    onAirWorstS: 0,
  });
}

function beaconFigures(context: PlanContext, times: BeaconTracking): void {
  const source = SUPERFRAME_SOURCE;
  const { beaconIntervalS, guardHalfS, missedBeaconS, lostProbability } = times;
  const interval = { s: beaconIntervalS, formula: '960 · 2^BO · T_symbol', source };
  timeFigure(context, 'beaconInterval', 'Beacon interval', interval);
  timeFigure(context, 'guardHalf', 'Guard on one side', { s: guardHalfS, ...GUARD });
  const missed = { s: missedBeaconS, formula: '2 · half + T', source };
  timeFigure(context, 'missedBeacon', 'Listening for a missed beacon', missed);
  addFigure(context, {
    id: 'lost',
    name: 'Probability per beacon that the coordinator counts as lost',
    value: lostProbability,
    unit: 'probability',
    formula: 'm^4 / (1 + m + m² + m³)',
    source,
  });
}

/**
 * A window around the time at which a frame is expected: one guard before it on average, two at the most; without a frame the
 * whole window.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `guardWindow` throws.
 * @example planGuard(context).worstS
 */
export function planGuard(context: PlanOf<'guard'>): ExchangePlan {
  const { exchange, link } = context;
  const { intervalS, jitterS, psduOctets } = exchange;
  const tolerances = tolerancesOf(context);
  const { halfS, windowS } = guardWindow({ intervalS, jitterS, ...tolerances });
  const frame = psduOctets === undefined ? null : frameLayout(planPhy(link), { psduOctets }, link);
  timeFigure(context, 'guardHalf', 'Guard on one side', { s: halfS, ...GUARD });
  const longestS = longestResynchronisationS({ guardS: 0.001, jitterS, ...tolerances });
  if (longestS !== null) {
    const formula = '(1 ms − jitter) / (ppm A + ppm B)';
    timeFigure(context, 'resynchronisation', 'Longest interval that a guard of 1 ms covers', {
      s: longestS,
      formula,
      source: GUARD.source,
    });
  }
  const airtimeS = frame?.airtimeS ?? 0;
  return assemblePlan(context, {
    phases: [
      phaseOf('guard', { meanS: frame === null ? windowS : halfS, worstS: windowS }, GUARD),
      phaseOf('frame', { meanS: airtimeS, worstS: airtimeS, role: 'receive' }, AIRTIME),
    ],
    frame,
    loadedOctets: null,
    onAirMeanS: 0,
    onAirWorstS: 0,
  });
}

/**
 * One sample of a listener that samples the channel.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `sampledListening` throws.
 * @example planSampledListener(context).phases[0]?.id // 'listen'
 */
export function planSampledListener(context: PlanOf<'sampled-listener'>): ExchangePlan {
  const { exchange, link } = context;
  const { periodUnits, sampleS } = exchange;
  const { periodS, wakeUpSequenceS } = sampledListening(planPhy(link), { periodUnits, sampleS });
  const source = SAMPLING_SOURCE;
  timeFigure(context, 'period', 'Sampling period', { s: periodS, formula: 'units · 10 · T_symbol', source });
  timeFigure(context, 'wakeUpSequence', 'Wake-up sequence of an unsynchronised sender', {
    s: wakeUpSequenceS,
    formula: 'as long as the period',
    source,
  });
  return assemblePlan(context, {
    phases: [
      phaseOf(
        'listen',
        { meanS: sampleS, worstS: sampleS, name: 'sample' },
        { formula: 'as given', source: 'given in the step' },
      ),
    ],
    frame: null,
    loadedOctets: null,
    onAirMeanS: 0,
    onAirWorstS: 0,
  });
}

/**
 * A sender to a sampling listener: wake-up frames back to back, then the frame.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `sampledSender` throws.
 * @example planSampledSender(context).phases.map(({ id }) => id) // ['wake-up', 'frame']
 */
export function planSampledSender(context: PlanOf<'sampled-sender'>): ExchangePlan {
  const { exchange, link } = context;
  const { periodUnits, psduOctets, synchronised = false } = exchange;
  const phy = planPhy(link);
  const frame = frameLayout(phy, { psduOctets }, link);
  if (synchronised) {
    const message = `Nothing says how long ago the listener was last heard: ${assumedSinceHeardS} s are assumed (common practice, no source).`;
    context.cautions.push({ code: 'link-assumed', message, field: 'synchronised' });
  }
  const phase = synchronised ? { elapsedS: assumedSinceHeardS, ...tolerancesOf(context) } : null;
  const times = sampledSender(phy, { periodUnits, psduOctets, phase, ...airOptions(context) });
  addFigure(context, {
    id: 'wakeUpFrames',
    name: 'Wake-up frames',
    value: times.wakeUpFrames,
    unit: 'count',
    formula: '⌈period, or guard window where synchronised / T_wake-up⌉ + 1',
    source: SAMPLING_SOURCE,
  });
  const { wakeUpSequenceS, frameS, transmitS } = times;
  return assemblePlan(context, {
    phases: [
      phaseOf(
        'wake-up',
        { meanS: wakeUpSequenceS, worstS: wakeUpSequenceS },
        { formula: 'frames · T_wake-up', source: SAMPLING_SOURCE },
      ),
      phaseOf('frame', { meanS: frameS, worstS: frameS }, AIRTIME),
    ],
    frame,
    deliveredProbability: 1 - frameLossOf(context, phy, psduOctets),
    onAirMeanS: transmitS,
    onAirWorstS: transmitS,
  });
}
