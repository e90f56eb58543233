import type { Forecast, Scenario } from '#common/engine/index.ts';
import { explainFigure } from '../model/explanation.ts';
import type { FigureKey } from '../model/sentence.ts';

interface Props {
  id: string;
  figure: FigureKey;
  scenario: Scenario;
  forecast: Forecast;
  onClose: () => void;
}

/** Where a figure of the sentence comes from: the formula in words, then the figures. */
export function FigureExplanation({ id, figure, scenario, forecast, onClose }: Props) {
  const { title, words, rows } = explainFigure(figure, scenario, forecast);
  return (
    <div
      id={id}
      role="region"
      aria-label={`${title}: where it comes from`}
      className="border-l-2 border-accent mt-3 mb-5 pl-4 text-small"
    >
      <div className="flex items-baseline justify-between gap-4">
        <p className="font-extrabold">{title}</p>
        <button type="button" className="text-muted hover:text-ink -my-1 px-1 py-1" onClick={onClose}>
          Close
        </button>
      </div>
      <p className="text-muted mt-1 max-w-prose">{words}</p>
      <dl className="mt-2">
        {rows.map(({ label, value }) => (
          <div key={label} className="border-hair flex justify-between gap-4 border-t py-1">
            <dt className="text-muted">{label}</dt>
            <dd className="text-right font-bold tabular-nums">{value}</dd>
          </div>
        ))}
      </dl>
    </div>
  );
}
