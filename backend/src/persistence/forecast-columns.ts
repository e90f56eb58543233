import type { Outcome } from '#common/engine/forecast/forecast.types.ts';
import type { ForecastSummary } from '#common/schemas/api/scenarios.ts';

export interface ForecastRow {
  engineVersion: string | null;
  outcome: Outcome | null;
  lifeS: number | null;
  endMonth: number | null;
  targetLifeS: number | null;
}

/** A summary as columns, all null without one. */
export function toForecastRow(summary: ForecastSummary | null): ForecastRow {
  return summary ?? { engineVersion: null, outcome: null, lifeS: null, endMonth: null, targetLifeS: null };
}

export function fromForecastRow(row: ForecastRow): ForecastSummary | null {
  const { engineVersion, outcome, lifeS, endMonth, targetLifeS } = row;
  if (engineVersion === null || outcome === null || targetLifeS === null) return null;
  return { engineVersion, outcome, lifeS, endMonth, targetLifeS };
}

/** Life for sorting, s: what outlives the horizon comes after every number, what has no forecast has no place. */
export function lifeOrderS(summary: ForecastSummary | null): number | null {
  if (summary === null) return null;
  return summary.outcome === 'outlives-horizon' ? Infinity : (summary.lifeS ?? 0);
}
