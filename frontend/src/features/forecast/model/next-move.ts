import type { Scenario } from '#common/engine/index.ts';
import type { InputProblem } from '#common/schemas/problem.ts';

export interface NextMove {
  headline: string;
  detail: string;
}

/** What to do next where there is no forecast to show, or null where nothing is missing. */
export function nextMove(scenario: Scenario | null, problems: readonly InputProblem[]): NextMove | null {
  if (scenario && scenario.node.parts.length === 0) {
    return {
      headline: 'Add the first part.',
      detail:
        'A node is made of parts that draw current in states: a radio, a controller, a sensor. The forecast starts with the first one.',
    };
  }
  if (scenario && !scenario.node.routines.some((routine) => routine.enabled && routine.steps.length > 0)) {
    return {
      headline: 'Add a routine.',
      detail:
        'So far the node only rests. A routine is a sequence of steps with a schedule, such as “report every 15 minutes”.',
    };
  }
  if (problems.length > 0) {
    return {
      headline:
        problems.length === 1 ? 'One entry needs another look.' : `${problems.length} entries need another look.`,
      detail: 'The forecast comes back as soon as they can be read.',
    };
  }
  return null;
}
