import type { ExchangeDuration, Node, Part, State, Step } from '#common/engine/scenario/scenario.types.ts';
import { filterKeeping, mapKeeping } from './list.ts';
import { withOptional } from './operations/supply-operations.ts';

/** Where a part, or one of its states, is used outside itself; in words for the question before removing it. */
export function usesOf(node: Node, partId: string, stateId?: string): string[] {
  const isUsed = (otherPartId: string, otherStateId: string): boolean =>
    otherPartId === partId && (stateId === undefined || otherStateId === stateId);
  const inSteps = node.routines.flatMap((routine) =>
    routine.steps
      .filter((step) => statesOfStep(step).some(([id, state]) => isUsed(id, state)))
      .map((step) => `step “${step.name}” of routine “${routine.name}”`),
  );
  const inParts = node.parts.flatMap((part) => [
    ...(part.id === partId && stateId === undefined ? [] : usesInPart(part, partId, stateId)),
  ]);
  return [...inSteps, ...inParts];
}

/** Part and state of everything that a step names: what it puts parts into, and what loads its frame. */
function statesOfStep({ states, duration }: Step): [string, string][] {
  const loading = duration.kind === 'exchange' ? duration.loading : undefined;
  return [
    ...Object.entries(states),
    ...(loading ? [[loading.partId, loading.stateId] satisfies [string, string]] : []),
  ];
}

function usesInPart(part: Part, partId: string, stateId: string | undefined): string[] {
  const isOwn = part.id === partId;
  const uses: string[] = [];
  for (const state of part.states) {
    const needs = state.needs;
    if (needs?.partId === partId && (stateId === undefined || needs.stateIds.includes(stateId))) {
      uses.push(`what state “${state.name}” of “${part.name}” needs`);
    }
  }
  for (const { fromStateId, toStateId, busy } of part.transitions) {
    const ends = isOwn && (fromStateId === stateId || toStateId === stateId);
    const isBusy = busy?.partId === partId && (stateId === undefined || busy.stateId === stateId);
    if (ends || isBusy)
      uses.push(`transition ${nameOf(part, fromStateId)} to ${nameOf(part, toStateId)} of “${part.name}”`);
  }
  return uses;
}

function nameOf(part: Part, stateId: string): string {
  return part.states.find((state) => state.id === stateId)?.name ?? stateId;
}

/**
 * The node with every reference to something that is not there taken out: states named by steps, needs, busy parts,
 * transitions, rest states and the radio of an exchange.
 */
export function withoutDanglingReferences(node: Node): Node {
  const statesOf = new Map(node.parts.map((part) => [part.id, new Set(part.states.map((state) => state.id))]));
  const exists = (partId: string, stateId: string): boolean => statesOf.get(partId)?.has(stateId) ?? false;
  const parts = mapKeeping(node.parts, (part) => cleanPart(part, exists));
  const routines = mapKeeping(node.routines, (routine) => {
    const steps = mapKeeping(routine.steps, (step) => cleanStep(step, exists, statesOf));
    return steps === routine.steps ? routine : { ...routine, steps };
  });
  return parts === node.parts && routines === node.routines ? node : { ...node, parts, routines };
}

type Exists = (partId: string, stateId: string) => boolean;

function cleanPart(part: Part, exists: Exists): Part {
  const states = mapKeeping(part.states, (state) => cleanState(state, exists));
  const kept = filterKeeping(
    part.transitions,
    ({ fromStateId, toStateId }) => exists(part.id, fromStateId) && exists(part.id, toStateId),
  );
  const transitions = mapKeeping(kept, (transition) => {
    const { busy, ...rest } = transition;
    return busy && !exists(busy.partId, busy.stateId) ? rest : transition;
  });
  const restStateId = exists(part.id, part.restStateId) ? part.restStateId : restOf(states, part.restStateId);
  if (states === part.states && transitions === part.transitions && restStateId === part.restStateId) return part;
  return { ...part, states, transitions, restStateId };
}

/** The state that a part most likely rests in: one that sleeps, else the one with the least current. */
function restOf(states: readonly State[], fallback: string): string {
  const sleeping = states.find((state) => state.role === 'sleep');
  const least = states.reduce<State | undefined>(
    (best, state) => (best === undefined || state.current.typical < best.current.typical ? state : best),
    undefined,
  );
  return (sleeping ?? least)?.id ?? fallback;
}

function cleanState(state: State, exists: Exists): State {
  const { needs, ...rest } = state;
  if (!needs) return state;
  const stateIds = filterKeeping(needs.stateIds, (stateId) => exists(needs.partId, stateId));
  if (stateIds === needs.stateIds) return state;
  return stateIds.length === 0 ? rest : { ...state, needs: { ...needs, stateIds } };
}

function cleanStep(step: Step, exists: Exists, parts: ReadonlyMap<string, unknown>): Step {
  const entries = Object.entries(step.states);
  const kept = filterKeeping(entries, ([partId, stateId]) => exists(partId, stateId));
  const named = kept === entries ? step : { ...step, states: Object.fromEntries(kept) };
  const duration = named.duration.kind === 'exchange' ? cleanExchange(named.duration, exists, parts) : named.duration;
  return duration === named.duration ? named : { ...named, duration };
}

function cleanExchange(
  exchange: ExchangeDuration,
  exists: Exists,
  parts: ReadonlyMap<string, unknown>,
): ExchangeDuration {
  const { radioPartId, loading } = exchange;
  const isRadioThere = radioPartId === undefined || parts.has(radioPartId);
  const ofRadio = isRadioThere ? exchange : withOptional(exchange, 'radioPartId', undefined);
  const isLoadingThere = !loading || exists(loading.partId, loading.stateId);
  return isLoadingThere ? ofRadio : withOptional(ofRadio, 'loading', undefined);
}
