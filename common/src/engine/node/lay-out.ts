import type { LaidWindow, LayOutInput, Layout, Span, StepModel } from './layout.types.ts';
import { fromMicros } from './micros.ts';
import type { Hop, PartModel, StateModel, TransitionPath } from './part-model.ts';
import { transitionPath } from './transition-path.ts';

/** A part still returning to rest: where its spans and claims lie in the layout, so that they can be cut short. */
interface Returning {
  firstSpan: number;
  firstClaim: number;
  hops: number;
}

const NO_MOVE: TransitionPath = { hops: [], totalUs: 0 };

/**
 * Lays one cycle out in time. Moves into a state run before the step, all moving parts in parallel and finishing together,
 * while the others hold the state of the step before. A part that a step does not name returns to rest from the beginning of
 * that step, delays nobody and may still be returning in later steps. When a later step names it again meanwhile, its return
 * counts as completed at the end of the step before, where the moves begin; the rest of that return is not counted.
 *
 * @param input Parts, steps, whether the cycle follows itself.
 * @returns Spans in no particular order, windows in the order of time.
 * @example layOut({ parts: [], steps: [], isCyclic: false, onNoPath: () => undefined }).cycleUs // 0
 */
export function layOut(input: LayOutInput): Layout {
  const { parts, steps, isCyclic } = input;
  const layout: Layout = { spans: [], claims: [], windows: [], cycleUs: 0, roundedOffS: 0, instantMovers: new Set() };
  const returning: (Returning | null)[] = parts.map(() => null);
  const firstNamedUs: (number | undefined)[] = parts.map(() => undefined);
  let states = parts.map((part) => (isCyclic ? steps.at(-1)?.named[part.index] : undefined) ?? part.rest);
  steps.forEach((step, stepIndex) => {
    for (const { index } of parts) {
      if (!step.named[index]) continue;
      firstNamedUs[index] ??= layout.cycleUs;
      cutShort(layout, returning, index, layout.cycleUs);
    }
    layMoves(input, layout, { step, stepIndex, states });
    layStep(input, layout, { step, stepIndex, states }, returning);
    states = parts.map((part) => step.named[part.index] ?? part.rest);
  });
  if (isCyclic) {
    for (const { index } of parts) {
      cutShort(layout, returning, index, layout.cycleUs + (firstNamedUs[index] ?? 0));
    }
  } else if (steps.length > 0) {
    const stepIndex = steps.length - 1;
    for (const part of parts) layReturn(input, layout, { stepIndex, part, from: states[part.index] ?? part.rest });
  }
  let lastUs = layout.cycleUs;
  for (const { endUs } of layout.spans) if (endUs > lastUs) lastUs = endUs;
  addWindow(layout, 'return', steps.length - 1, lastUs);
  return layout;
}

interface At {
  step: StepModel;
  stepIndex: number;
  /** State of each part at the end of the step before. */
  states: readonly StateModel[];
}

/** Adds a window from the present end of the cycle on; one without length is left out. */
function addWindow(layout: Layout, kind: LaidWindow['kind'], stepIndex: number, endUs: number): void {
  const startUs = layout.cycleUs;
  if (endUs <= startUs) return;
  const durationS = fromMicros(endUs - startUs);
  const spanCount = layout.spans.length;
  layout.windows.push({
    kind,
    stepIndex,
    startUs,
    endUs,
    durationS,
    worstS: durationS,
    longestS: durationS,
    spanCount,
  });
}

function layMoves(input: LayOutInput, layout: Layout, at: At): void {
  const { stepIndex, states } = at;
  const { paths, movesUs } = pathsInto(input, layout, at);
  if (movesUs === 0) return;
  const startUs = layout.cycleUs;
  const endUs = startUs + movesUs;
  for (const part of input.parts) {
    const { hops, totalUs } = paths[part.index] ?? NO_MOVE;
    const { isRest, occupant } = states[part.index] ?? part.rest;
    const heldUs = movesUs - totalUs;
    const heldEndUs = totalUs === 0 ? endUs : startUs + heldUs;
    if (!isRest) {
      const termsS = [fromMicros(heldUs)];
      addSpan(layout, { occupant, startUs, endUs: heldEndUs, termsS, stepIndex, isHeld: true });
    }
    if (hops.length > 0) layHops(layout, { part, hops, startUs: heldEndUs, stepIndex });
  }
  addWindow(layout, 'move', stepIndex, endUs);
  layout.cycleUs = endUs;
}

/** The way of each part into a step, and the time of the longest one. */
function pathsInto(
  input: LayOutInput,
  layout: Layout,
  { step, stepIndex, states }: At,
): { paths: TransitionPath[]; movesUs: number } {
  const paths: TransitionPath[] = [];
  let movesUs = 0;
  for (const part of input.parts) {
    const from = states[part.index] ?? part.rest;
    const to = step.named[part.index] ?? from;
    const path = from === to ? NO_MOVE : pathOrReport(input, layout, { part, from, to, stepIndex });
    if (path.totalUs > movesUs) movesUs = path.totalUs;
    paths.push(path);
  }
  return { paths, movesUs };
}

function layStep(input: LayOutInput, layout: Layout, at: At, returning: (Returning | null)[]): void {
  const { step, stepIndex, states } = at;
  const startUs = layout.cycleUs;
  const endUs = startUs + step.durationUs;
  for (const part of input.parts) {
    const named = step.named[part.index];
    const before = states[part.index] ?? part.rest;
    if (named && !named.isRest) {
      const { occupant } = named;
      // Less than half a microsecond has no length on the timeline, but its charge counts.
      if (step.durationS > 0) {
        layout.spans.push({ occupant, startUs, endUs, termsS: step.termsS, stepIndex, isHeld: false });
      }
    } else if (!named && !before.isRest) {
      returning[part.index] = layReturn(input, layout, { stepIndex, part, from: before });
    }
  }
  const { durationS, worstS, longestS } = step;
  if (durationS > 0) {
    const spanCount = layout.spans.length;
    layout.windows.push({ kind: 'step', stepIndex, startUs, endUs, durationS, worstS, longestS, spanCount });
    layout.roundedOffS += durationS - fromMicros(step.durationUs);
  }
  layout.cycleUs = endUs;
}

function layReturn(
  input: LayOutInput,
  layout: Layout,
  { stepIndex, part, from }: { stepIndex: number; part: PartModel; from: StateModel },
): Returning | null {
  const { hops } = pathOrReport(input, layout, { part, from, to: part.rest, stepIndex });
  if (hops.length === 0) return null;
  const laid = { firstSpan: layout.spans.length, firstClaim: layout.claims.length, hops: hops.length };
  layHops(layout, { part, hops, startUs: layout.cycleUs, stepIndex });
  return laid;
}

/** Spans without length are left out. */
function addSpan(layout: Layout, span: Span): void {
  if (span.endUs > span.startUs) layout.spans.push(span);
}

function layHops(
  layout: Layout,
  { part, hops, startUs, stepIndex }: { part: PartModel; hops: readonly Hop[]; startUs: number; stepIndex: number },
): void {
  let atUs = startUs;
  for (const hop of hops) {
    const endUs = atUs + hop.durationUs;
    const { occupant, termsS } = hop;
    addSpan(layout, { occupant, startUs: atUs, endUs, termsS, stepIndex, isHeld: false });
    if (hop.busy) layout.claims.push({ startUs: atUs, endUs, stepIndex, hop, moverIndex: part.index });
    atUs = endUs;
  }
}

function cutShort(layout: Layout, returning: (Returning | null)[], partIndex: number, nowUs: number): void {
  const laid = returning[partIndex];
  if (!laid) return;
  returning[partIndex] = null;
  const { firstSpan, firstClaim, hops } = laid;
  for (const span of layout.spans.slice(firstSpan, firstSpan + hops)) {
    if (span.occupant.partIndex !== partIndex || span.endUs <= nowUs) continue;
    span.endUs = Math.max(span.startUs, nowUs);
    span.termsS = [fromMicros(span.endUs - span.startUs)];
  }
  for (const claim of layout.claims.slice(firstClaim, firstClaim + hops)) {
    if (claim.moverIndex === partIndex) claim.endUs = Math.max(claim.startUs, Math.min(claim.endUs, nowUs));
  }
}

interface Move {
  part: PartModel;
  from: StateModel;
  to: StateModel;
  stepIndex: number;
}

function pathOrReport(input: LayOutInput, layout: Layout, { part, from, to, stepIndex }: Move): TransitionPath {
  if (from.index === to.index) return NO_MOVE;
  if (part.part.transitions.length === 0) layout.instantMovers.add(part.index);
  const path = transitionPath(part, from, to);
  if (path === null) input.onNoPath(part, from, to, stepIndex);
  return path ?? NO_MOVE;
}
