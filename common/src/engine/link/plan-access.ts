import { phaseOf } from './assemble-plan.ts';
import { csmaCa } from './csma-ca.ts';
import type { CsmaCa } from './csma-ca.ts';
import type { ExchangePhase } from './exchange-plan.types.ts';
import { phyConstant } from './phy-constant.ts';
import type { Phy } from './phy.types.ts';
import { addFigure, probabilityOf } from './plan-context.ts';
import type { PlanContext } from './plan-context.ts';

export const CSMA_SOURCE =
  'IEEE 802.15.4-2020 6.2.5.1 as coded in ns-3 lr-wpan-csmaca.cc @1406464; expectations derived';

/** Channel access as a plan needs it. */
export interface Access {
  csma: CsmaCa;
  busyProbability: number;
}

/**
 * Channel access of a plan: busy probability as given or assumed, backoff as the link sets it.
 *
 * @param context Gets the figures `busyProbability` and `accessFailure`, and a caution where busy is assumed.
 * @param phy The PHY.
 * @returns Carrier sense in closed form.
 * @throws What `csmaCa` throws.
 * @example accessOf(context, phy).csma.meanAccessS
 */
export function accessOf(context: PlanContext, phy: Phy): Access {
  const { macMinBE, macMaxBE, macMaxCSMABackoffs, busyProbability: quantity } = context.link;
  const busyProbability = probabilityOf(context, 'busyProbability', { quantity, field: 'link.busyProbability' });
  const csma = csmaCa(phy, { busyProbability, macMinBE, macMaxBE, macMaxCSMABackoffs });
  addFigure(context, {
    id: 'accessFailure',
    name: 'Probability that the channel stays busy until the access is given up',
    value: csma.failureProbability,
    unit: 'probability',
    formula: 'c = a^(macMaxCSMABackoffs + 1)',
    source: CSMA_SOURCE,
  });
  return { csma, busyProbability };
}

/** How often the channel is accessed, and how often a frame follows. */
export interface AccessCounts {
  meanProcedures: number;
  meanTransmissions: number;
  worst: number;
}

/**
 * Backoff, assessments and turnaround of all accesses of an exchange together.
 *
 * @param context Of the plan.
 * @param phy The PHY.
 * @param access Its channel access.
 * @param counts Mean and largest number of accesses.
 * @returns Three phases in the order of time.
 * @example accessPhases(context, phy, access, { meanProcedures: 1, meanTransmissions: 1, worst: 1 }).length // 3
 */
export function accessPhases(
  { link }: PlanContext,
  phy: Phy,
  { csma }: Access,
  { meanProcedures, meanTransmissions, worst }: AccessCounts,
): ExchangePhase[] {
  const unitS = phyConstant(phy, 'unitBackoffS');
  const ccaS = phyConstant(phy, 'ccaS');
  const turnaroundS = phyConstant(phy, 'turnaroundS');
  return [
    phaseOf(
      'backoff',
      {
        meanS: meanProcedures * csma.meanBackoffS,
        worstS: worst * csma.worstCaseUnits * unitS,
        longestS: csma.longestBackoffS,
        role: link.backoffIn ?? 'idle',
      },
      { formula: 'N · Σ a^i · (2^min(macMinBE + i, macMaxBE) − 1)/2 · T_unit', source: CSMA_SOURCE },
    ),
    phaseOf(
      'assessment',
      {
        meanS: meanProcedures * csma.meanAssessmentS,
        worstS: worst * csma.worstCaseAssessments * ccaS,
        longestS: ccaS,
      },
      { formula: 'N · Σ a^i · T_cca', source: CSMA_SOURCE },
    ),
    phaseOf(
      'turnaround',
      { meanS: meanTransmissions * turnaroundS, worstS: worst * turnaroundS, longestS: turnaroundS },
      { formula: '(1 − c) · N · T_turnaround', source: phy.sources.turnaroundS },
    ),
  ];
}
