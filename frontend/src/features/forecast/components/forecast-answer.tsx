import type { Forecast, Scenario } from '#common/engine/index.ts';
import type { InputProblem } from '#common/schemas/problem.ts';
import { nextMove } from '../model/next-move.ts';
import type { FigureKey } from '../model/sentence.ts';
import { ForecastSentence } from './forecast-sentence.tsx';

export interface ForecastAnswerProps {
  /** The document that `forecast` belongs to; while there is none, the one being edited. */
  scenario: Scenario;
  forecast: Forecast | null;
  problems: readonly InputProblem[];
  isComputing: boolean;
  onOpen?: (figure: FigureKey | null) => void;
}

/** The sentence, marked where it is of an earlier input; without a forecast, what to do next. */
export function ForecastAnswer({ scenario, forecast, problems, isComputing, onOpen }: ForecastAnswerProps) {
  return (
    <>
      <Notice scenario={scenario} forecast={forecast} problems={problems} />
      <div data-answer>
        {forecast && scenario.node.parts.length > 0 ? (
          <ForecastSentence scenario={scenario} forecast={forecast} {...(onOpen ? { onOpen } : {})} />
        ) : (
          <Waiting scenario={scenario} problems={problems} isComputing={isComputing && forecast === null} />
        )}
      </div>
    </>
  );
}

/** One line kept free above the sentence, so that a problem does not push the page down. */
function Notice({ scenario, forecast, problems }: Pick<ForecastAnswerProps, 'scenario' | 'forecast' | 'problems'>) {
  const restsOnly = scenario.node.parts.length > 0 && nextMove(scenario, []);
  const text =
    forecast && problems.length > 0
      ? `Of the last complete input. ${problems.length === 1 ? 'One entry needs' : `${problems.length} entries need`} another look.`
      : forecast && restsOnly
        ? 'At rest only: there is no routine yet.'
        : '';
  return (
    <p role="status" className="text-rust text-small min-h-[1.6rem] font-bold">
      {text}
    </p>
  );
}

function Waiting({
  scenario,
  problems,
  isComputing,
}: Pick<ForecastAnswerProps, 'scenario' | 'problems' | 'isComputing'>) {
  const move = nextMove(scenario, problems);
  if (move === null || (isComputing && problems.length === 0)) {
    return (
      <p className="text-muted min-h-[17.75rem] text-[1.4375rem] leading-[1.36] font-light">
        Computing the first forecast…
      </p>
    );
  }
  return (
    <div className="min-h-[17.75rem]">
      <p className="text-[1.4375rem] leading-[1.36] font-extrabold tracking-[-0.01em]">{move.headline}</p>
      <p className="mt-2 text-[1.1875rem] leading-[1.45] font-light">{move.detail}</p>
      {problems.length > 0 && (
        <ul className="text-small mt-3 space-y-1">
          {problems.slice(0, 5).map(({ path, message }) => (
            <li key={`${path} ${message}`} className="border-rust border-l-2 pl-3">
              {message}
            </li>
          ))}
          {problems.length > 5 && <li className="text-muted pl-3.5">and {problems.length - 5} more</li>}
        </ul>
      )}
    </div>
  );
}
