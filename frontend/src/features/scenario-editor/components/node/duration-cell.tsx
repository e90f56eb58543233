import type { Step } from '#common/engine/scenario/scenario.types.ts';
import { EngineError } from '#common/errors.ts';
import { stepDuration } from '#common/engine/link/step-duration.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import { useDocument, useFieldProblem } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { STEP_TIME } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateStep } from '#frontend/features/scenario-editor/model/operations/routine-operations.ts';
import { orderProblem, withSide } from '#frontend/features/scenario-editor/model/quantity-sides.ts';
import { FigureField } from '../fields/bound-fields.tsx';

/** Duration of a step: typed, or derived from the link or a serial transfer and then only shown here. */
export function DurationCell({ routineId, step }: { routineId: string; step: Step }) {
  const { duration } = step;
  const field = `node.routines.${routineId}.steps.${step.id}.duration`;
  if (duration.kind !== 'fixed') return <DerivedDuration field={field} step={step} />;
  return (
    <FigureField
      field={`${field}.typical`}
      label={`Duration of ${step.name}`}
      isCell
      align="right"
      value={duration.typical}
      options={STEP_TIME}
      check={(value) => orderProblem(duration, 'typical', value, STEP_TIME)}
      change={(document, value) =>
        updateStep(document, routineId, step.id, (before) =>
          before.duration.kind === 'fixed'
            ? { ...before, duration: { ...withSide(before.duration, 'typical', value), kind: 'fixed' } }
            : before,
        )
      }
    />
  );
}

function DerivedDuration({ field, step }: { field: string; step: Step }) {
  const link = useDocument((document) => document.node.link);
  const problem = useFieldProblem(field);
  const text = derivedText(step, link);
  return (
    <button
      type="button"
      data-field={field}
      title={problem ?? 'Derived; see below the table.'}
      className={`h-9 w-full px-1.5 text-right italic ${text === null ? 'text-rust' : 'text-muted'}`}
    >
      {text ?? 'open'}
    </button>
  );
}

type Link = Parameters<typeof stepDuration>[1];

/** The derived duration of one pass in words; null where the inputs do not give one. */
export function derivedText(step: Step, link: Link): string | null {
  try {
    return formatDuration(stepDuration({ ...step, repeats: 1 }, link).meanS, { significantDigits: 4 });
  } catch (error) {
    if (error instanceof EngineError) return null;
    throw error;
  }
}
