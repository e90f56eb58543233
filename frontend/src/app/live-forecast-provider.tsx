import { createContext, use, useDeferredValue, useMemo, type ReactNode } from 'react';
import type { InputProblem } from '#common/schemas/problem.ts';
import { useLiveForecast } from '#frontend/features/forecast/hooks/use-live-forecast.ts';
import { NO_FORECAST, type LiveForecastState } from '#frontend/features/forecast/model/live-forecast.ts';
import { ProblemProvider, useEditorState } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useFieldProblems } from '#frontend/features/scenario-editor/hooks/use-field-problems.ts';
import { useSettled } from '#frontend/features/scenario-editor/hooks/use-settled.ts';

const LiveForecastContext = createContext<LiveForecastState>(NO_FORECAST);
const EngineProblemsContext = createContext<readonly InputProblem[]>(NO_FORECAST.problems);

interface LiveForecastProviderProps {
  /** Problems that the server found when the document was saved. */
  serverProblems: readonly InputProblem[];
  children: ReactNode;
}

/**
 * Computes the forecast of the document in the editor, once for everything on the page that shows it, and tells every field
 * of the editor what the engine says about it. What is inside renders only where it reads one of the two.
 */
export function LiveForecastProvider({ serverProblems, children }: LiveForecastProviderProps) {
  const document = useEditorState((state) => state.document);
  const live = useLiveForecast(document);
  const engineProblems = useSettled(live.problems);
  const problems = useMemo(() => [...engineProblems, ...serverProblems], [engineProblems, serverProblems]);
  const fields = useFieldProblems(problems);
  return (
    <LiveForecastContext value={live}>
      <EngineProblemsContext value={engineProblems}>
        <ProblemProvider problems={fields}>{children}</ProblemProvider>
      </EngineProblemsContext>
    </LiveForecastContext>
  );
}

/** The forecast at hand, for the answer that a keystroke is typed for. */
export function useForecastOnPage(): LiveForecastState {
  return use(LiveForecastContext);
}

/** The forecast at hand for pictures that a keystroke does not wait for. */
export function useForecastInPictures(): LiveForecastState {
  return useDeferredValue(use(LiveForecastContext));
}

/** The engine's complaints about the present document, at once; the same list as long as they are the same. */
export function useForecastProblems(): readonly InputProblem[] {
  return use(EngineProblemsContext);
}
