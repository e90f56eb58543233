import type { ForecastSummary } from '#common/schemas/api/scenarios.ts';
import { forecastWords } from '../model/forecast-words.ts';

/** The forecast's sentence in short and, under it, what became of the target. */
export function ForecastShort({ forecast }: { forecast: ForecastSummary | null }) {
  const { before, strong, after, target } = forecastWords(forecast);
  return (
    <span className="block">
      <span className="text-lg font-light">
        {before}
        <strong className="font-extrabold">{strong}</strong>
        {after}
      </span>
      {target && <span className={`block text-small ${target.isMet ? 'text-muted' : 'text-rust'}`}>{target.text}</span>}
    </span>
  );
}
