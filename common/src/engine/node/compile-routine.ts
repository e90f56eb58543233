import type { Routine } from '../scenario/scenario.types.ts';
import { addBusyParts } from './busy-parts.ts';
import { expandStep } from './expand-step.ts';
import type { StepContext } from './expand-step.ts';
import { intervalsOf } from './intervals.ts';
import { layOut } from './lay-out.ts';
import type { Layout, StepModel } from './layout.types.ts';
import { fromMicros } from './micros.ts';
import type { RoutineProgram, Segment } from './node-program.types.ts';
import type { NodeReport } from './node-report.ts';
import type { OnAir, OnAirAccount } from './on-air.ts';
import type { PartModel, StateModel } from './part-model.ts';
import { reachableStateIds } from './transition-path.ts';

/** What all routines of a node share. */
export type RoutineContext = Omit<StepContext, 'isEnabled' | 'onAir'> & {
  /** Gets what the routine is on the air. */
  onAirAccount: OnAirAccount;
};

/**
 * Compiles one routine whose ids have been checked.
 *
 * @param context Parts, link defaults and the report, which gets every problem and remark.
 * @param routine The routine.
 * @param path Its path in the input.
 * @returns The program; not to be used when the report holds errors.
 * @example compileRoutine(context, node.routines[0], 'node.routines[0]').cycleS
 */
export function compileRoutine(context: RoutineContext, routine: Routine, path: string): RoutineProgram {
  const { parts, partById, report } = context;
  const onAir: OnAir[] = [];
  const stepContext = { ...context, isEnabled: routine.enabled, onAir };
  const steps = routine.steps.flatMap((step, index) => expandStep(stepContext, step, `${path}.steps[${index}]`));
  const withoutPath = new Set<string>();
  const layout = layOut({
    parts,
    steps,
    isCyclic: routine.schedule.kind === 'always',
    onNoPath: (part, from, to, stepIndex) => {
      const step = steps[stepIndex];
      const field = `${step?.path ?? path}.${step?.radioIndex === part.index ? 'duration' : `states.${part.part.id}`}`;
      const key = `${field} ${from.stateId} ${to.stateId}`;
      // Repeats of an exchange meet the same gap again and again.
      if (!withoutPath.has(key)) reportNoPath(report, { part, from, to, field });
      withoutPath.add(key);
    },
  });
  addBusyParts(layout, parts, partById, (mover, { hop }) => {
    if (routine.enabled) remarkBusyElsewhere(report, mover, hop.transitionIndex);
  });
  if (routine.enabled) for (const index of layout.instantMovers) remarkInstantMoves(report, parts[index]);
  const cycleS = fromMicros(layout.cycleUs) + layout.roundedOffS;
  if (routine.enabled) context.onAirAccount.add(routine.schedule, cycleS, onAir);
  return {
    routineId: routine.id,
    name: routine.name,
    schedule: routine.schedule,
    cycleS,
    intervals: intervalsOf(layout, routine.id, steps),
    segments: segmentsOf(layout, steps),
  };
}

function reportNoPath(
  report: NodeReport,
  { part, from, to, field }: { part: PartModel; from: StateModel; to: StateModel; field: string },
): void {
  const reachable = reachableStateIds(part, from);
  const expected = reachable.length === 0 ? 'nothing is reachable from there' : `reachable: ${reachable.join(', ')}`;
  report.inconsistent(
    'no-path',
    field,
    `"${part.part.name}" has no transitions that lead from "${from.stateId}" to "${to.stateId}"; ${expected}.`,
    { value: to.stateId, expected, move: { partId: part.part.id, fromStateId: from.stateId, toStateId: to.stateId } },
  );
}

function remarkInstantMoves(report: NodeReport, part: PartModel | undefined): void {
  if (!part) return;
  report.remark({
    code: 'instant-moves',
    message: `"${part.part.name}" declares no transition, so it changes its state in no time and without charge.`,
    path: `node.parts[${part.index}].transitions`,
  });
}

function remarkBusyElsewhere(report: NodeReport, mover: PartModel, transitionIndex: number): void {
  const transition = mover.part.transitions[transitionIndex];
  if (!transition?.busy) return;
  const { partId, stateId } = transition.busy;
  report.remark({
    code: 'busy-part-elsewhere',
    message: `While "${mover.part.name}" goes from "${transition.fromStateId}" to "${transition.toStateId}", the part "${partId}" is to be in "${stateId}", but it is in another state when that begins. Its way there is counted only where a step asks for it.`,
    path: `node.parts[${mover.index}].transitions[${transitionIndex}].busy`,
  });
}

function segmentsOf(layout: Layout, steps: readonly StepModel[]): Segment[] {
  return layout.spans.map(({ occupant, termsS, stepIndex }) => ({
    stepId: steps[stepIndex]?.step.id ?? '',
    partIndex: occupant.partIndex,
    activity: occupant.activity,
    draw: occupant.draw,
    durationTermsS: termsS,
  }));
}
