import type {
  Leakage,
  Node,
  Part,
  PartKind,
  Scenario,
  State,
  Transition,
} from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { uniqueId, uniqueName } from '../ids.ts';
import { insertAt, mapKeeping, moveBy, updateAt, updateById } from '../list.ts';
import { withoutDanglingReferences } from '../references.ts';
import { guessRole } from '../role-guess.ts';

// Every operation takes a document and gives a new one; the same one where there is nothing to do or a limit is reached.

export function updateNode(scenario: Scenario, change: (node: Node) => Node): Scenario {
  const node = change(scenario.node);
  return node === scenario.node ? scenario : { ...scenario, node };
}

function withParts(scenario: Scenario, change: (parts: Part[]) => Part[]): Scenario {
  return updateNode(scenario, (node) => {
    const parts = change(node.parts);
    return parts === node.parts ? node : { ...node, parts };
  });
}

export function updatePart(scenario: Scenario, partId: string, change: (part: Part) => Part): Scenario {
  return withParts(scenario, (parts) => updateById(parts, partId, change));
}

/** A part with one state to rest in, all figures assumed. */
export function emptyPart(kind: PartKind, name: string): Part {
  return {
    id: 'part',
    name,
    kind,
    states: [{ id: 'sleep', name: 'Sleep', role: 'sleep', current: { typical: 0, provenance: { kind: 'assumed' } } }],
    restStateId: 'sleep',
    transitions: [],
    lowestVoltageV: { typical: 1.8, provenance: { kind: 'assumed' } },
  };
}

/**
 * Adds a part under a new id and a name of its own. What it needs of parts that are not here is left out, because a
 * library item may come from another node.
 */
export function addPart(scenario: Scenario, part: Part, at = scenario.node.parts.length): Scenario {
  return updateNode(scenario, (node) => {
    if (node.parts.length >= LIMITS.parts) return node;
    const name = uniqueName(
      part.name,
      node.parts.map((other) => other.name),
    );
    const id = idOfNewPart(node, name);
    const parts = insertAt(node.parts, at, withOwnId({ ...part, name }, id));
    return withoutDanglingReferences({ ...node, parts });
  });
}

/** Id that `addPart` gives to a part of this name. */
export function idOfNewPart(node: Node, name: string): string {
  const unique = uniqueName(
    name,
    node.parts.map((other) => other.name),
  );
  return uniqueId(
    unique,
    node.parts.map((other) => other.id),
    'part',
  );
}

/** The part under a new id, its references to itself included. */
function withOwnId(part: Part, id: string): Part {
  const own = (partId: string): string => (partId === part.id ? id : partId);
  const states = mapKeeping(part.states, (state) =>
    state.needs ? { ...state, needs: { ...state.needs, partId: own(state.needs.partId) } } : state,
  );
  const transitions = mapKeeping(part.transitions, (transition) =>
    transition.busy ? { ...transition, busy: { ...transition.busy, partId: own(transition.busy.partId) } } : transition,
  );
  return { ...part, id, states, transitions };
}

export function duplicatePart(scenario: Scenario, partId: string): Scenario {
  const index = scenario.node.parts.findIndex((part) => part.id === partId);
  const part = scenario.node.parts[index];
  return part ? addPart(scenario, part, index + 1) : scenario;
}

export function removePart(scenario: Scenario, partId: string): Scenario {
  return updateNode(scenario, (node) => {
    const parts = node.parts.filter((part) => part.id !== partId);
    return parts.length === node.parts.length ? node : withoutDanglingReferences({ ...node, parts });
  });
}

export function movePart(scenario: Scenario, partId: string, places: number): Scenario {
  return withParts(scenario, (parts) =>
    moveBy(
      parts,
      parts.findIndex((part) => part.id === partId),
      places,
    ),
  );
}

export function updateState(
  scenario: Scenario,
  partId: string,
  stateId: string,
  change: (state: State) => State,
): Scenario {
  return updatePart(scenario, partId, (part) => {
    const states = updateById(part.states, stateId, change);
    return states === part.states ? part : { ...part, states };
  });
}

/** Names a state; the role follows the name as long as it is the one that the old name suggested. */
export function renameState(state: State, name: string): State {
  const { role, ...rest } = state;
  const follows = role === undefined || role === guessRole(state.name);
  const next = follows ? guessRole(name) : role;
  return { ...rest, name, ...(next === undefined ? {} : { role: next }) };
}

export function addState(
  scenario: Scenario,
  partId: string,
  state: Omit<State, 'id'>,
  at = Number.POSITIVE_INFINITY,
): Scenario {
  return updatePart(scenario, partId, (part) => {
    if (part.states.length >= LIMITS.statesPerPart) return part;
    const name = uniqueName(
      state.name,
      part.states.map((other) => other.name),
    );
    const id = idOfNewState(part, name);
    const role = state.role ?? guessRole(name);
    const made: State = { ...state, id, name, ...(role === undefined ? {} : { role }) };
    return { ...part, states: insertAt(part.states, Math.min(at, part.states.length), made) };
  });
}

/** Id that `addState` gives to a state of this name. */
export function idOfNewState(part: Part, name: string): string {
  const unique = uniqueName(
    name,
    part.states.map((other) => other.name),
  );
  return uniqueId(
    unique,
    part.states.map((other) => other.id),
    'state',
  );
}

export function duplicateState(scenario: Scenario, partId: string, stateId: string): Scenario {
  const part = scenario.node.parts.find((candidate) => candidate.id === partId);
  const index = part?.states.findIndex((state) => state.id === stateId) ?? -1;
  const state = part?.states[index];
  return state ? addState(scenario, partId, state, index + 1) : scenario;
}

/** Removes a state with the transitions and references to it; the last state of a part stays. */
export function removeState(scenario: Scenario, partId: string, stateId: string): Scenario {
  const part = scenario.node.parts.find((candidate) => candidate.id === partId);
  if (!part || part.states.length < 2 || !part.states.some((state) => state.id === stateId)) return scenario;
  const removed = updatePart(scenario, partId, (current) => ({
    ...current,
    states: current.states.filter((state) => state.id !== stateId),
  }));
  return updateNode(removed, withoutDanglingReferences);
}

export function moveState(scenario: Scenario, partId: string, stateId: string, places: number): Scenario {
  return updatePart(scenario, partId, (part) => {
    const index = part.states.findIndex((state) => state.id === stateId);
    const states = moveBy(part.states, index, places);
    return states === part.states ? part : { ...part, states };
  });
}

function withTransitions(
  scenario: Scenario,
  partId: string,
  change: (transitions: Transition[], part: Part) => Transition[],
): Scenario {
  return updatePart(scenario, partId, (part) => {
    const transitions = change(part.transitions, part);
    return transitions === part.transitions ? part : { ...part, transitions };
  });
}

export function updateTransition(
  scenario: Scenario,
  partId: string,
  index: number,
  change: (transition: Transition) => Transition,
): Scenario {
  return withTransitions(scenario, partId, (transitions) => updateAt(transitions, index, change));
}

/** Adds a transition, if the part has both states and room for it. */
export function addTransition(scenario: Scenario, partId: string, transition: Transition): Scenario {
  return withTransitions(scenario, partId, (transitions, part) => {
    const has = (stateId: string): boolean => part.states.some((state) => state.id === stateId);
    const fits = has(transition.fromStateId) && has(transition.toStateId);
    return fits && transitions.length < LIMITS.transitionsPerPart ? [...transitions, transition] : transitions;
  });
}

export function removeTransition(scenario: Scenario, partId: string, index: number): Scenario {
  return withTransitions(scenario, partId, (transitions) =>
    index in transitions ? transitions.toSpliced(index, 1) : transitions,
  );
}

export function moveTransition(scenario: Scenario, partId: string, index: number, places: number): Scenario {
  return withTransitions(scenario, partId, (transitions) => moveBy(transitions, index, places));
}

function withLeakages(scenario: Scenario, change: (leakages: Leakage[]) => Leakage[]): Scenario {
  return updateNode(scenario, (node) => {
    const leakages = change(node.leakages);
    return leakages === node.leakages ? node : { ...node, leakages };
  });
}

export function updateLeakage(scenario: Scenario, leakageId: string, change: (leakage: Leakage) => Leakage): Scenario {
  return withLeakages(scenario, (leakages) => updateById(leakages, leakageId, change));
}

export function addLeakage(scenario: Scenario, leakage: Omit<Leakage, 'id'>): Scenario {
  return withLeakages(scenario, (leakages) => {
    if (leakages.length >= LIMITS.leakages) return leakages;
    const name = uniqueName(
      leakage.name,
      leakages.map((other) => other.name),
    );
    const id = uniqueId(
      name,
      leakages.map((other) => other.id),
      'leakage',
    );
    return [...leakages, { ...leakage, id, name }];
  });
}

export function removeLeakage(scenario: Scenario, leakageId: string): Scenario {
  return withLeakages(scenario, (leakages) => {
    const kept = leakages.filter((leakage) => leakage.id !== leakageId);
    return kept.length === leakages.length ? leakages : kept;
  });
}

export function moveLeakage(scenario: Scenario, leakageId: string, places: number): Scenario {
  return withLeakages(scenario, (leakages) =>
    moveBy(
      leakages,
      leakages.findIndex((leakage) => leakage.id === leakageId),
      places,
    ),
  );
}
