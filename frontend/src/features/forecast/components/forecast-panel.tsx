import { Cautions } from './cautions.tsx';
import { ForecastAnswer, type ForecastAnswerProps } from './forecast-answer.tsx';
import { ForecastFacts } from './forecast-facts.tsx';
import { SeasonRibbon } from './season-ribbon.tsx';

interface Props extends ForecastAnswerProps {
  /** Below the width `lg` the page shows the sentence elsewhere. */
  isSentenceElsewhere?: boolean;
}

/** The answer: sentence, season ribbon, facts and cautions. */
export function ForecastPanel({ isSentenceElsewhere = false, ...answer }: Props) {
  const { scenario, forecast, isComputing } = answer;
  return (
    <section aria-labelledby="forecast-heading" aria-busy={isComputing}>
      <h2 id="forecast-heading" className="sr-only">
        Forecast
      </h2>
      <div className={isSentenceElsewhere ? 'max-lg:hidden' : ''}>
        <ForecastAnswer {...answer} />
      </div>
      {forecast && (
        <>
          {forecast.dekads.length > 0 && (
            <div className="mt-4">
              <SeasonRibbon scenario={scenario} forecast={forecast} />
            </div>
          )}
          <div className="mt-6">
            <ForecastFacts scenario={scenario} forecast={forecast} />
          </div>
        </>
      )}
      <div className="mt-7">
        <Cautions scenario={scenario} forecast={forecast} />
      </div>
    </section>
  );
}
