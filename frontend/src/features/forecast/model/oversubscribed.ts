import { compileNode, cyclesPerDay, oversubscription, type Scenario } from '#common/engine/index.ts';
import { EngineError } from '#common/errors.ts';
import { DAY_S } from '#common/units/si.ts';
import { percent, seconds } from './figures.ts';
import { partName, routineName } from './names.ts';

export interface Oversubscription {
  name: string;
  /** What it needs, with unit. */
  need: string;
  /** What there is, as the end of a clause. */
  available: string;
}

/** Routines longer than their period, or else parts busy for more than all the time; largest excess first. */
export function oversubscriptions(scenario: Scenario): Oversubscription[] {
  try {
    const { regulator } = scenario.supply;
    const defaultReferenceVoltageV = regulator.kind === 'none' ? 3 : regulator.outputV;
    const program = compileNode(scenario.node, { defaultReferenceVoltageV });
    const rates = program.routines.map(({ schedule, cycleS }) => cyclesPerDay(schedule, cycleS) / DAY_S);
    const { routines, parts } = oversubscription(program, rates);
    if (routines.length > 0) {
      return [...routines]
        .sort((a, b) => b.cycleS / b.periodS - a.cycleS / a.periodS)
        .map(({ routineId, cycleS, periodS }) => ({
          name: routineName(scenario, routineId),
          need: seconds(cycleS),
          available: `and comes every ${seconds(periodS)}`,
        }));
    }
    return [...parts]
      .sort((a, b) => b.share - a.share)
      .map(({ partId, share }) => ({
        name: partName(scenario, partId),
        need: percent(share),
        available: 'of the time',
      }));
  } catch (error) {
    // A node that does not compile has problems of its own, which are told elsewhere.
    if (error instanceof EngineError) return [];
    throw error;
  }
}
