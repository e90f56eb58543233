import type { Hop, PartModel, StateModel, TransitionPath } from './part-model.ts';

const NO_MOVE: TransitionPath = { hops: [], totalUs: 0 };

/** Relative difference below which two charges count as equal: a few roundings of a sum. */
const CHARGE_TOLERANCE = 1e-12;

/**
 * Shortest way of a part from one state to another over its declared transitions: least total duration, then least charge,
 * then fewest transitions. A part without any declared transition moves instantly.
 *
 * Source: E. W. Dijkstra, A note on two problems in connexion with graphs, Numerische Mathematik 1 (1959), with the three
 * measures compared in turn.
 *
 * @param model The part; paths once found are kept in it.
 * @param from State left.
 * @param to State reached.
 * @returns The path, empty for no move; null when there is none.
 * @example transitionPath(radio, radio.rest, radio.rest)?.totalUs // 0
 */
export function transitionPath(model: PartModel, from: StateModel, to: StateModel): TransitionPath | null {
  if (from.index === to.index || model.part.transitions.length === 0) return NO_MOVE;
  model.pathsFrom[from.index] ??= pathsFrom(model, from.index);
  return model.pathsFrom[from.index]?.[to.index] ?? null;
}

/**
 * States that a part can reach over its declared transitions, for the message of an error.
 *
 * @param model The part.
 * @param from State left.
 * @returns Ids of the states in the order of the part.
 * @example reachableStateIds(radio, radio.rest) // ['idle', 'receive']
 */
export function reachableStateIds(model: PartModel, from: StateModel): string[] {
  return model.states
    .filter((to) => to.index !== from.index && transitionPath(model, from, to) !== null)
    .map((state) => state.stateId);
}

interface Label {
  hops: Hop[];
  totalUs: number;
  chargeC: number;
  isSettled: boolean;
}

function pathsFrom(model: PartModel, fromIndex: number): (TransitionPath | null)[] {
  const labels: (Label | undefined)[] = model.states.map(() => undefined);
  labels[fromIndex] = { hops: [], totalUs: 0, chargeC: 0, isSettled: false };
  for (let nearest = nextIndex(labels); nearest !== -1; nearest = nextIndex(labels)) {
    const label = labels[nearest];
    if (!label) break;
    label.isSettled = true;
    for (const hop of model.hopsFrom[nearest] ?? []) {
      const longer: Label = {
        hops: [...label.hops, hop],
        totalUs: label.totalUs + hop.durationUs,
        chargeC: label.chargeC + hop.chargeC,
        isSettled: false,
      };
      const known = labels[hop.toIndex];
      if (!known || (!known.isSettled && isShorter(longer, known))) labels[hop.toIndex] = longer;
    }
  }
  return labels.map((label) => (label ? { hops: label.hops, totalUs: label.totalUs } : null));
}

function nextIndex(labels: readonly (Label | undefined)[]): number {
  let best = -1;
  labels.forEach((label, index) => {
    const leading = labels[best];
    if (label && !label.isSettled && (!leading || isShorter(label, leading))) best = index;
  });
  return best;
}

function isShorter(a: Label, b: Label): boolean {
  if (a.totalUs !== b.totalUs) return a.totalUs < b.totalUs;
  const differenceC = a.chargeC - b.chargeC;
  if (Math.abs(differenceC) > CHARGE_TOLERANCE * Math.max(a.chargeC, b.chargeC)) return differenceC < 0;
  return a.hops.length < b.hops.length;
}
