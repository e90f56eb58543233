import { fromMicros } from './micros.ts';
import type { BusyClaim, Layout, Span } from './layout.types.ts';
import type { PartModel, StateModel } from './part-model.ts';

/**
 * Adds the parts that transitions keep busy to a layout. Such a part is in the given state while the transition runs, instead
 * of resting or of holding the state of the step before. Where a step names it, or it is itself on the way, that counts
 * instead: a part is in one state at a time.
 *
 * @param layout The layout; its spans are replaced.
 * @param parts The node's parts.
 * @param partById Their models by id.
 * @param onElsewhere Told each claim whose part is in another state when the transition begins.
 * @example addBusyParts(layout, parts, partById, () => undefined)
 */
export function addBusyParts(
  layout: Layout,
  parts: readonly PartModel[],
  partById: ReadonlyMap<string, PartModel>,
  onElsewhere: (mover: PartModel, claim: BusyClaim) => void,
): void {
  for (const claim of inOrder(layout.claims, parts)) {
    const { busy } = claim.hop;
    const part = busy && partById.get(busy.partId);
    const state = busy && part?.stateById.get(busy.stateId);
    if (!part || !state || claim.endUs <= claim.startUs) continue;
    const mover = parts[claim.moverIndex];
    const movesInTime = part.part.transitions.length > 0;
    if (mover && movesInTime && !isInState(layout, part, state, claim.startUs)) onElsewhere(mover, claim);
    layout.spans = withClaim(layout.spans, part, state, claim);
  }
  if (layout.claims.length > 0) widenWindows(layout);
}

/** The spans no longer lie in the order of the windows, so each window has to look through all of them. */
function widenWindows({ windows, spans }: Layout): void {
  for (const window of windows) window.spanCount = spans.length;
}

/** The claim that begins first counts where two overlap; of two that begin together, that of the part whose id comes first. */
function inOrder(claims: readonly BusyClaim[], parts: readonly PartModel[]): BusyClaim[] {
  const idOf = ({ moverIndex }: BusyClaim): string => parts[moverIndex]?.part.id ?? '';
  return [...claims].sort((a, b) => a.startUs - b.startUs || (idOf(a) < idOf(b) ? -1 : 1));
}

/** Whether a part is in a state just before a moment; resting is the state of no span. */
function isInState(layout: Layout, part: PartModel, state: StateModel, atUs: number): boolean {
  const before = layout.spans.find(
    (span) => span.occupant.partIndex === part.index && span.startUs <= atUs && span.endUs >= atUs,
  );
  return before ? before.occupant === state.occupant : state.isRest;
}

function withClaim(spans: readonly Span[], part: PartModel, state: StateModel, claim: BusyClaim): Span[] {
  const result: Span[] = [];
  let free: [number, number][] = [[claim.startUs, claim.endUs]];
  for (const span of spans) {
    const overlaps = span.startUs < claim.endUs && span.endUs > claim.startUs;
    if (!overlaps || span.occupant.partIndex !== part.index) result.push(span);
    else if (span.isHeld) result.push(...cutOut(span, claim));
    else {
      result.push(span);
      free = free.flatMap((gap) => without(gap, span));
    }
  }
  if (state.isRest) return result;
  const { stepIndex } = claim;
  for (const [startUs, endUs] of free) {
    const termsS = [fromMicros(endUs - startUs)];
    result.push({ occupant: state.occupant, startUs, endUs, termsS, stepIndex, isHeld: false });
  }
  return result;
}

function cutOut(span: Span, claim: BusyClaim): Span[] {
  return without([span.startUs, span.endUs], claim).map(([startUs, endUs]) => ({
    ...span,
    startUs,
    endUs,
    termsS: [fromMicros(endUs - startUs)],
  }));
}

function without(
  [startUs, endUs]: [number, number],
  taken: Readonly<{ startUs: number; endUs: number }>,
): [number, number][] {
  const pieces: [number, number][] = [
    [startUs, Math.min(endUs, taken.startUs)],
    [Math.max(startUs, taken.endUs), endUs],
  ];
  return pieces.filter(([from, to]) => to > from);
}
