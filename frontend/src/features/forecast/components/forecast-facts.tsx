import type { Forecast, Scenario } from '#common/engine/index.ts';
import { forecastFacts } from '../model/facts.ts';

/** The handful of figures beside the sentence, a line each. */
export function ForecastFacts({ scenario, forecast }: { scenario: Scenario; forecast: Forecast }) {
  return (
    <dl className="tabular-nums">
      {forecastFacts(scenario, forecast).map(({ label, value, note }) => (
        <div key={label} className="border-hair grid grid-cols-[1fr_auto] gap-x-4 border-b py-[0.45rem]">
          <dt>{label}</dt>
          <dd className="text-right font-bold">{value}</dd>
          {note !== undefined && <dd className="text-muted text-small col-span-2 min-h-5 text-right">{note}</dd>}
        </div>
      ))}
    </dl>
  );
}
