import { chargeLedger, forecast } from '#common/engine/index.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { EngineError } from '#common/errors.ts';
import { planOf } from '../link/plan-of.ts';
import type { WhatIfTarget } from './what-if-axes.ts';

/** What a document comes to, as far as one step and its routine are concerned. */
export interface WhatIfFigures {
  /** Mean duration of one exchange, s. */
  meanS: number;
  /** Probability that the payload arrives; null where none is sent. */
  deliveredProbability: number | null;
  payloadOctets: number | null;
  /** Charge of one exchange and the moves into it, in excess of rest, C. */
  exchangeC: number;
  /** Charge of one cycle of the routine, in excess of rest, C. */
  cycleC: number;
  /** Charge of the routine in a mean day, in excess of rest, C. */
  dayC: number;
}

/** How long the node lives; `lifeS` null: longer than the forecast looks. */
export interface WhatIfLife {
  lifeS: number | null;
  outcome: string;
}

export type WhatIfOutcome =
  { kind: 'figures'; figures: WhatIfFigures; life: WhatIfLife | null } | { kind: 'problem'; message: string };

/** Temperature of data sheets, °C. */
const REFERENCE_C = 25;
const NO_REGULATOR_V = 3;

/**
 * Figures of a step and its routine, from the engine: at the voltage that states without one of their own are given for, at
 * 25 °C.
 *
 * @param document The scenario.
 * @param target The step.
 * @returns Figures, or why there are none.
 */
export function figuresOf(document: Scenario, { routineId, stepId }: WhatIfTarget): WhatIfOutcome {
  const { node, supply } = document;
  const routine = node.routines.find(({ id }) => id === routineId);
  const step = routine?.steps.find(({ id }) => id === stepId);
  if (!routine || step?.duration.kind !== 'exchange') return { kind: 'problem', message: 'The step is gone.' };
  const result = planOf(step.duration, node.link);
  if (result.kind === 'problem') return { kind: 'problem', message: result.message };
  const railVoltageV = supply.regulator.kind === 'none' ? NO_REGULATOR_V : supply.regulator.outputV;
  return orProblem(() => {
    const { entries } = chargeLedger(
      { ...node, routines: [{ ...routine, enabled: true }], leakages: [] },
      { railVoltageV, temperatureC: REFERENCE_C, defaultReferenceVoltageV: railVoltageV },
    );
    const perCycle = entries.filter(({ chargePerCycleC }) => chargePerCycleC !== null);
    const sum = (rows: typeof entries): number =>
      rows.reduce((total, { chargePerCycleC }) => total + Number(chargePerCycleC), 0);
    const dayC = perCycle.reduce((total, { chargeC }) => total + Number(chargeC), 0);
    const { meanS, deliveredProbability, payloadOctets } = result.plan;
    const exchangeC = sum(perCycle.filter((entry) => entry.stepId === stepId)) / (step.repeats ?? 1);
    const figures = { meanS, deliveredProbability, payloadOctets, exchangeC, cycleC: sum(perCycle), dayC };
    return { kind: 'figures', figures, life: null };
  });
}

/**
 * The same with the life of the node, for which the whole scenario is forecast.
 *
 * @param document The scenario.
 * @param target The step.
 * @returns Figures and life, or why there are none.
 */
export function outcomeOf(document: Scenario, target: WhatIfTarget): WhatIfOutcome {
  const outcome = figuresOf(document, target);
  if (outcome.kind === 'problem') return outcome;
  return orProblem(() => {
    const { lifeS, outcome: ending } = forecast(document);
    return { ...outcome, life: { lifeS, outcome: ending } };
  });
}

function orProblem(compute: () => WhatIfOutcome): WhatIfOutcome {
  try {
    return compute();
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    return { kind: 'problem', message: error.message };
  }
}
