import { OutOfRangeError } from '#common/errors.ts';

/** What a number must be, and where it stands in the input. */
export interface NumberRule {
  field: string;
  min: number;
  max?: number;
  whole?: boolean;
  unit?: string;
}

/**
 * Lets a number pass only when it is finite and within its range.
 *
 * @param value The number.
 * @param rule Path, inclusive range, whether it must be whole, unit for the message.
 * @returns The number itself.
 * @throws OutOfRangeError code `out-of-range` when it is not finite, not whole where that is asked for, or outside the range.
 * @example requireNumber(3, { field: 'channels', min: 1, max: 3, whole: true }) // 3
 */
export function requireNumber(value: number, rule: NumberRule): number {
  if (isAllowed(value, rule)) return value;
  const { field, min, max = Infinity, whole = false, unit = '' } = rule;
  const range = max === Infinity ? `${min} or more` : `${min} to ${max}`;
  const expected = `${whole ? 'a whole number, ' : ''}${range}${unit === '' ? '' : ` ${unit}`}`;
  throw new OutOfRangeError(`${field || 'The value'} is ${value}; allowed is ${expected}.`, {
    code: 'out-of-range',
    field,
    value,
    unit,
    expected,
  });
}

function isAllowed(value: number, { min, max = Infinity, whole = false }: NumberRule): boolean {
  return Number.isFinite(value) && value >= min && value <= max && (!whole || Number.isInteger(value));
}
