import type { Forecast, Scenario } from '#common/engine/index.ts';
import type { InputProblem } from '#common/schemas/problem.ts';
import type { ForecastReply, ForecastRequest } from './forecast-protocol.ts';

export interface LiveForecastState {
  /** The last good forecast, of the last complete input. */
  forecast: Forecast | null;
  /** The document that `forecast` belongs to: names in pictures come from here. */
  scenario: Scenario | null;
  /** Problems of the current input; while there are any, `forecast` is of an earlier one. */
  problems: InputProblem[];
  isComputing: boolean;
}

export const NO_FORECAST: LiveForecastState = { forecast: null, scenario: null, problems: [], isComputing: false };

/** Where requests are answered: a worker, or this thread. */
export interface ForecastSource {
  post(request: ForecastRequest): void;
  stop(): void;
}

export type OpenForecastSource = (onReply: (reply: ForecastReply) => void, onFailure: () => void) => ForecastSource;

/** Pause after the last change before the ledger is asked for, ms. */
const LEDGER_PAUSE_MS = 120;

export interface LiveForecast {
  submit(document: Scenario | null): void;
  stop(): void;
}

/**
 * Keeps one request under way and at most one waiting, so that the newest document wins and no queue grows. The forecast
 * comes first without its ledger; the ledger follows once typing pauses.
 */
export function startLiveForecast(
  open: OpenForecastSource,
  openFallback: OpenForecastSource,
  onChange: (state: LiveForecastState) => void,
): LiveForecast {
  let state = NO_FORECAST;
  let lastId = 0;
  let underWay: ForecastRequest | null = null;
  let waiting: Scenario | null = null;
  let ledgerTimer: ReturnType<typeof setTimeout> | undefined;
  let isStopped = false;

  const tell = (change: Partial<LiveForecastState>): void => {
    if (isStopped) return;
    state = { ...state, ...change };
    onChange(state);
  };
  const send = (document: Scenario, withLedger: boolean): void => {
    lastId += 1;
    underWay = { id: lastId, document, withLedger };
    source.post(underWay);
  };
  const finish = (request: ForecastRequest, reply: ForecastReply): void => {
    const settled = { problems: reply.problems, isComputing: false };
    tell(reply.forecast ? { forecast: reply.forecast, scenario: request.document, ...settled } : settled);
    if (reply.forecast && !request.withLedger) {
      ledgerTimer = setTimeout(() => send(request.document, true), LEDGER_PAUSE_MS);
    }
  };
  const receive = (reply: ForecastReply): void => {
    if (isStopped || underWay?.id !== reply.id) return;
    const request = underWay;
    underWay = null;
    if (waiting) {
      const next = waiting;
      waiting = null;
      // Shown although already old: under fast typing the picture would stand still otherwise.
      if (reply.forecast) tell({ forecast: reply.forecast, scenario: request.document, problems: [] });
      send(next, false);
    } else finish(request, reply);
  };
  const fallBack = (): void => {
    if (isStopped || source.isFallback) return;
    source.stop();
    source = { ...openFallback(receive, () => undefined), isFallback: true };
    if (underWay) source.post(underWay);
  };
  let source: ForecastSource & { isFallback: boolean } = { ...open(receive, fallBack), isFallback: false };

  return {
    submit(document) {
      clearTimeout(ledgerTimer);
      if (document === null) {
        waiting = null;
        return;
      }
      if (!state.isComputing) tell({ isComputing: true });
      if (underWay) waiting = document;
      else send(document, false);
    },
    stop() {
      isStopped = true;
      clearTimeout(ledgerTimer);
      source.stop();
    },
  };
}
