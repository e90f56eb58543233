import { useState, type ReactNode } from 'react';
import type { Quantity, Scenario } from '#common/engine/scenario/scenario.types.ts';
import type { ParseOptions } from '#common/units/parse-quantity.ts';
import { orderProblem, typicalOrNew, withSide } from '#frontend/features/scenario-editor/model/quantity-sides.ts';
import { FigureField } from './bound-fields.tsx';
import { ProvenanceMark } from './provenance-mark.tsx';
import { RangeToggle } from './range-toggle.tsx';

interface Props {
  field: string;
  /** What stands above the field. */
  title: string;
  /** What the figure is: "Send: channel busy". */
  label: string;
  hint?: string | undefined;
  quantity: Quantity | undefined;
  options: ParseOptions;
  isOptional: boolean;
  /** Shown with the origin below the figure. */
  children?: ReactNode;
  change: (document: Scenario, update: (before: Quantity | undefined) => Quantity | undefined) => Scenario;
}

/** A figure that may be left out: with its origin where there is one, and its range on demand. */
export function OptionalQuantity({
  field,
  title,
  label,
  hint,
  quantity,
  options,
  isOptional,
  change,
  children,
}: Props) {
  const [isOpen, setOpen] = useState(false);
  const hasRange = quantity?.min !== undefined || quantity?.max !== undefined;
  const isRangeShown = quantity !== undefined && (hasRange || isOpen);
  return (
    <div className="min-w-0">
      <FigureField
        field={`${field}.typical`}
        label={title}
        editLabel={label}
        value={quantity?.typical}
        options={options}
        isOptional={isOptional}
        check={(value) => (quantity ? orderProblem(quantity, 'typical', value, options) : null)}
        change={(document, value) =>
          change(document, (before) => (value === undefined ? undefined : typicalOrNew(before, value)))
        }
        {...(hint === undefined || quantity ? {} : { hint })}
      >
        {quantity && (
          <>
            <ProvenanceMark
              label={label}
              quantity={quantity}
              change={(document, update) => change(document, (before) => before && update(before))}
            />
            {!hasRange && <RangeToggle label={label} isOpen={isOpen} onToggle={() => setOpen(!isOpen)} />}
          </>
        )}
        {children}
      </FigureField>
      {isRangeShown && <Range {...{ field, label, quantity, options, change }} />}
    </div>
  );
}

function Range({
  field,
  label,
  quantity,
  options,
  change,
}: Pick<Props, 'field' | 'label' | 'options' | 'change'> & { quantity: Quantity }) {
  const sides = [
    { side: 'min', title: 'Minimum', word: 'minimum' },
    { side: 'max', title: 'Maximum', word: 'maximum' },
  ] as const;
  return (
    <div className="grid grid-cols-2 gap-x-4">
      {sides.map(({ side, title, word }) => (
        <FigureField
          key={side}
          field={`${field}.${side}`}
          label={title}
          editLabel={`${label}, ${word}`}
          value={quantity[side]}
          options={options}
          isOptional
          check={(value) => orderProblem(quantity, side, value, options)}
          change={(document, value) => change(document, (before) => before && withSide(before, side, value))}
        />
      ))}
    </div>
  );
}
