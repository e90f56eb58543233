import { forecast } from '#common/engine/index.ts';
import type { Forecast, Scenario } from '#common/engine/index.ts';
import { EngineError } from '#common/errors.ts';
import { problemsOfEngine, problemsOfZod, type InputProblem } from '#common/schemas/problem.ts';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';

/** What the page asks of the worker. Ids grow; an answer to an old id is of no use. */
export interface ForecastRequest {
  id: number;
  document: Scenario;
  withLedger: boolean;
}

/** `forecast` is null exactly when the input has problems. */
export interface ForecastReply {
  id: number;
  forecast: Forecast | null;
  problems: InputProblem[];
  /** How long the answer took, ms. */
  computeMs: number;
}

/**
 * Checks a document as the server does and computes its forecast. Never throws: whatever is wrong comes back as problems
 * with the path of the field.
 */
export function answerForecast(request: ForecastRequest): ForecastReply {
  const startMs = performance.now();
  const answer = answerOf(request);
  return { id: request.id, ...answer, computeMs: performance.now() - startMs };
}

function answerOf({ document, withLedger }: ForecastRequest): Pick<ForecastReply, 'forecast' | 'problems'> {
  try {
    const parsed = scenarioSchema.safeParse(document);
    if (!parsed.success) return { forecast: null, problems: problemsOfZod(parsed.error) };
    return { forecast: forecast(parsed.data, { level: 'mean-current', withLedger }), problems: [] };
  } catch (error) {
    if (error instanceof EngineError) return { forecast: null, problems: problemsOfEngine(error) };
    return { forecast: null, problems: [{ path: '', message: 'This scenario could not be computed.' }] };
  }
}
