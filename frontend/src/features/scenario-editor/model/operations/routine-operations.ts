import type {
  Duration,
  LinkSettings,
  Routine,
  Scenario,
  Schedule,
  Step,
} from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { uniqueId, uniqueName } from '../ids.ts';
import { insertAt, moveBy, updateById } from '../list.ts';
import { withoutDanglingReferences } from '../references.ts';
import { newExchange } from './exchange-operations.ts';
import { updateNode } from './part-operations.ts';

function withRoutines(scenario: Scenario, change: (routines: Routine[]) => Routine[]): Scenario {
  return updateNode(scenario, (node) => {
    const routines = change(node.routines);
    return routines === node.routines ? node : { ...node, routines };
  });
}

export function updateRoutine(scenario: Scenario, routineId: string, change: (routine: Routine) => Routine): Scenario {
  return withRoutines(scenario, (routines) => updateById(routines, routineId, change));
}

/** A routine without steps, every quarter of an hour. */
export function emptyRoutine(name: string): Omit<Routine, 'id'> {
  return { name, enabled: true, schedule: { kind: 'every', periodS: 900 }, steps: [] };
}

/** Id that `addRoutine` gives to a routine of this name. */
export function idOfNewRoutine(scenario: Scenario, name: string): string {
  const { routines } = scenario.node;
  const unique = uniqueName(
    name,
    routines.map((other) => other.name),
  );
  return uniqueId(
    unique,
    routines.map((other) => other.id),
    'routine',
  );
}

export function addRoutine(
  scenario: Scenario,
  routine: Omit<Routine, 'id'>,
  at = scenario.node.routines.length,
): Scenario {
  if (scenario.node.routines.length >= LIMITS.routines) return scenario;
  const name = uniqueName(
    routine.name,
    scenario.node.routines.map((other) => other.name),
  );
  const id = idOfNewRoutine(scenario, name);
  const added = withRoutines(scenario, (routines) => insertAt(routines, at, { ...routine, id, name }));
  return updateNode(added, withoutDanglingReferences);
}

/** Adds a ready routine at the end; its steps get ids of their own. */
export function addReadyRoutine(scenario: Scenario, routine: Omit<Routine, 'id'>): Scenario {
  return addRoutine(scenario, { ...routine, steps: withNewIds(scenario, routine.steps) });
}

export function duplicateRoutine(scenario: Scenario, routineId: string): Scenario {
  const index = scenario.node.routines.findIndex((routine) => routine.id === routineId);
  const routine = scenario.node.routines[index];
  return routine
    ? addRoutine(scenario, { ...routine, steps: withNewIds(scenario, routine.steps) }, index + 1)
    : scenario;
}

function withNewIds(scenario: Scenario, steps: readonly Step[]): Step[] {
  const taken = new Set(scenario.node.routines.flatMap((routine) => routine.steps.map((step) => step.id)));
  return steps.map((step) => {
    const id = uniqueId(step.name, taken, 'step');
    taken.add(id);
    return { ...step, id };
  });
}

export function removeRoutine(scenario: Scenario, routineId: string): Scenario {
  return withRoutines(scenario, (routines) => {
    const kept = routines.filter((routine) => routine.id !== routineId);
    return kept.length === routines.length ? routines : kept;
  });
}

export function moveRoutine(scenario: Scenario, routineId: string, places: number): Scenario {
  return withRoutines(scenario, (routines) =>
    moveBy(
      routines,
      routines.findIndex((routine) => routine.id === routineId),
      places,
    ),
  );
}

/** Another kind of schedule with its usual figures; the conditions stay. */
export function scheduleOfKind(kind: Schedule['kind'], previous: Schedule): Schedule {
  const when = previous.when ? { when: previous.when } : {};
  const periodS = previous.kind === 'every' || previous.kind === 'window' ? previous.periodS : 900;
  switch (kind) {
    case 'every':
      return { kind, periodS, ...when };
    case 'random':
      return { kind, meanPerDay: 24, ...when };
    case 'window':
      return { kind, fromHour: 6, toHour: 18, periodS, ...when };
    case 'once':
      return { kind, afterS: 0, ...when };
    case 'always':
      return { kind, ...when };
  }
}

/** Another kind of duration with its usual figures. */
export function durationOfKind(kind: Duration['kind'], nodeLink?: LinkSettings): Duration {
  switch (kind) {
    case 'fixed':
      return { kind: 'fixed', typical: 0.001, provenance: { kind: 'assumed' } };
    case 'exchange':
      return newExchange(nodeLink);
    case 'serial':
      return { kind: 'serial', octets: 8, clockHz: 400_000 };
  }
}

function withSteps(scenario: Scenario, routineId: string, change: (steps: Step[]) => Step[]): Scenario {
  return updateRoutine(scenario, routineId, (routine) => {
    const steps = change(routine.steps);
    return steps === routine.steps ? routine : { ...routine, steps };
  });
}

export function updateStep(
  scenario: Scenario,
  routineId: string,
  stepId: string,
  change: (step: Step) => Step,
): Scenario {
  return withSteps(scenario, routineId, (steps) => updateById(steps, stepId, change));
}

/** The step with a part put into a state; an empty state id leaves the part at rest. */
export function withPartState(step: Step, partId: string, stateId: string): Step {
  const { [partId]: _before, ...others } = step.states;
  return { ...step, states: stateId === '' ? others : { ...others, [partId]: stateId } };
}

export function emptyStep(name: string): Omit<Step, 'id'> {
  return { name, states: {}, duration: durationOfKind('fixed') };
}

/** Id that `addStep` gives to a step; unique in the node, because the forecast names its critical step by id alone. */
export function idOfNewStep(scenario: Scenario, name: string): string {
  const taken = scenario.node.routines.flatMap((routine) => routine.steps.map((step) => step.id));
  return uniqueId(name, taken, 'step');
}

export function addStep(
  scenario: Scenario,
  routineId: string,
  step: Omit<Step, 'id'>,
  at = Number.POSITIVE_INFINITY,
): Scenario {
  const id = idOfNewStep(scenario, step.name);
  const added = withSteps(scenario, routineId, (steps) =>
    steps.length >= LIMITS.stepsPerRoutine ? steps : insertAt(steps, Math.min(at, steps.length), { ...step, id }),
  );
  return updateNode(added, withoutDanglingReferences);
}

export function duplicateStep(scenario: Scenario, routineId: string, stepId: string): Scenario {
  const steps = scenario.node.routines.find((routine) => routine.id === routineId)?.steps ?? [];
  const index = steps.findIndex((step) => step.id === stepId);
  const step = steps[index];
  return step ? addStep(scenario, routineId, step, index + 1) : scenario;
}

export function removeStep(scenario: Scenario, routineId: string, stepId: string): Scenario {
  return withSteps(scenario, routineId, (steps) => {
    const kept = steps.filter((step) => step.id !== stepId);
    return kept.length === steps.length ? steps : kept;
  });
}

export function moveStep(scenario: Scenario, routineId: string, stepId: string, places: number): Scenario {
  return withSteps(scenario, routineId, (steps) =>
    moveBy(
      steps,
      steps.findIndex((step) => step.id === stepId),
      places,
    ),
  );
}
