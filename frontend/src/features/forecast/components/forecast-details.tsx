import { memo, useDeferredValue } from 'react';
import type { Forecast, Scenario } from '#common/engine/index.ts';
import { ChargeLedger } from './charge-ledger.tsx';
import { DutyCycles } from './duty-cycles.tsx';
import { ForecastCurves } from './forecast-curves.tsx';

interface Props {
  /** The document that `forecast` belongs to. */
  scenario: Scenario;
  forecast: Forecast | null;
}

/** What stands behind the forecast: ledger, curves, duty cycles. Typing comes before them. */
export function ForecastDetails({ scenario, forecast }: Props) {
  return <Details scenario={useDeferredValue(scenario)} forecast={useDeferredValue(forecast)} />;
}

const Details = memo(function Details({ scenario, forecast }: Props) {
  return (
    <section aria-labelledby="details-heading" className="min-w-0 space-y-12">
      <h2 id="details-heading" className="sr-only">
        Behind the forecast
      </h2>
      {forecast ? (
        <>
          <ChargeLedger scenario={scenario} forecast={forecast} />
          {forecast.dekads.length > 1 && <ForecastCurves scenario={scenario} forecast={forecast} />}
          <DutyCycles scenario={scenario} forecast={forecast} />
        </>
      ) : (
        <p className="text-muted">Ledger and curves come with the first forecast.</p>
      )}
    </section>
  );
});
