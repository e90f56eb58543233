import type { LaidWindow, Layout, Span, StepModel } from './layout.types.ts';
import { fromMicros } from './micros.ts';
import type { Interval, Occupant } from './node-program.types.ts';

/**
 * Edges closer than this are one, µs: derived durations are no whole microseconds, and a sliver between two roundings would
 * show a sum of currents that never flows.
 */
const ROUNDING_US = 1e-3;

/**
 * Cuts a layout into intervals in which no part changes its activity.
 *
 * @param layout One cycle laid out.
 * @param routineId Id of the routine, the beginning of each interval's id.
 * @param steps Its steps and phases, as laid out.
 * @returns Intervals in the order of time; those of kind `return` lie beyond the cycle.
 * @example intervalsOf(layout, 'report', steps)
 */
export function intervalsOf(layout: Layout, routineId: string, steps: readonly StepModel[]): Interval[] {
  const { spans } = layout;
  const intervals: Interval[] = [];
  const active: Span[] = [];
  let next = 0;
  for (const window of layout.windows) {
    dropEnded(active, window.startUs);
    for (; next < window.spanCount; next++) {
      const span = spans[next];
      if (span && span.endUs > window.startUs) active.push(span);
    }
    const model = steps[window.stepIndex];
    if (!model) continue;
    const id = `${routineId}/${model.step.id}${model.suffix}`;
    if (window.endUs > window.startUs) pushWindow(intervals, { window, model, active, id });
    else pushShort(intervals, { window, model, active: spans.slice(0, window.spanCount), id });
  }
  return intervals;
}

/** Keeps, in place, the spans that have not ended. */
function dropEnded(active: Span[], nowUs: number): void {
  let kept = 0;
  for (const span of active) if (span.endUs > nowUs) active[kept++] = span;
  active.length = kept;
}

interface Cut {
  window: LaidWindow;
  model: StepModel;
  active: readonly Span[];
  id: string;
}

/** A step that is shorter than half a microsecond on average; at its worst it may be long, so its voltage is tested. */
function pushShort(intervals: Interval[], { window, model, active, id }: Cut): void {
  const { stepIndex, startUs } = window;
  const occupants = active
    .filter((span) => {
      if (span.stepIndex === stepIndex && !span.isHeld && span.startUs === startUs) return true;
      return span.startUs < startUs && span.endUs > startUs;
    })
    .map(({ occupant }) => occupant);
  intervals.push(intervalOf(window, model, { id, startUs, durationS: window.durationS, occupants }));
}

function intervalOf(
  { kind, worstS, longestS, durationS: wholeS }: LaidWindow,
  { step, phase }: StepModel,
  own: { id: string; startUs: number; durationS: number; occupants: Occupant[] },
): Interval {
  const { id, startUs, durationS, occupants } = own;
  // A piece of an exchange may last as long as the whole at the worst; a piece of anything else is what it is.
  const isVaried = worstS !== wholeS || longestS !== wholeS;
  return {
    id,
    kind,
    stepId: step.id,
    stepName: step.name,
    phase: kind === 'step' ? phase : null,
    startS: fromMicros(startUs),
    durationS,
    worstS: isVaried ? worstS : durationS,
    longestS: isVaried ? longestS : durationS,
    occupants,
  };
}

function pushWindow(intervals: Interval[], { window, model, active, id }: Cut): void {
  const { kind } = window;
  const base = kind === 'step' ? id : `${id}#${kind}`;
  const edges = edgesWithin(window, active);
  let startUs = window.startUs;
  for (let index = 0; index <= edges.length; index++) {
    const endUs = edges[index] ?? window.endUs;
    intervals.push(
      intervalOf(window, model, {
        id: index === 0 ? base : `${base}${kind === 'step' ? '#' : ''}${index + 1}`,
        startUs,
        durationS: edges.length === 0 ? window.durationS : fromMicros(endUs - startUs),
        occupants: occupantsOf(active, startUs, endUs),
      }),
    );
    startUs = endUs;
  }
}

function occupantsOf(active: readonly Span[], startUs: number, endUs: number): Occupant[] {
  const middleUs = (startUs + endUs) / 2;
  const occupants: Occupant[] = [];
  for (const span of active) {
    if (span.startUs < middleUs && span.endUs > middleUs) occupants.push(span.occupant);
  }
  return occupants;
}

/** Moments inside a window at which a part changes its activity, in order; those closer than a rounding are one. */
function edgesWithin({ startUs, endUs }: LaidWindow, active: readonly Span[]): number[] {
  const edges: number[] = [];
  const firstUs = startUs + ROUNDING_US;
  const lastUs = endUs - ROUNDING_US;
  for (const span of active) {
    if (span.startUs > firstUs && span.startUs < lastUs) edges.push(span.startUs);
    if (span.endUs > firstUs && span.endUs < lastUs) edges.push(span.endUs);
  }
  if (edges.length < 2) return edges;
  edges.sort((a, b) => a - b);
  return edges.filter((edgeUs, index) => index === 0 || edgeUs > (edges[index - 1] ?? 0) + ROUNDING_US);
}
