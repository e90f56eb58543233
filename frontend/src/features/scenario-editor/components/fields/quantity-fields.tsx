import { useState } from 'react';
import type { Quantity } from '#common/engine/scenario/scenario.types.ts';
import type { ParseOptions } from '#common/units/parse-quantity.ts';
import { orderProblem, withSide, type Side } from '#frontend/features/scenario-editor/model/quantity-sides.ts';
import { GridCell } from '../grid/edit-grid.tsx';
import { FigureField } from './bound-fields.tsx';
import { ProvenanceMark, type ChangeQuantity } from './provenance-mark.tsx';
import { RangeToggle } from './range-toggle.tsx';

export interface QuantityProps {
  field: string;
  /** What the figure is: "Radio, transmit: current". */
  label: string;
  quantity: Quantity;
  options: ParseOptions;
  change: ChangeQuantity;
}

const SIDES: readonly { side: Side; word: string }[] = [
  { side: 'min', word: 'minimum' },
  { side: 'typical', word: 'typical' },
  { side: 'max', word: 'maximum' },
];

function SideField({ side, word, isCell, ...props }: QuantityProps & { side: Side; word: string; isCell: boolean }) {
  const { field, label, quantity, options, change } = props;
  return (
    <FigureField
      field={`${field}.${side}`}
      label={isCell ? `${label}, ${word}` : word.replace(/^./, (first) => first.toUpperCase())}
      editLabel={`${label}, ${word}`}
      value={quantity[side]}
      options={options}
      isOptional={side !== 'typical'}
      isCell={isCell}
      align={isCell ? 'right' : 'left'}
      check={(value) => orderProblem(quantity, side, value, options)}
      change={(document, value) => change(document, (before) => withSide(before, side, value))}
    />
  );
}

/** Minimum, typical, maximum and origin of a figure as four cells of a table. */
export function QuantityCells(props: QuantityProps & { columnPrefix?: string }) {
  const { columnPrefix = '', ...rest } = props;
  return (
    <>
      {SIDES.map(({ side, word }) => (
        <GridCell key={side} column={`${columnPrefix}${side}`}>
          <SideField {...rest} side={side} word={word} isCell />
        </GridCell>
      ))}
      <GridCell column={`${columnPrefix}from`}>
        <ProvenanceMark label={rest.label} quantity={rest.quantity} change={rest.change} />
      </GridCell>
    </>
  );
}

/** The typical value alone as one cell; its range is edited elsewhere. */
export function TypicalCell({ column, ...props }: QuantityProps & { column: string }) {
  return (
    <GridCell column={column}>
      <SideField {...props} side="typical" word="typical" isCell />
    </GridCell>
  );
}

/** A figure with its origin; minimum and maximum appear on demand, or where there are any. */
export function QuantityField(props: QuantityProps & { title: string; hint?: string }) {
  const { title, hint, ...rest } = props;
  const { quantity, field, label, options, change } = rest;
  const hasRange = quantity.min !== undefined || quantity.max !== undefined;
  const [isOpen, setOpen] = useState(false);
  const isRangeShown = hasRange || isOpen;
  return (
    <div className="flex flex-wrap items-start gap-x-5">
      <div className="min-w-36 flex-1">
        <FigureField
          field={`${field}.typical`}
          label={title}
          editLabel={label}
          value={quantity.typical}
          options={options}
          check={(value) => orderProblem(quantity, 'typical', value, options)}
          change={(document, value) => change(document, (before) => withSide(before, 'typical', value))}
          {...(hint === undefined ? {} : { hint })}
        >
          <ProvenanceMark label={label} quantity={quantity} change={change} />
          {!hasRange && <RangeToggle label={label} isOpen={isOpen} onToggle={() => setOpen(!isOpen)} />}
        </FigureField>
      </div>
      {isRangeShown &&
        SIDES.filter(({ side }) => side !== 'typical').map(({ side, word }) => (
          <div key={side} className="w-24">
            <SideField {...rest} side={side} word={word} isCell={false} />
          </div>
        ))}
    </div>
  );
}
