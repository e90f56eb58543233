import { InconsistentInputError } from '#common/errors.ts';
import type { StateRole } from '../scenario/scenario.types.ts';
import { requireNumber } from './checks.ts';
import { crystalCaution, crystalTolerance } from './crystal.ts';
import type { ExchangePhase, ExchangePlan, FrameLayout, Origin, PhaseId } from './exchange-plan.types.ts';
import { frameLoading } from './loading.ts';
import { phaseNames } from './phase-names.table.ts';
import { addFigure, planPhy } from './plan-context.ts';
import type { PlanContext } from './plan-context.ts';
import { serialTransferS } from './serial-transfer.ts';

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
  return { id, name, role, meanS, worstS, longestS: Math.min(longestS, worstS), formula, source };
}

/** What a pattern makes of a plan; the rest follows. */
export interface PlanDraft {
  phases: ExchangePhase[];
  /** Longest duration where it is less than the sum of the phases' longest, s. */
  worstS?: number;
  worstAttempts?: number;
  frame: FrameLayout | null;
  /** Octets that a loading brings into the radio; default the PSDU; null: nothing is sent. */
  loadedOctets?: number | null;
  deliveredProbability?: number | null;
  payloadOctets?: number | undefined;
  onAirMeanS: number;
  onAirWorstS: number;
}

/**
 * Puts a plan together: start of the crystal and loading of the frame in front, phases without any time left out, sums, figures
 * and cautions that came up.
 *
 * @param context Of the plan.
 * @param draft What the pattern made of it.
 * @returns The plan.
 * @throws InconsistentInputError code `nothing-to-load` for a loading without a frame to send; what `frameLoading` throws.
 * @example assemblePlan(context, { ...draft, phases: [] }).meanS // 0
 */
export function assemblePlan(context: PlanContext, draft: PlanDraft): ExchangePlan {
  const start = [...crystalStart(context), ...loadingOf(context, draft)];
  const phases = [...start, ...draft.phases].filter(({ meanS, worstS }) => meanS > 0 || worstS > 0);
  let meanS = 0;
  let sumWorstS = 0;
  let startWorstS = 0;
  for (const phase of phases) {
    meanS += phase.meanS;
    sumWorstS += phase.worstS;
  }
  for (const phase of start) startWorstS += phase.worstS;
  addCrystalCaution(context);
  return {
    phases,
    meanS,
    // Sums of the same times in another order may differ in their last digit.
    worstS: draft.worstS === undefined ? sumWorstS : Math.max(meanS, startWorstS + draft.worstS),
    worstAttempts: draft.worstAttempts ?? 1,
    frame: draft.frame,
    figures: context.figures,
    deliveredProbability: draft.deliveredProbability ?? null,
    payloadOctets: draft.payloadOctets ?? null,
    onAirMeanS: draft.onAirMeanS,
    onAirWorstS: draft.onAirWorstS,
    cautions: context.cautions,
  };
}

/** A frame alone is its airtime and nothing else. */
function crystalStart({ link, exchange }: PlanContext): ExchangePhase[] {
  const startUpS = link.crystal?.startUpS;
  if (startUpS === undefined || exchange.pattern === 'frame') return [];
  requireNumber(startUpS, { field: 'link.crystal.startUpS', min: 0, unit: 's' });
  const origin = { formula: 'as given, at each exchange', source: 'given in the link settings' };
  return [phaseOf('crystal-start', { meanS: startUpS, worstS: startUpS }, origin)];
}

function loadingOf(context: PlanContext, draft: PlanDraft): ExchangePhase[] {
  const { exchange, link } = context;
  const { loading } = exchange;
  if (loading === undefined) return [];
  const octets = draft.loadedOctets === undefined ? draft.frame?.psduOctets : draft.loadedOctets;
  if (octets === undefined || octets === null) {
    throw new InconsistentInputError('The exchange sends no frame of its own, so there is nothing to load.', {
      code: 'nothing-to-load',
      field: 'loading',
      expected: 'no loading, or a pattern that sends',
    });
  }
  const { preambleOctets, forwardErrorCorrection } = link;
  const times =
    draft.frame === null
      ? withoutPhy(octets, loading)
      : frameLoading(planPhy(link), octets, loading, { preambleOctets, forwardErrorCorrection });
  const origin = {
    formula: 'octets · (bits an octet / clock + overhead an octet) + overhead; beside sending only its lead',
    source: 'definition',
  };
  if (times.besideS > 0) {
    const name = 'Loading beside the frame';
    addFigure(context, { id: 'loading-beside', name, value: times.besideS, unit: 's', ...origin });
  }
  return [phaseOf('loading', { meanS: times.beforeS, worstS: times.beforeS }, origin)];
}

/** Links that are far slower than any serial line. */
function withoutPhy(
  octets: number,
  loading: NonNullable<PlanContext['exchange']['loading']>,
): { beforeS: number; besideS: number } {
  const loadS = serialTransferS({ ...loading, octets });
  return loading.beside === true ? { beforeS: 0, besideS: loadS } : { beforeS: loadS, besideS: 0 };
}

function addCrystalCaution({ link, cautions }: PlanContext): void {
  if (link.crystal === undefined || link.phy === undefined) return;
  const caution = crystalCaution(crystalTolerance(link.crystal).totalPpm, link.phy);
  if (caution) cautions.push(caution);
}
