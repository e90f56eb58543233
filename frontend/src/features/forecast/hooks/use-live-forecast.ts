import { useLayoutEffect, useRef, useState } from 'react';
import type { Scenario } from '#common/engine/index.ts';
import { openOnThisThread, openQuickest } from '../model/forecast-sources.ts';
import { LiveForecast, NO_FORECAST, type LiveForecastState } from '../model/live-forecast.ts';

/**
 * Forecast of a document while it is edited, computed beside the page or, where that is quick, at once. `forecast` and `scenario` stay those of the last
 * complete input while a new one is computed or the current one has problems.
 */
export function useLiveForecast(document: Scenario | null): LiveForecastState {
  const [state, setState] = useState<LiveForecastState>(NO_FORECAST);
  const live = useRef<LiveForecast | null>(null);

  // Before the frame is painted: a quick answer is part of it.
  useLayoutEffect(() => {
    const started = new LiveForecast(openQuickest, openOnThisThread, setState);
    live.current = started;
    return () => {
      live.current = null;
      started.stop();
    };
  }, []);

  useLayoutEffect(() => {
    live.current?.submit(document);
  }, [document]);

  return state;
}
