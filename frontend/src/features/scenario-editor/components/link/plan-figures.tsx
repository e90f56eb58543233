import type { ExchangeFigure } from '#common/engine/link/exchange-plan.types.ts';
import { figureWords } from '#frontend/features/scenario-editor/model/link/figure-words.ts';
import { OriginNote } from './origin-note.tsx';

/** What else follows from the link: delivery, repeats, time on air. Each opens how it comes about. */
export function PlanFigures({ figures }: { figures: readonly ExchangeFigure[] }) {
  if (figures.length === 0) return null;
  return (
    <section aria-labelledby="plan-figures" className="mt-7">
      <h4 id="plan-figures" className="text-small font-extrabold">
        What follows
      </h4>
      <ul className="mt-1 gap-x-10 lg:columns-2">
        {figures.map((figure) => (
          <li key={figure.id} className="break-inside-avoid border-b border-hair">
            <details>
              <summary
                title="How it comes about"
                className="flex min-h-9 list-none items-baseline justify-between gap-x-4 py-1.5 text-small hover:text-accent [&::-webkit-details-marker]:hidden"
              >
                <span className="underline decoration-dotted underline-offset-4">{figure.name}</span>
                <strong className="font-bold whitespace-nowrap tabular-nums">{figureWords(figure)}</strong>
              </summary>
              <div className="pb-2.5 pl-4">
                <OriginNote formula={figure.formula} source={figure.source} />
              </div>
            </details>
          </li>
        ))}
      </ul>
    </section>
  );
}
