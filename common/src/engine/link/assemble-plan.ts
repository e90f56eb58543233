import type { StateRole } from '../scenario/scenario.types.ts';
import type { ExchangePhase, ExchangePlan, FrameLayout, Origin, PhaseId } from './exchange-plan.types.ts';
import { phaseNames } from './phase-names.table.ts';
import type { PlanContext } from './plan-context.ts';

/** Times of a phase, s. */
export interface PhaseTimes {
  meanS: number;
  worstS: number;
  /** Default: the worst is one stretch. */
  longestS?: number;
  /** Default: the usual role of the phase. */
  role?: StateRole;
  /** Default: the usual name of the phase. */
  name?: string;
}

/**
 * A phase of an exchange.
 *
 * @param id Which one.
 * @param times Mean, worst and longest time, s, and what differs from the usual name and role.
 * @param origin Formula and source.
 * @returns The phase.
 * @example phaseOf('frame', { meanS: 0.004, worstS: 0.016, longestS: 0.004 }, { formula: 'N · T', source: '…' }).role
 */
export function phaseOf(id: PhaseId, times: PhaseTimes, { formula, source }: Origin): ExchangePhase {
  const usual = phaseNames[id];
  const { meanS, worstS, longestS = worstS, role = usual.role, name = usual.name } = times;
  return { id, name, role, meanS, worstS, longestS, formula, source };
}

/** What a pattern makes of a plan; the rest follows. */
export interface PlanDraft {
  phases: ExchangePhase[];
  /** Longest duration where it is less than the sum of the phases' longest, s. */
  worstS?: number;
  worstAttempts?: number;
  frame: FrameLayout | null;
  deliveredProbability: number | null;
  payloadOctets: number | null;
  onAirMeanS: number;
  onAirWorstS: number;
}

/**
 * Puts a plan together: phases without any time left out, sums, figures and cautions that came up.
 *
 * @param context Of the plan.
 * @param draft What the pattern made of it.
 * @returns The plan.
 * @example assemblePlan(context, { ...draft, phases: [] }).meanS // 0
 */
export function assemblePlan({ figures, cautions }: PlanContext, draft: PlanDraft): ExchangePlan {
  const phases = draft.phases.filter(({ meanS, worstS }) => meanS > 0 || worstS > 0);
  let meanS = 0;
  let sumWorstS = 0;
  for (const phase of phases) {
    meanS += phase.meanS;
    sumWorstS += phase.worstS;
  }
  return {
    phases,
    meanS,
    worstS: draft.worstS ?? sumWorstS,
    worstAttempts: draft.worstAttempts ?? 1,
    frame: draft.frame,
    figures,
    deliveredProbability: draft.deliveredProbability,
    payloadOctets: draft.payloadOctets,
    onAirMeanS: draft.onAirMeanS,
    onAirWorstS: draft.onAirWorstS,
    cautions,
  };
}
