import type { ExchangePlan } from '#common/engine/link/exchange-plan.types.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { formatNumber, formatQuantity, formatShare } from '#common/units/format-quantity.ts';
import { onExchange, withExchangeValue } from '../operations/exchange-operations.ts';
import { updateStep } from '../operations/routine-operations.ts';
import { figureWords } from '../link/figure-words.ts';
import { planOf } from '../link/plan-of.ts';
import { sizeOf, withProbability, type WhatIfTarget } from './what-if-axes.ts';
import { figuresOf, type WhatIfFigures } from './what-if-outcome.ts';

/** A chart before it is computed: where to look, and what to make of what is found there. */
export interface ChartPlan {
  id: 'payload' | 'busy';
  title: string;
  /** Title of the horizontal axis, with its unit. */
  xTitle: string;
  yTitle: string;
  /** Values in rising order; the present one is among them. */
  xs: number[];
  current: number;
  documentAt: (x: number) => Scenario;
  /** µC, or null where the figures do not give one. */
  value: (figures: WhatIfFigures) => number | null;
  tellX: (x: number) => string;
  tellY: (microcoulombs: number) => string;
  /** Factor from the value to the one on the axis. */
  xScale: number;
}

/** A point of a chart; `delivered` null where nobody tells whether the payload arrives. */
export interface ChartPoint {
  x: number;
  y: number;
  delivered: number | null;
}

/** Points of a chart that was computed; values that no exchange can have are left out. */
export interface ChartPoints {
  plan: ChartPlan;
  points: ChartPoint[];
  /** Index of the present value; −1 where it has no point. */
  current: number;
}

/** Engine calls that a chart may cost. */
export const MOST_POINTS = 24;

/** The charts that a step has: those whose horizontal axis its link knows. */
export function chartPlans(document: Scenario, target: WhatIfTarget): ChartPlan[] {
  const routine = document.node.routines.find(({ id }) => id === target.routineId);
  const step = routine?.steps.find(({ id }) => id === target.stepId);
  if (!routine || step?.duration.kind !== 'exchange') return [];
  const result = planOf(step.duration, document.node.link);
  if (result.kind === 'problem') return [];
  const { plan } = result;
  const size = sizeOf(step.duration);
  const busy = plan.figures.find(({ id }) => id === 'busyProbability')?.value;
  const charts: ChartPlan[] = [];
  if (size && plan.payloadOctets !== null && plan.payloadOctets > 0) {
    charts.push(
      payloadChart(plan, size.octets, (octets) =>
        updateStep(document, routine.id, step.id, (before) => ({
          ...before,
          duration: onExchange((exchange) => withExchangeValue(exchange, size.key, octets))(before.duration),
        })),
      ),
    );
  }
  if (busy !== undefined) {
    charts.push(busyChart(busy, (share) => withProbability({ routine, step }, 'busyProbability', share)(document)));
  }
  return charts;
}

const microcoulombs = (chargeC: number): number => chargeC * 1e6;
const tellCharge = (value: number): string => formatQuantity(value / 1e6, 'charge', { significantDigits: 3 });

/** Payload that links without a frame of the standard carry at the most that is sensible to draw. */
const USUAL_LARGEST = 127;

function payloadChart(plan: ExchangePlan, current: number, documentAt: ChartPlan['documentAt']): ChartPlan {
  const largest = Math.max(current, Math.min(plan.frame?.largestPayloadOctets ?? USUAL_LARGEST, 4 * USUAL_LARGEST));
  const isDelivered = plan.deliveredProbability !== null;
  return {
    id: 'payload',
    title: `Charge per ${isDelivered ? 'delivered octet' : 'octet'} against payload`,
    xTitle: 'Payload, octets',
    yTitle: `µC per ${isDelivered ? 'delivered octet' : 'octet'}`,
    xs: spread(1, largest, current),
    current,
    documentAt,
    value: ({ exchangeC, payloadOctets, deliveredProbability }) => {
      const octets = (payloadOctets ?? 0) * (deliveredProbability ?? 1);
      return octets > 0 ? microcoulombs(exchangeC) / octets : null;
    },
    tellX: (octets) => `${formatNumber(octets)} ${octets === 1 ? 'octet' : 'octets'}`,
    tellY: (value) => `${tellCharge(value)} an octet`,
    xScale: 1,
  };
}

const HIGHEST_BUSY = 0.9;
const BUSY_STEPS = 18;

function busyChart(current: number, documentAt: ChartPlan['documentAt']): ChartPlan {
  const even = Array.from({ length: BUSY_STEPS + 1 }, (_, index) => (index * HIGHEST_BUSY) / BUSY_STEPS);
  return {
    id: 'busy',
    title: 'Charge per exchange against busy channel',
    xTitle: 'Probability that the channel is busy, %',
    yTitle: 'µC per exchange',
    xs: merged(even, current),
    current,
    documentAt,
    value: ({ exchangeC }) => microcoulombs(exchangeC),
    tellX: (share) => `busy ${formatShare(share, { significantDigits: 3 })}`,
    tellY: tellCharge,
    xScale: 100,
  };
}

/** Whole numbers from a small one to a large one, closer where they are small, with the present one among them. */
function spread(from: number, to: number, current: number): number[] {
  const count = MOST_POINTS - 2;
  const even = Array.from({ length: count + 1 }, (_, index) => Math.round(from + (to - from) * (index / count) ** 1.5));
  return merged(even, current);
}

function merged(values: readonly number[], current: number): number[] {
  const isThere = values.some((value) => Math.abs(value - current) < 1e-9);
  const kept = isThere ? values.map((value) => (Math.abs(value - current) < 1e-9 ? current : value)) : values;
  return [...new Set(isThere ? kept : [...kept, current])].sort((a, b) => a - b);
}

/** One job a point, for a queue that lets the page breathe in between. */
export function chartJobs(plan: ChartPlan, target: WhatIfTarget): (() => Found)[] {
  return plan.xs.map((x) => () => {
    const outcome = figuresOf(plan.documentAt(x), target);
    const y = outcome.kind === 'figures' ? plan.value(outcome.figures) : null;
    if (outcome.kind === 'problem' || y === null) return null;
    return { x, y, delivered: outcome.figures.deliveredProbability };
  });
}

type Found = ChartPoint | null;

/** How likely the payload arrives at a point: "98.21 % delivered"; null where nobody tells. */
export function deliveredWords({ delivered }: ChartPoint): string | null {
  return delivered === null ? null : `${figureWords({ value: delivered, unit: 'probability' })} delivered`;
}

/** Charts from the points of all of them, in the order of their plans. */
export function chartsOf(plans: readonly ChartPlan[], found: readonly Found[]): ChartPoints[] {
  return plans.map((plan, index) => {
    const from = plans.slice(0, index).reduce((total, { xs }) => total + xs.length, 0);
    return chartOf(plan, found.slice(from, from + plan.xs.length));
  });
}

function chartOf(plan: ChartPlan, found: readonly Found[]): ChartPoints {
  const points = found.filter((point) => point !== null);
  return { plan, points, current: points.findIndex(({ x }) => x === plan.current) };
}
