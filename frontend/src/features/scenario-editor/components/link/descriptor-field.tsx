import type { Quantity, Scenario } from '#common/engine/scenario/scenario.types.ts';
import { useCaution } from '#frontend/features/scenario-editor/hooks/caution-context.tsx';
import { useFieldProblem } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import {
  describedText,
  isQuantity,
  type ChoiceDescriptor,
  type FieldDescriptor,
} from '#frontend/features/scenario-editor/model/link/field-descriptor.ts';
import { valueAt } from '#frontend/features/scenario-editor/model/link/link-values.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { OptionalQuantity } from '../fields/optional-quantity.tsx';

/** The object that some described fields are of. */
export interface FieldHolder {
  /** Field key of the object. */
  path: string;
  /** What the edits are of: the name of the step, or "the node". */
  of: string;
  values: object;
  /** Values that hold where this object has none; null where it has nothing above it. */
  inherited: object | null;
  /** The document with the value at a key changed; `undefined` takes it away. */
  write: (document: Scenario, key: string, update: (before: unknown) => unknown) => Scenario;
}

/** A field made from a row of a table of fields. */
export function DescriptorField({ descriptor, holder }: { descriptor: FieldDescriptor; holder: FieldHolder }) {
  const { key, label } = descriptor;
  const field = `${holder.path}.${key}`;
  const caution = useCaution(field);
  const problem = useFieldProblem(field);
  const above = holder.inherited && describedText(descriptor, valueAt(holder.inherited, key));
  const usual = above === null ? descriptor.hint : `as the node: ${above}`;
  // A caution says the same at length.
  const hint = caution === undefined ? usual : undefined;
  const value = valueAt(holder.values, key);
  const common = { field, label, editLabel: `${label.toLowerCase()} of ${holder.of}` };
  return (
    <div className="min-w-0 pb-1.5">
      {descriptor.type === 'figure' && (
        <FigureField
          {...common}
          value={typeof value === 'number' ? value : undefined}
          options={descriptor.options}
          isOptional={descriptor.isOptional ?? false}
          change={(document, next) => holder.write(document, key, () => next)}
          {...(hint === undefined ? {} : { hint })}
        >
          <CautionText text={caution} />
        </FigureField>
      )}
      {descriptor.type === 'quantity' && (
        <OptionalQuantity
          field={field}
          title={label}
          label={`${holder.of}: ${label.toLowerCase()}`}
          hint={hint}
          quantity={isQuantity(value) ? value : undefined}
          options={descriptor.options}
          isOptional={descriptor.isOptional ?? false}
          change={(document, update) => holder.write(document, key, (before) => update(quantityOf(before)))}
        >
          <CautionText text={caution} />
        </OptionalQuantity>
      )}
      {descriptor.type === 'choice' && (
        <ChoiceField
          {...common}
          value={choiceText(value)}
          choices={choicesOf(descriptor, value, above)}
          change={(document, text) => holder.write(document, key, () => storedOf(descriptor, text))}
          {...(descriptor.hint === undefined || caution !== undefined ? {} : { hint: descriptor.hint })}
        />
      )}
      {descriptor.type === 'quantity' && problem !== undefined && <p className="text-small text-rust">{problem}</p>}
      {descriptor.type === 'choice' && <CautionText text={caution} />}
    </div>
  );
}

function CautionText({ text }: { text: string | undefined }) {
  return text === undefined ? null : <p className="min-w-0 text-small text-caution">{text}</p>;
}

const quantityOf = (value: unknown): Quantity | undefined => (isQuantity(value) ? value : undefined);

function choicesOf({ choices, absent }: ChoiceDescriptor, value: unknown, above: string | null) {
  const absentLabel = above === null ? absent : `as the node: ${above}`;
  const isUnusual = value !== undefined && !choices.some((choice) => choice.value === value);
  return [
    ...(absentLabel === undefined
      ? []
      : [{ value: '', label: above === null ? `${absentLabel} (usual)` : absentLabel }]),
    ...choices.map((choice) => ({ value: String(choice.value), label: choice.label })),
    ...(isUnusual ? [{ value: choiceText(value), label: choiceText(value) }] : []),
  ];
}

/** A stored choice as the value of its option; nothing stored is the empty one. */
function choiceText(value: unknown): string {
  return typeof value === 'string' || typeof value === 'number' || typeof value === 'boolean' ? String(value) : '';
}

function storedOf({ choices }: ChoiceDescriptor, text: string): unknown {
  return choices.find((choice) => String(choice.value) === text)?.value;
}
