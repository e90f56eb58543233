import type { Forecast, ForecastOptions } from '#common/engine/forecast/forecast.types.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { EngineError } from '#common/errors.ts';
import type { ForecastSummary } from '#common/schemas/api/scenarios.ts';
import { problemsOfEngine } from '#common/schemas/problem.ts';
import { InvalidInputError } from '#backend/domain/errors.ts';

export type ForecastFunction = (scenario: Scenario, options?: ForecastOptions) => Forecast;

/** Runs the engine for the API. */
export class ForecastService {
  readonly #forecast: ForecastFunction;
  readonly #onDefect: (error: unknown) => void;

  /**
   * @param forecast the engine
   * @param onDefect told of errors that are no fault of the document
   */
  constructor(forecast: ForecastFunction, onDefect: (error: unknown) => void) {
    this.#forecast = forecast;
    this.#onDefect = onDefect;
  }

  /**
   * Computes a document with its ledger.
   *
   * @param document a scenario of valid shape
   * @param prefix path of the document in the request, '' when it is not part of one
   * @returns the forecast
   * @throws {InvalidInputError} with every problem when the node cannot run
   */
  compute(document: Scenario, prefix: string): Forecast {
    try {
      return this.#forecast(document, { withLedger: true });
    } catch (error) {
      if (error instanceof EngineError) throw new InvalidInputError(problemsOfEngine(error, prefix), { cause: error });
      throw error;
    }
  }

  /**
   * What lists show of a document.
   *
   * @param document a scenario of valid shape
   * @returns the summary; null when it cannot be computed, which never keeps a document from being saved
   */
  summarise(document: Scenario): ForecastSummary | null {
    try {
      const { engineVersion, outcome, lifeS, endMonth } = this.#forecast(document, { withLedger: false });
      return { engineVersion, outcome, lifeS, endMonth, targetLifeS: document.target.lifeS };
    } catch (error) {
      if (!(error instanceof EngineError)) this.#onDefect(error);
      return null;
    }
  }
}
