import type { Step } from '../scenario/scenario.types.ts';
import type { LaidWindow, Layout, Span } from './layout.types.ts';
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
 * @param steps Its steps.
 * @returns Intervals in the order of time; those of kind `return` lie beyond the cycle.
 * @example intervalsOf(layout, 'report', routine.steps)
 */
export function intervalsOf(layout: Layout, routineId: string, steps: readonly Step[]): Interval[] {
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
    const step = steps[window.stepIndex];
    if (step) pushWindow(intervals, { window, step, active, id: `${routineId}/${step.id}` });
  }
  return intervals;
}

/** Keeps, in place, the spans that have not ended. */
function dropEnded(active: Span[], nowUs: number): void {
  let kept = 0;
  for (const span of active) if (span.endUs > nowUs) active[kept++] = span;
  active.length = kept;
}

function pushWindow(
  intervals: Interval[],
  { window, step, active, id }: { window: LaidWindow; step: Step; active: readonly Span[]; id: string },
): void {
  const { kind } = window;
  const base = kind === 'step' ? id : `${id}#${kind}`;
  const edges = edgesWithin(window, active);
  let startUs = window.startUs;
  for (let index = 0; index <= edges.length; index++) {
    const endUs = edges[index] ?? window.endUs;
    intervals.push({
      id: index === 0 ? base : `${base}${kind === 'step' ? '#' : ''}${index + 1}`,
      kind,
      stepId: step.id,
      stepName: step.name,
      startS: fromMicros(startUs),
      durationS: edges.length === 0 ? window.durationS : fromMicros(endUs - startUs),
      occupants: occupantsOf(active, startUs, endUs),
    });
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
