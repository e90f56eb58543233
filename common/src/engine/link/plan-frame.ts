import type { ExchangeDuration } from '../scenario/scenario.types.ts';
import { accessOf, accessPhases } from './plan-access.ts';
import { assemblePlan, phaseOf } from './assemble-plan.ts';
import type { PlanDraft } from './assemble-plan.ts';
import type { ExchangePlan, FrameLayout, Origin } from './exchange-plan.types.ts';
import { frameLayout } from './frame-layout.ts';
import { frameLossOf } from './plan-losses.ts';
import { planPhy } from './plan-context.ts';
import type { PlanContext } from './plan-context.ts';
import { spacePhase } from './plan-space.ts';

/** Formula and source of a frame's time on air. */
export const AIRTIME: Origin = {
  formula: '8 · (SHR + PHR + PSDU) / R; rate-1/2 coding doubles PHR and PSDU',
  source: 'IEEE 802.15.4 PPDU format as coded in ns-3 lr-wpan-phy.cc @1406464',
};

/**
 * One frame sent once: what its plan holds beside the phases.
 *
 * @param frame The frame.
 * @param payloadOctets Its payload, where it was given.
 * @returns Frame, payload and time on air; delivery is open.
 * @example onceOnAir(frame, 24).onAirMeanS === frame.airtimeS
 */
export function onceOnAir(frame: FrameLayout, payloadOctets: number | undefined): Omit<PlanDraft, 'phases'> {
  const onAirMeanS = frame.airtimeS;
  return {
    frame,
    deliveredProbability: null,
    payloadOctets: payloadOctets ?? null,
    onAirMeanS,
    onAirWorstS: frame.airtimeS,
  };
}

/**
 * A frame on the air and nothing else, in whatever state the step types.
 *
 * @param context Of the plan.
 * @returns The plan.
 * @throws What `frameLayout` throws.
 * @example planFrame(context).meanS === planFrame(context).frame?.airtimeS
 */
export function planFrame(context: PlanContext<Extract<ExchangeDuration, { pattern: 'frame' }>>): ExchangePlan {
  const { exchange, link } = context;
  const frame = frameLayout(planPhy(link), exchange, link);
  const phases = [phaseOf('frame', { meanS: frame.airtimeS, worstS: frame.airtimeS }, AIRTIME)];
  return assemblePlan(context, { ...onceOnAir(frame, exchange.payloadOctets), phases });
}

/**
 * A frame that nothing acknowledges: channel access, frame.
 *
 * @param context Of the plan.
 * @returns The plan; delivery fails with the access or with the frame.
 * @throws What `csmaCa` and `frameLayout` throw.
 * @example planUnacknowledged(context).phases.map(({ id }) => id) // ['backoff', 'assessment', 'turnaround', 'frame']
 */
export function planUnacknowledged(
  context: PlanContext<Extract<ExchangeDuration, { pattern: 'unacknowledged' }>>,
): ExchangePlan {
  const { exchange, link } = context;
  const phy = planPhy(link);
  const frame = frameLayout(phy, exchange, link);
  const access = accessOf(context, phy);
  const frameErrorRate = frameLossOf(context, phy, frame.psduOctets);
  const sent = 1 - access.csma.failureProbability;
  const onAirMeanS = sent * frame.airtimeS;
  const phases = [
    ...accessPhases(context, phy, access, { meanProcedures: 1, meanTransmissions: sent, worst: 1 }),
    phaseOf(
      'frame',
      { meanS: onAirMeanS, worstS: frame.airtimeS },
      { ...AIRTIME, formula: `(1 − c) · ${AIRTIME.formula}` },
    ),
    ...spacePhase(link, phy, frame.psduOctets, { mean: sent, worst: 1 }),
  ];
  const deliveredProbability = sent * (1 - frameErrorRate);
  return assemblePlan(context, {
    ...onceOnAir(frame, exchange.payloadOctets),
    phases,
    deliveredProbability,
    onAirMeanS,
  });
}
