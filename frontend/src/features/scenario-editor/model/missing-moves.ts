import type { Part, Routine, Scenario, State, Step } from '#common/engine/scenario/scenario.types.ts';
import { partModel, type PartModel } from '#common/engine/node/part-model.ts';
import { reachableStateIds, transitionPath } from '#common/engine/node/transition-path.ts';
import type { InputProblem } from '#common/schemas/problem.ts';

/** A transition that would make a move possible. */
export interface MissingLink {
  fromStateId: string;
  toStateId: string;
  /** State on the way, where the transition is not the move itself. */
  viaStateId: string | null;
}

/** A move that a routine asks of a part and that its transitions do not allow. */
export interface MissingMove {
  key: string;
  routine: Routine;
  step: Step;
  part: Part;
  from: State;
  to: State;
  /** States that can be reached from where the part is. */
  reachable: State[];
  /** Single transitions that would help: the direct one first. */
  links: MissingLink[];
}

const PATH = /^node\.routines\[(\d+)\]\.steps\[(\d+)\]\./;

/** What the engine's complaints about steps amount to: which moves lack a way, and what would give one. */
export function missingMoves(scenario: Scenario, problems: readonly InputProblem[]): MissingMove[] {
  const found = new Map<string, MissingMove>();
  for (const { path, move } of problems) {
    const [, routineIndex, stepIndex] = PATH.exec(path) ?? [];
    const routine = scenario.node.routines[Number(routineIndex)];
    const step = routine?.steps[Number(stepIndex)];
    const index = scenario.node.parts.findIndex((part) => part.id === move?.partId);
    const part = scenario.node.parts[index];
    // The reference voltage does not matter to the way.
    const model = part && partModel(part, index, 3);
    if (!move || !routine || !step || !model) continue;
    for (const missing of missingMove(model, move.fromStateId, move.toStateId)) {
      const key = `${step.id} ${model.part.id} ${missing.from.id} ${missing.to.id}`;
      if (!found.has(key)) found.set(key, { key, routine, step, part: model.part, ...missing });
    }
  }
  return [...found.values()];
}

type Move = Pick<MissingMove, 'from' | 'to' | 'reachable' | 'links'>;

function missingMove(model: PartModel, fromId: string, toId: string): Move[] {
  const from = model.stateById.get(fromId);
  const to = model.stateById.get(toId);
  if (!from || !to || transitionPath(model, from, to) !== null) return [];
  const stateOf = (stateId: string): State[] => model.part.states.filter((state) => state.id === stateId);
  const reachable = reachableStateIds(model, from).flatMap(stateOf);
  const leading = model.states.filter((state) => state !== to && transitionPath(model, state, to) !== null);
  const links: MissingLink[] = [
    { fromStateId: fromId, toStateId: toId, viaStateId: null },
    ...reachable.map((via) => ({ fromStateId: via.id, toStateId: toId, viaStateId: via.id })),
    ...leading.map((via) => ({ fromStateId: fromId, toStateId: via.stateId, viaStateId: via.stateId })),
  ];
  return stateOf(fromId).flatMap((start) => stateOf(toId).map((end) => ({ from: start, to: end, reachable, links })));
}
