import type { Node } from '../scenario/scenario.types.ts';
import { checkParts, checkRoutine } from './check-node.ts';
import { compileRoutine } from './compile-routine.ts';
import { constantDraw } from './draw.ts';
import type { NodeProgram, PartProgram, RoutineProgram } from './node-program.types.ts';
import { NodeReport } from './node-report.ts';
import { OnAirAccount } from './on-air.ts';
import { partModel } from './part-model.ts';
import type { PartModel } from './part-model.ts';

/**
 * Makes a node ready for charge and voltage: typical values, durations resolved, transitions taken, enabled routines only.
 * Disabled routines are checked like the others and then left out.
 *
 * Transitions: moves into a state run before the step over the path of least total duration (then least charge, then fewest
 * transitions), all moving parts in parallel and finishing together, the others holding the state of the step before. A part
 * that a step does not name returns to rest beside it. After the last step all return. `always` is a closed cycle: its first
 * step follows its last.
 *
 * @param node The node.
 * @param options Reference voltage of states that give none, V: the regulator's output, 3.0 V without one.
 * @returns The program, with remarks `instant-moves`, `busy-part-elsewhere`, `duty-cycle-exceeded`, those of exchanges whose phases the
 *   radio cannot follow as they are (`role-fallback`, `radio-open`, `turnaround-and-transition`, `start-up-and-transition`,
 *   `repeats-merged`), and the cautions of their plans.
 * @throws EngineErrors with every problem of the node: `duplicate-id`, `unknown-part`, `unknown-state`, `out-of-range`,
 *   `no-path`, `need-unmet`, and those of step durations.
 * @example compileNode(node, { defaultReferenceVoltageV: 3 }).routines[0]?.cycleS
 */
export function compileNode(
  node: Node,
  { defaultReferenceVoltageV }: { defaultReferenceVoltageV: number },
): NodeProgram {
  const report = new NodeReport();
  const statesOf = checkParts(node, report);
  node.routines.forEach((routine, index) => checkRoutine(routine, `node.routines[${index}]`, { statesOf, report }));
  // Paths mean nothing while ids point nowhere.
  report.throwErrors();
  const parts = node.parts.flatMap((part, index) => partModel(part, index, defaultReferenceVoltageV) ?? []);
  const partById = new Map(parts.map((part) => [part.part.id, part]));
  const routines: RoutineProgram[] = [];
  const onAirAccount = new OnAirAccount();
  node.routines.forEach((routine, index) => {
    const context = { parts, partById, link: node.link, report, onAirAccount };
    const program = compileRoutine(context, routine, `node.routines[${index}]`);
    if (routine.enabled) routines.push(program);
  });
  report.throwErrors();
  onAirAccount.caution(report);
  return {
    parts: parts.map(partProgram),
    leakages: node.leakages.map(({ id, name, current }) => ({
      leakageId: id,
      name,
      draw: constantDraw(current.typical, defaultReferenceVoltageV),
    })),
    routines,
    remarks: report.remarks,
  };
}

function partProgram({ part, rest }: PartModel): PartProgram {
  return {
    partId: part.id,
    name: part.name,
    restStateId: part.restStateId,
    restDraw: rest.occupant.draw,
    restLowestVoltageV: part.states[rest.index]?.lowestVoltageV?.typical ?? 0,
  };
}
