/** Small nodes for tests: what a test does not name is harmless. */
import type { Node, Part, Routine, Schedule, State, Step, Transition } from '#common/engine/scenario/scenario.types.ts';

/** A part whose states are given as current in A by id; the first one is its rest state. */
export function buildPart(
  id: string,
  currentsA: Record<string, number>,
  overrides: Partial<Omit<Part, 'states'>> & { states?: Record<string, Partial<State>> } = {},
): Part {
  const { states: stateOverrides = {}, ...rest } = overrides;
  const states = Object.entries(currentsA).map(([stateId, typical]): State => ({
    id: stateId,
    name: stateId,
    current: { typical },
    ...stateOverrides[stateId],
  }));
  return {
    id,
    name: id,
    kind: 'other',
    states,
    restStateId: states[0]?.id ?? '',
    transitions: [],
    lowestVoltageV: { typical: 0 },
    ...rest,
  };
}

/** A transition written `from>to`. */
export function buildTransition(
  fromTo: string,
  durationS: number,
  currentA = 0,
  busy?: Transition['busy'],
): Transition {
  const [fromStateId = '', toStateId = ''] = fromTo.split('>');
  const transition = { fromStateId, toStateId, durationS: { typical: durationS }, current: { typical: currentA } };
  return busy ? { ...transition, busy } : transition;
}

/** A typed step. */
export function buildStep(id: string, durationS: number, states: Record<string, string>, repeats?: number): Step {
  const step: Step = { id, name: id, states, duration: { kind: 'fixed', typical: durationS } };
  return repeats === undefined ? step : { ...step, repeats };
}

/** An enabled routine, every 100 s where nothing else is said. */
export function buildRoutine(id: string, steps: Step[], schedule: Schedule = { kind: 'every', periodS: 100 }): Routine {
  return { id, name: id, enabled: true, schedule, steps };
}

/** A node of these parts and routines, without leakages. */
export function buildNode(parts: Part[], routines: Routine[], overrides: Partial<Node> = {}): Node {
  return { parts, routines, leakages: [], ...overrides };
}

/** Runs something that must throw and returns the error, typed. */
export function errorOf<T extends Error>(kind: new (...args: never[]) => T, run: () => unknown): T {
  try {
    run();
  } catch (error) {
    if (error instanceof kind) return error;
    throw error;
  }
  throw new Error(`Expected a ${kind.name}, but nothing was thrown.`);
}
