import { useEffect, useRef, useState } from 'react';
import type { Scenario } from '#common/engine/index.ts';
import { openForecastWorker, openOnThisThread } from '../model/forecast-sources.ts';
import { LiveForecast, NO_FORECAST, type LiveForecastState } from '../model/live-forecast.ts';

/**
 * Forecast of a document while it is edited, computed in a worker. `forecast` and `scenario` stay those of the last
 * complete input while a new one is computed or the current one has problems.
 */
export function useLiveForecast(document: Scenario | null): LiveForecastState {
  const [state, setState] = useState<LiveForecastState>(NO_FORECAST);
  const live = useRef<LiveForecast | null>(null);

  useEffect(() => {
    const started = new LiveForecast(openForecastWorker, openOnThisThread, setState);
    live.current = started;
    return () => {
      live.current = null;
      started.stop();
    };
  }, []);

  useEffect(() => {
    live.current?.submit(document);
  }, [document]);

  return state;
}
