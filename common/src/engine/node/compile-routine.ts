import { EngineError, InconsistentInputError } from '#common/errors.ts';
import { stepDuration } from '../link/step-duration.ts';
import type { StepDuration } from '../link/step-duration.ts';
import type { LinkSettings, Routine, Step } from '../scenario/scenario.types.ts';
import { addBusyParts } from './busy-parts.ts';
import { intervalsOf } from './intervals.ts';
import { layOut } from './lay-out.ts';
import type { Layout, StepModel } from './layout.types.ts';
import { fromMicros, toMicros } from './micros.ts';
import type { RoutineProgram, Segment } from './node-program.types.ts';
import type { NodeReport } from './node-report.ts';
import type { PartModel, StateModel } from './part-model.ts';
import { reachableStateIds } from './transition-path.ts';

/** What all routines of a node share. */
export interface RoutineContext {
  parts: readonly PartModel[];
  partById: ReadonlyMap<string, PartModel>;
  link: LinkSettings | undefined;
  report: NodeReport;
}

interface StepContext extends RoutineContext {
  /** Remarks of a disabled routine would tell of what is not counted anyway. */
  isEnabled: boolean;
}

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
  const stepContext = { ...context, isEnabled: routine.enabled };
  const steps = routine.steps.map((step, index) => stepModel(stepContext, step, `${path}.steps[${index}]`));
  const layout = layOut({
    parts,
    steps,
    isCyclic: routine.schedule.kind === 'always',
    onNoPath: (part, from, to, stepIndex) =>
      reportNoPath(report, { part, from, to, field: `${path}.steps[${stepIndex}].states.${part.part.id}` }),
  });
  addBusyParts(layout, parts, partById, (mover, { hop }) => {
    if (routine.enabled) remarkBusyElsewhere(report, mover, hop.transitionIndex);
  });
  if (routine.enabled) for (const index of layout.instantMovers) remarkInstantMoves(report, parts[index]);
  return {
    routineId: routine.id,
    name: routine.name,
    schedule: routine.schedule,
    cycleS: fromMicros(layout.cycleUs),
    intervals: intervalsOf(layout, routine.id, routine.steps),
    segments: segmentsOf(layout, routine.steps),
  };
}

function stepModel(context: StepContext, step: Step, path: string): StepModel {
  const { parts, partById, report } = context;
  const named = new Array<StateModel | undefined>(parts.length).fill(undefined);
  for (const partId of Object.keys(step.states)) {
    const part = partById.get(partId);
    if (part) named[part.index] = part.stateById.get(step.states[partId] ?? '');
  }
  for (const part of parts) if (part.hasNeeds) checkNeeds(context, { part, named, path });
  const { meanS, termsS, remark } = durationOrReport(context, step, path);
  if (remark && context.isEnabled) report.remark(remark);
  return { named, durationUs: toMicros(meanS), durationS: meanS, termsS };
}

function durationOrReport({ link, report }: RoutineContext, step: Step, path: string): StepDuration {
  try {
    return stepDuration(step, link, path);
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    report.add(error);
    return { meanS: 0, termsS: [0], remark: null };
  }
}

function checkNeeds(
  { partById, report }: RoutineContext,
  { part, named, path }: { part: PartModel; named: readonly (StateModel | undefined)[]; path: string },
): void {
  const { needs, stateId } = named[part.index] ?? part.rest;
  if (!needs) return;
  const needed = partById.get(needs.partId);
  if (!needed) return;
  const given = named[needed.index] ?? needed.rest;
  if (needs.stateIds.includes(given.stateId)) return;
  const expected = `"${needed.part.name}" in ${needs.stateIds.join(' or ')}`;
  report.add(
    new InconsistentInputError(
      `"${part.part.name}" in the state "${stateId}" needs ${expected}, but "${needed.part.name}" is in "${given.stateId}".`,
      {
        code: 'need-unmet',
        field: `${path}.states.${part.part.id}`,
        value: given.stateId,
        expected,
        relatedFields: [`${path}.states.${needed.part.id}`],
      },
    ),
  );
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
    { value: to.stateId, expected },
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

function segmentsOf(layout: Layout, steps: readonly Step[]): Segment[] {
  return layout.spans.map(({ occupant, termsS, stepIndex }) => ({
    stepId: steps[stepIndex]?.id ?? '',
    partIndex: occupant.partIndex,
    activity: occupant.activity,
    draw: occupant.draw,
    durationTermsS: termsS,
  }));
}
