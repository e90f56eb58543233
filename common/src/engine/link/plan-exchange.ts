import { phaseOf } from './assemble-plan.ts';
import type { ExchangeParts } from './exchange-over-access.ts';
import type { ExchangePhase, Origin } from './exchange-plan.types.ts';
import { phyConstant } from './phy-constant.ts';
import type { Phy } from './phy.types.ts';
import { probabilityOf } from './plan-context.ts';
import type { PlanContext } from './plan-context.ts';

/** Source of everything about carrier sense. */
export const CSMA_SOURCE =
  'IEEE 802.15.4-2020 6.2.5.1 as coded in ns-3 lr-wpan-csmaca.cc @1406464; expectations derived';
/** Source of everything about acknowledgements and retries. */
export const RETRY_SOURCE = 'IEEE 802.15.4-2006 7.5.6.4 as coded in ns-3 lr-wpan-mac.cc @1406464; expectations derived';
const SPACE_SOURCE = 'IEEE 802.15.4-2006 7.5.1.3 as coded in ns-3 lr-wpan-mac.cc @1406464';

/** Formula and source of a frame's time on air. */
export const AIRTIME: Origin = {
  formula: 'T = 8 · (SHR + PHR + PSDU) / R; rate-1/2 coding doubles PHR and PSDU',
  source: 'IEEE 802.15.4 PPDU format as coded in ns-3 lr-wpan-phy.cc @1406464',
};

/** Octets of an immediate acknowledgement: frame control 2, sequence number 1, FCS 2. */
export const IMMEDIATE_ACK_OCTETS = 5;

/**
 * What a plan says of the busy channel, as `csmaCa` takes it: probability as given or assumed, backoff as the link sets it.
 *
 * @param context Gets the figure, and a caution where it is assumed.
 * @returns Busy probability and backoff settings.
 * @throws OutOfRangeError code `out-of-range` outside 0 to 1.
 * @example accessInput(context).busyProbability
 */
export function accessInput(context: PlanContext): {
  busyProbability: number;
  macMinBE?: number;
  macMaxBE?: number;
  macMaxCSMABackoffs?: number;
} {
  const { macMinBE, macMaxBE, macMaxCSMABackoffs, busyProbability: quantity } = context.link;
  const busyProbability = probabilityOf(context, 'busyProbability', { quantity, field: 'link.busyProbability' });
  return { busyProbability, macMinBE, macMaxBE, macMaxCSMABackoffs };
}

/** An exchange over channel access, as `acknowledgedExchange` and its like give it. */
export interface ExchangeTimes extends ExchangeParts {
  worst: ExchangeParts;
  longestBackoffS: number;
  frameS: number;
  /** One change of channel, s; default: none. */
  oneRetuneS?: number;
}

/** Origins of the phases of an exchange: N accesses, R retries, c access failure, p acknowledged. */
const ORIGINS = {
  retune: { formula: 'changes of channel · retune time', source: 'given in the step' },
  backoff: { formula: 'N · Σ a^i · (2^min(macMinBE + i, macMaxBE) − 1)/2 · T_unit', source: CSMA_SOURCE },
  assessment: { formula: 'N · Σ a^i · T_cca', source: CSMA_SOURCE },
  frame: { formula: `(1 − c) · N · T; ${AIRTIME.formula}`, source: `${AIRTIME.source}; ${RETRY_SOURCE}` },
  wait: { formula: '(1 − c) · N · (p · T_turnaround + (1 − p) · macAckWaitDuration)', source: RETRY_SOURCE },
  acknowledgement: { formula: '(1 − c) · N · p · T_ack', source: RETRY_SOURCE },
  space: { formula: 'macSIFSPeriod up to 18 octets of MPDU, else macLIFSPeriod', source: SPACE_SOURCE },
} as const;

/**
 * Phases of an exchange over channel access, all attempts together, in the order of time.
 *
 * @param context Of the plan.
 * @param phy The PHY.
 * @param exchange Its means, worst times and single stretches, s.
 * @returns Phases, those without any time included.
 * @throws InconsistentInputError code `constant-unknown` where the PHY lacks assessment or turnaround.
 * @example exchangePhases(context, phy, acknowledgedExchange(phy, input)).length // 8
 */
export function exchangePhases({ link }: PlanContext, phy: Phy, exchange: ExchangeTimes): ExchangePhase[] {
  const { worst, frameS, longestBackoffS } = exchange;
  const attempts = frameS > 0 ? Math.round(worst.transmitS / frameS) : 1;
  const turnaroundS = phyConstant(phy, 'turnaroundS');
  const turnaround = { formula: '(1 − c) · N · aTurnaroundTime', source: phy.sources.turnaroundS };
  const longestWaitS = worst.acknowledgementWaitS / attempts;
  const { retuneS, oneRetuneS } = exchange;
  const access = [
    phaseOf('retune', { meanS: retuneS, worstS: worst.retuneS, longestS: oneRetuneS }, ORIGINS.retune),
    phaseOf(
      'backoff',
      {
        meanS: exchange.backoffS,
        worstS: worst.backoffS,
        longestS: longestBackoffS,
        role: link.backoffIn ?? 'idle',
      },
      ORIGINS.backoff,
    ),
    phaseOf(
      'assessment',
      { meanS: exchange.assessmentS, worstS: worst.assessmentS, longestS: phyConstant(phy, 'ccaS') },
      ORIGINS.assessment,
    ),
  ];
  const { transmitS, acknowledgementWaitS, acknowledgementS, interframeSpaceS } = exchange;
  return [
    ...access,
    phaseOf(
      'turnaround',
      { meanS: exchange.turnaroundS, worstS: worst.turnaroundS, longestS: turnaroundS },
      turnaround,
    ),
    phaseOf('frame', { meanS: transmitS, worstS: worst.transmitS, longestS: frameS }, ORIGINS.frame),
    phaseOf(
      'acknowledgement-wait',
      { meanS: acknowledgementWaitS, worstS: worst.acknowledgementWaitS, longestS: longestWaitS },
      ORIGINS.wait,
    ),
    phaseOf('acknowledgement', { meanS: acknowledgementS, worstS: worst.acknowledgementS }, ORIGINS.acknowledgement),
    phaseOf('interframe-space', { meanS: interframeSpaceS, worstS: worst.interframeSpaceS }, ORIGINS.space),
  ];
}
