import type { Duration, Routine, Step } from '#common/engine/scenario/scenario.types.ts';
import { useDocument, useFieldProblem } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { CLOCK, OCTETS, POSITIVE_NUMBER, STEP_TIME } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { onExchange } from '#frontend/features/scenario-editor/model/operations/exchange-operations.ts';
import { durationOfKind, updateStep } from '#frontend/features/scenario-editor/model/operations/routine-operations.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { QuantityField } from '../fields/quantity-fields.tsx';
import { ExchangeBuilder } from '../link/exchange-builder.tsx';
import { derivedText } from './duration-cell.tsx';

type Kind = Duration['kind'];

const KINDS: readonly { value: Kind; label: string }[] = [
  { value: 'fixed', label: 'typed' },
  { value: 'exchange', label: 'derived from the link' },
  { value: 'serial', label: 'serial transfer' },
];

interface DetailProps {
  routine: Routine;
  step: Step;
}

/** How long the selected step takes, and what that follows from. */
export function StepDetail({ routine, step }: DetailProps) {
  const index = routine.steps.indexOf(step);
  const { duration } = step;
  const field = `node.routines.${routine.id}.steps.${step.id}.duration`;
  const change = useDurationChange(routine.id, step.id);
  return (
    <section aria-labelledby="step-detail" className="mt-5 border-l-2 border-hair pl-5">
      <div className="flex flex-wrap items-baseline gap-x-3">
        <h3 id="step-detail" className="font-extrabold">
          {step.name}
        </h3>
        <p className="text-small text-muted">
          step {index + 1} of {routine.steps.length}
        </p>
      </div>
      <div className="mt-1 grid grid-cols-2 gap-x-6 sm:grid-cols-4">
        <div className={duration.kind === 'exchange' ? 'max-sm:col-span-full' : ''}>
          <ChoiceField
            field={`${field}.kind`}
            label="Duration"
            editLabel={`duration of ${step.name}`}
            value={duration.kind}
            choices={KINDS}
            change={(document, kind) =>
              change((before) => (before.kind === kind ? before : durationOfKind(kind, document.node.link)))(document)
            }
          />
        </div>
        {duration.kind === 'fixed' && (
          <div className="col-span-full sm:col-span-3">
            <QuantityField
              title="Takes"
              field={field}
              label={`${routine.name}, ${step.name}: duration`}
              quantity={duration}
              options={STEP_TIME}
              change={(document, update) =>
                change((before) => (before.kind === 'fixed' ? { ...update(before), kind: 'fixed' } : before))(document)
              }
            />
          </div>
        )}
        {duration.kind === 'serial' && (
          <SerialFields field={field} stepName={step.name} duration={duration} change={change} />
        )}
        {duration.kind === 'exchange' && (
          <ExchangeBuilder
            key={step.id}
            routineId={routine.id}
            stepId={step.id}
            field={field}
            stepName={step.name}
            exchange={duration}
            change={(document, apply) => change(onExchange(apply))(document)}
          />
        )}
      </div>
      {duration.kind === 'serial' && <Derived field={field} step={step} />}
    </section>
  );
}

type ChangeDuration = ReturnType<typeof useDurationChange>;

function useDurationChange(routineId: string, stepId: string) {
  return (apply: (duration: Duration) => Duration) => (document: Parameters<typeof updateStep>[0]) =>
    updateStep(document, routineId, stepId, (before) => ({ ...before, duration: apply(before.duration) }));
}

function Derived({ field, step }: { field: string; step: Step }) {
  const link = useDocument((document) => document.node.link);
  const problem = useFieldProblem(field);
  const text = derivedText(step, link);
  const times = step.repeats === undefined ? '' : `, ${step.repeats} times`;
  return (
    <p className={`min-h-6 ${text === null ? 'text-rust' : ''}`}>
      {text === null ? (problem ?? 'The figures above do not give a duration yet.') : <strong>{text}</strong>}
      {text !== null && <span className="text-muted">{times}, derived</span>}
    </p>
  );
}

interface FieldsProps<D extends Duration> {
  field: string;
  stepName: string;
  duration: D;
  change: ChangeDuration;
}

function SerialFields({ field, stepName, duration, change }: FieldsProps<Extract<Duration, { kind: 'serial' }>>) {
  const rows = [
    { key: 'octets', label: 'Octets', hint: 'an octet is a byte', options: OCTETS, isOptional: false },
    { key: 'clockHz', label: 'Clock', hint: undefined, options: CLOCK, isOptional: false },
    { key: 'bitsPerOctet', label: 'Bits an octet', hint: 'empty: 8', options: POSITIVE_NUMBER, isOptional: true },
    { key: 'overheadPerOctetS', label: 'Pause an octet', hint: 'empty: none', options: STEP_TIME, isOptional: true },
    { key: 'overheadS', label: 'Pause in all', hint: 'empty: none', options: STEP_TIME, isOptional: true },
  ] as const;
  return rows.map(({ key, label, hint, options, isOptional }) => (
    <FigureField
      key={key}
      field={`${field}.${key}`}
      label={label}
      editLabel={`${label.toLowerCase()} of ${stepName}`}
      value={duration[key]}
      options={options}
      isOptional={isOptional}
      {...(hint === undefined ? {} : { hint })}
      change={(document, value) =>
        change((before) => {
          if (before.kind !== 'serial') return before;
          if (key === 'octets' || key === 'clockHz') return value === undefined ? before : { ...before, [key]: value };
          return withOptional(before, key, value);
        })(document)
      }
    />
  ));
}
