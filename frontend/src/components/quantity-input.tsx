import type { ReactNode } from 'react';
import { exampleOf, formatForEdit } from '#common/units/format-for-edit.ts';
import { parseQuantity, type ParseOptions } from '#common/units/parse-quantity.ts';
import { ParsedInput, type Parsed, type ParsedInputProps } from './quantity-input-text.tsx';

type Inherited = Omit<ParsedInputProps<number | undefined>, 'parse' | 'format' | 'value' | 'onCommit'>;

export interface QuantityInputProps extends Inherited {
  value: number | undefined;
  /** Dimension, unit of a bare number, and what is allowed. */
  options: ParseOptions;
  onCommit: (value: number | undefined) => void;
  /** An empty text is a value: none. */
  isOptional?: boolean;
  /** A rule beyond the options, such as staying under the maximum; null when it holds. */
  check?: ((value: number) => string | null) | undefined;
}

/**
 * A figure typed with its unit: `1.7 µA`, `1.7u`, `350nA`, `14 ms`. Each valid keystroke is committed; leaving the field
 * writes the figure in its easiest unit.
 */
export function QuantityInput({ options, isOptional = false, check, ...props }: QuantityInputProps): ReactNode {
  const parse = (text: string): Parsed<number | undefined> => {
    if (isOptional && text.trim() === '') return { kind: 'value', value: undefined };
    const parsed = parseQuantity(text, options);
    if (parsed.kind === 'problem') return parsed;
    const broken = check?.(parsed.value) ?? null;
    return broken === null ? parsed : { kind: 'problem', message: broken };
  };
  return (
    <ParsedInput
      placeholder={isOptional ? undefined : exampleOf(options.dimension)}
      {...props}
      parse={parse}
      format={(value) => (value === undefined ? '' : figureText(value, options))}
    />
  );
}

/** A figure as its field writes it: in the unit that gives the shortest number, zero and charges in the field's own. */
export function figureText(value: number, { dimension, defaultUnit }: ParseOptions): string {
  return value === 0 || dimension === 'charge'
    ? formatForEdit(value, dimension, defaultUnit)
    : formatForEdit(value, dimension);
}
