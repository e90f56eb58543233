import { useRef, type KeyboardEvent } from 'react';
import { formatDuration } from '#common/units/format-duration.ts';
import type { StepSpan } from '../model/lanes.ts';

interface Props {
  steps: readonly StepSpan[];
  selectedStepId: string | null;
  onSelectStep: (stepId: string) => void;
}

export const percent = (value: number): string => `${(value * 100).toFixed(3)}%`;

/** Names and durations over the lanes. Click or arrow keys select a step. */
export function StepHeader({ steps, selectedStepId, onSelectStep }: Props) {
  const row = useRef<HTMLDivElement>(null);
  const ids = steps.flatMap((step) => step.stepId ?? []);
  const reachable = selectedStepId !== null && ids.includes(selectedStepId) ? selectedStepId : ids[0];

  const handleKey = (event: KeyboardEvent): void => {
    const at = ids.indexOf(reachable ?? '');
    const targets: Record<string, number> = {
      ArrowRight: at + 1,
      ArrowLeft: at - 1,
      Home: 0,
      End: ids.length - 1,
    };
    const target = targets[event.key];
    const id = target === undefined ? undefined : ids[Math.max(0, Math.min(ids.length - 1, target))];
    if (id === undefined) return;
    event.preventDefault();
    onSelectStep(id);
    row.current?.querySelector<HTMLElement>(`[data-step="${id}"]`)?.focus();
  };

  return (
    <div ref={row} role="toolbar" aria-label="Steps" className="relative h-11" onKeyDown={handleKey}>
      {steps.map((step) => {
        const style = { left: percent(step.from), width: percent(step.to - step.from) };
        const place = 'absolute inset-y-0 overflow-hidden pl-1 pr-0.5 text-left text-[0.6875rem] leading-[0.9375rem]';
        if (step.stepId === null) {
          return (
            <div key={`${step.kind} ${step.from}`} className={`@container ${place} text-muted`} style={style}>
              <div className="hidden pt-1.5 @min-[2.4rem]:block">
                <span className="block truncate">{step.name}</span>
                <span className="block truncate tabular-nums">{formatDuration(step.durationS)}</span>
              </div>
            </div>
          );
        }
        const { stepId } = step;
        const isSelected = stepId === selectedStepId;
        return (
          <button
            key={stepId}
            type="button"
            data-step={stepId}
            aria-pressed={isSelected}
            tabIndex={stepId === reachable ? 0 : -1}
            title={`${step.name}, ${formatDuration(step.durationS)}`}
            className={`${place} -outline-offset-2 flex flex-col items-stretch justify-start pt-1.5 ${isSelected ? 'border-accent border-t-3 pt-[0.1875rem]' : 'hover:text-accent'}`}
            style={style}
            onClick={() => onSelectStep(stepId)}
          >
            <span className={`block truncate ${isSelected ? 'font-extrabold' : 'font-semibold'}`}>{step.name}</span>
            <span className="text-muted block truncate tabular-nums">{formatDuration(step.durationS)}</span>
          </button>
        );
      })}
    </div>
  );
}
