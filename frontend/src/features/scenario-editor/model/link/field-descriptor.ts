import type { Quantity } from '#common/engine/scenario/scenario.types.ts';
import { formatForEdit } from '#common/units/format-for-edit.ts';
import type { ParseOptions } from '#common/units/parse-quantity.ts';

interface Described {
  /** Dotted key below the object that the table of fields is about. */
  key: string;
  label: string;
  /** What it means, or what is assumed where it is empty. */
  hint?: string;
}

/** One number. */
export interface FigureDescriptor extends Described {
  type: 'figure';
  options: ParseOptions;
  isOptional?: boolean;
}

/** A figure with minimum, typical and maximum, and where it comes from. */
export interface QuantityDescriptor extends Described {
  type: 'quantity';
  options: ParseOptions;
  isOptional?: boolean;
}

export type StoredChoice = string | number | boolean;

/** One of a few words; `absent` names what holds where nothing is stored, and is missing where something always is. */
export interface ChoiceDescriptor extends Described {
  type: 'choice';
  choices: readonly { value: StoredChoice; label: string }[];
  absent?: string;
}

/** A row of a table of fields: what is typed, in which unit, and what an empty one means. */
export type FieldDescriptor = FigureDescriptor | QuantityDescriptor | ChoiceDescriptor;

/** A stored value as its field shows it; null for what this field does not hold. */
export function describedText(descriptor: FieldDescriptor, value: unknown): string | null {
  if (descriptor.type === 'choice') return descriptor.choices.find((choice) => choice.value === value)?.label ?? null;
  const number = descriptor.type === 'figure' ? value : typicalOf(value);
  return typeof number === 'number' ? formatForEdit(number, descriptor.options.dimension) : null;
}

function typicalOf(value: unknown): unknown {
  return isQuantity(value) ? value.typical : undefined;
}

export function isQuantity(value: unknown): value is Quantity {
  return typeof value === 'object' && value !== null && 'typical' in value && typeof value.typical === 'number';
}
