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

/**
 * Keeps one request under way and at most one waiting, so that the newest document wins and no queue grows. The forecast
 * comes first without its ledger; the ledger follows once typing pauses.
 */
export class LiveForecast {
  private state = NO_FORECAST;
  private lastId = 0;
  private underWay: ForecastRequest | null = null;
  private waiting: Scenario | null = null;
  private ledgerTimer: ReturnType<typeof setTimeout> | undefined;
  private isStopped = false;
  private isFallenBack = false;
  private source: ForecastSource;

  constructor(
    open: OpenForecastSource,
    private readonly openFallback: OpenForecastSource,
    private readonly onChange: (state: LiveForecastState) => void,
  ) {
    this.source = open(this.receive, this.fallBack);
  }

  /** Computes a document; null withdraws what is waiting and keeps what is shown. */
  submit(document: Scenario | null): void {
    clearTimeout(this.ledgerTimer);
    if (document === null) {
      this.waiting = null;
      return;
    }
    if (!this.state.isComputing) this.tell({ isComputing: true });
    if (this.underWay) this.waiting = document;
    else this.send(document, false);
  }

  stop(): void {
    this.isStopped = true;
    clearTimeout(this.ledgerTimer);
    this.source.stop();
  }

  private tell(change: Partial<LiveForecastState>): void {
    this.state = { ...this.state, ...change };
    this.onChange(this.state);
  }

  private send(document: Scenario, withLedger: boolean): void {
    this.lastId += 1;
    this.underWay = { id: this.lastId, document, withLedger };
    this.source.post(this.underWay);
  }

  private readonly receive = (reply: ForecastReply): void => {
    if (this.isStopped || this.underWay?.id !== reply.id) return;
    const request = this.underWay;
    this.underWay = null;
    const good = reply.forecast ? { forecast: reply.forecast, scenario: request.document } : {};
    if (this.waiting) {
      // Shown although already old: under fast typing the picture would stand still otherwise.
      this.tell(reply.forecast ? { ...good, problems: [] } : {});
      const next = this.waiting;
      this.waiting = null;
      this.send(next, false);
      return;
    }
    this.tell({ ...good, problems: reply.problems, isComputing: false });
    if (reply.forecast && !request.withLedger) {
      this.ledgerTimer = setTimeout(() => this.send(request.document, true), LEDGER_PAUSE_MS);
    }
  };

  private readonly fallBack = (): void => {
    if (this.isStopped || this.isFallenBack) return;
    this.isFallenBack = true;
    this.source.stop();
    this.source = this.openFallback(this.receive, () => undefined);
    if (this.underWay) this.source.post(this.underWay);
  };
}
