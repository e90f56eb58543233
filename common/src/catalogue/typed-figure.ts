import { InconsistentInputError } from '#common/errors.ts';
import type { Provenance, Quantity } from '#common/engine/scenario/scenario.types.ts';
import type { Dimension } from '#common/units/dimensions.table.ts';
import { parseQuantityRange } from '#common/units/parse-quantity.ts';

/**
 * A figure as people write it, so that tables of parts stay legible.
 *
 * @param dimension What it measures.
 * @param text One figure, or lowest … typical … highest, such as `0.4 … 1.1 … 3 µA`; an outer place may be empty.
 * @param provenance Where it comes from.
 * @returns The quantity in the document's unit.
 * @throws InconsistentInputError if the text cannot be read.
 * @example typedFigure('current', '… 1.7 … 3.1 µA', { kind: 'memory' }).max // 0.0000031
 */
export function typedFigure(dimension: Dimension, text: string, provenance: Provenance): Quantity {
  const parsed = parseQuantityRange(text, { dimension, wholeMicroseconds: dimension === 'duration' });
  if (parsed.kind === 'problem') {
    throw new InconsistentInputError(`"${text}": ${parsed.message}`, { code: parsed.code, field: 'text', value: text });
  }
  const { min, typical, max } = parsed;
  return { ...(min !== undefined && { min }), typical, ...(max !== undefined && { max }), provenance };
}
