import type { Part, State, StateRole, Transition } from '../scenario/scenario.types.ts';
import { constantDraw, stateDraw } from './draw.ts';
import { toMicros } from './micros.ts';
import type { Occupant } from './node-program.types.ts';

/** A state made ready for the timeline. The occupant is shared by every interval, so that compiling makes few objects. */
export interface StateModel {
  index: number;
  stateId: string;
  occupant: Occupant;
  isRest: boolean;
  role: StateRole | undefined;
  needs: State['needs'];
}

/** A declared transition made ready for the timeline. */
export interface Hop {
  transitionIndex: number;
  toIndex: number;
  durationUs: number;
  termsS: readonly number[];
  /** Charge at the declared current, C; it decides between paths of equal duration. */
  chargeC: number;
  occupant: Occupant;
  busy: Transition['busy'];
}

/** A way from one state to another. */
export interface TransitionPath {
  hops: readonly Hop[];
  totalUs: number;
}

const SAME_CIRCUIT: Partial<Record<StateRole, StateRole>> = { listen: 'receive', receive: 'listen' };

/** A part made ready for the timeline. */
export interface PartModel {
  index: number;
  part: Part;
  states: readonly StateModel[];
  stateById: ReadonlyMap<string, StateModel>;
  rest: StateModel;
  /** Whether any of its states needs another part. */
  hasNeeds: boolean;
  /** Hops by the index of the state they leave. */
  hopsFrom: readonly (readonly Hop[])[];
  /** Shortest paths by the index of the state they leave, filled when first asked for. */
  pathsFrom: (readonly (TransitionPath | null)[] | undefined)[];
}

/**
 * Makes a part ready for the timeline. Its ids must have been checked.
 *
 * @param part The part.
 * @param index Its place in the node.
 * @param defaultReferenceVoltageV Reference voltage of states that give none, V.
 * @returns The model; null when the rest state does not exist.
 * @example partModel(radio, 0, 3)?.rest.stateId // 'sleep'
 */
export function partModel(part: Part, index: number, defaultReferenceVoltageV: number): PartModel | null {
  const partLowestV = part.lowestVoltageV.typical;
  const states = part.states.map((state, stateIndex): StateModel => ({
    index: stateIndex,
    stateId: state.id,
    isRest: state.id === part.restStateId,
    role: state.role,
    needs: state.needs,
    occupant: {
      partIndex: index,
      activity: { kind: 'state', stateId: state.id },
      draw: stateDraw(state, defaultReferenceVoltageV),
      lowestVoltageV: Math.max(partLowestV, state.lowestVoltageV?.typical ?? 0),
    },
  }));
  const stateById = new Map(states.map((state) => [state.stateId, state]));
  const rest = stateById.get(part.restStateId);
  if (!rest) return null;
  const hopsFrom: Hop[][] = states.map(() => []);
  part.transitions.forEach((transition, transitionIndex) => {
    const from = stateById.get(transition.fromStateId);
    const to = stateById.get(transition.toStateId);
    if (!from || !to) return;
    hopsFrom[from.index]?.push({
      transitionIndex,
      toIndex: to.index,
      durationUs: toMicros(transition.durationS.typical),
      termsS: [transition.durationS.typical],
      chargeC: transition.current.typical * transition.durationS.typical,
      busy: transition.busy,
      occupant: {
        partIndex: index,
        activity: { kind: 'transition', fromStateId: from.stateId, toStateId: to.stateId },
        draw: constantDraw(transition.current.typical, defaultReferenceVoltageV),
        lowestVoltageV: partLowestV,
      },
    });
  });
  addSameCircuit(states, hopsFrom);
  const hasNeeds = part.states.some((state) => state.needs !== undefined);
  return { index, part, states, stateById, rest, hasNeeds, hopsFrom, pathsFrom: [] };
}

/** Listening and receiving are the same circuit: no time lies between them unless a transition is declared. */
function addSameCircuit(states: readonly StateModel[], hopsFrom: readonly Hop[][]): void {
  for (const from of states) {
    const counterpart = SAME_CIRCUIT[from.role ?? 'active'];
    if (counterpart === undefined) continue;
    const hops = hopsFrom[from.index];
    for (const to of states) {
      if (to.role !== counterpart || hops?.some(({ toIndex }) => toIndex === to.index) !== false) continue;
      hops.push({
        transitionIndex: -1,
        toIndex: to.index,
        durationUs: 0,
        termsS: [0],
        chargeC: 0,
        busy: undefined,
        occupant: from.occupant,
      });
    }
  }
}
