import { useId, useMemo, useState, type KeyboardEvent } from 'react';
import type { Forecast, Scenario } from '#common/engine/index.ts';
import { forecastSentence, type FigureKey, type SentencePart } from '../model/sentence.ts';
import { FigureExplanation } from './figure-explanation.tsx';

interface Props {
  scenario: Scenario;
  forecast: Forecast;
  /** Told which figure was opened, or null when the explanation closes. */
  onOpen?: (figure: FigureKey | null) => void;
}

/** The forecast as a sentence whose figures open where they come from. */
export function ForecastSentence({ scenario, forecast, onOpen }: Props) {
  const panelId = useId();
  const [chosen, setChosen] = useState<FigureKey | null>(null);
  const parts = useMemo(() => forecastSentence(scenario, forecast), [scenario, forecast]);
  // A figure may vanish when the outcome changes; its explanation then closes by itself.
  const open = parts.some((part) => part.key === chosen) ? chosen : null;
  const choose = (figure: FigureKey | null): void => {
    setChosen(figure);
    onOpen?.(figure);
  };

  return (
    <div>
      <p className="min-h-[17.75rem] text-[1.4375rem] leading-[1.36] font-light tracking-[-0.01em] tabular-nums">
        {parts.map((part, i) => (
          <Piece
            key={`${i}-${part.key ?? ''}`}
            part={part}
            panelId={panelId}
            isOpen={part.key !== null && part.key === open}
            onToggle={() => choose(part.key === open ? null : part.key)}
          />
        ))}
      </p>
      {open !== null && (
        <FigureExplanation
          id={panelId}
          figure={open}
          scenario={scenario}
          forecast={forecast}
          onClose={() => choose(null)}
        />
      )}
    </div>
  );
}

interface PieceProps {
  part: SentencePart;
  panelId: string;
  isOpen: boolean;
  onToggle: () => void;
}

function Piece({ part, panelId, isOpen, onToggle }: PieceProps) {
  if (part.emphasis === 'plain') return part.text;
  if (part.emphasis === 'quiet') return <span className="text-muted text-[0.75em] tracking-normal">{part.text}</span>;
  const handleKeyDown = (event: KeyboardEvent): void => {
    if (event.key !== 'Enter' && event.key !== ' ') return;
    event.preventDefault();
    onToggle();
  };
  // Not a <button>: those never break across lines, and a figure may be four words long.
  return (
    <span
      role="button"
      tabIndex={0}
      aria-expanded={isOpen}
      aria-controls={isOpen ? panelId : undefined}
      className={`decoration-accent/45 hover:decoration-accent cursor-pointer underline decoration-[1.5px] underline-offset-[0.22em] ${
        part.emphasis === 'strong' ? 'font-extrabold' : 'font-normal'
      } ${isOpen ? 'decoration-accent text-accent' : ''}`}
      onClick={onToggle}
      onKeyDown={handleKeyDown}
    >
      {part.text}
    </span>
  );
}
