import type { ForecastSummary } from '#common/schemas/api/scenarios.ts';
import { YEAR_S } from '#common/units/si.ts';

/** Years that the lines of a list run to, so that all of them are on one scale: all lives and targets, 30 at most. */
export function lifeScaleYears(forecasts: readonly (ForecastSummary | null)[]): number {
  const lengths = forecasts.flatMap((forecast) => (forecast ? [forecast.lifeS ?? 0, 1.15 * forecast.targetLifeS] : []));
  return Math.min(30, Math.max(2, Math.ceil(Math.max(0, ...lengths) / YEAR_S)));
}

/** Life as a line from left to right, the target as a mark across it. The words beside it say the same. */
export function LifeLine({ forecast, scaleYears }: { forecast: ForecastSummary | null; scaleYears: number }) {
  if (!forecast || forecast.outcome === 'oversubscribed') return null;
  const at = (lifeS: number): string => `${Math.min(100, (100 * lifeS) / (scaleYears * YEAR_S)).toFixed(2)}%`;
  const isOpen = forecast.lifeS === null || forecast.lifeS > scaleYears * YEAR_S;
  const end = isOpen ? '100%' : at(forecast.lifeS ?? 0);
  const isMet = isOpen || (forecast.lifeS ?? 0) >= forecast.targetLifeS;
  return (
    <svg aria-hidden="true" className="h-6 w-full overflow-visible" fill="none">
      <line x1="0" x2="100%" y1="12" y2="12" stroke="var(--hair)" />
      {Array.from({ length: scaleYears + 1 }, (_, year) => (
        <line key={year} x1={at(year * YEAR_S)} x2={at(year * YEAR_S)} y1="9" y2="15" stroke="var(--hair)" />
      ))}
      <line
        x1="0"
        x2={end}
        y1="12"
        y2="12"
        stroke="var(--ink)"
        strokeWidth="3"
        strokeDasharray={isOpen ? '6 3' : undefined}
      />
      {!isOpen && <circle cx={end} cy="12" r="4" fill={isMet ? 'var(--ink)' : 'var(--rust)'} />}
      <line
        x1={at(forecast.targetLifeS)}
        x2={at(forecast.targetLifeS)}
        y1="3"
        y2="21"
        stroke="var(--accent)"
        strokeWidth="2"
      />
    </svg>
  );
}
