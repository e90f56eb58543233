import type { Provenance, Quantity } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { formatForEdit } from '#common/units/format-for-edit.ts';
import type { ParseOptions } from '#common/units/parse-quantity.ts';

export type Side = 'min' | 'typical' | 'max';

/** The figure with one side changed. What was cited no longer holds for it, so it counts as assumed until told otherwise. */
export function withSide(quantity: Quantity, side: Side, value: number | undefined): Quantity {
  if (quantity[side] === value) return quantity;
  const provenance = provenanceOfChanged(quantity.provenance);
  if (side === 'typical') return value === undefined ? quantity : { ...quantity, typical: value, provenance };
  const { [side]: _before, ...others } = quantity;
  return { ...others, ...(value === undefined ? {} : { [side]: value }), provenance };
}

/** The figure with another typical value, or a new assumed one where there was none. */
export function typicalOrNew(quantity: Quantity | undefined, typical: number): Quantity {
  return quantity ? withSide(quantity, 'typical', typical) : { typical, provenance: { kind: 'assumed' } };
}

function provenanceOfChanged(before: Provenance | undefined): Provenance {
  if (!before) return { kind: 'assumed' };
  if (before.kind === 'assumed') return before;
  const kind = before.kind === 'memory' ? 'from memory' : before.kind;
  const text = before.text === undefined || before.text === '' ? kind : `${kind}, ${before.text}`;
  return { kind: 'assumed', text: `Typed here. Before: ${text}`.slice(0, LIMITS.provenanceLength) };
}

/** The figure without provenance is assumed; this is what the page shows. */
export function kindOf(quantity: Pick<Quantity, 'provenance'>): Provenance['kind'] {
  return quantity.provenance?.kind ?? 'assumed';
}

/** Why a side may not have this value beside the others; null when it may. */
export function orderProblem(quantity: Quantity, side: Side, value: number, options: ParseOptions): string | null {
  const show = (limit: number): string => formatForEdit(limit, options.dimension);
  const { min, typical, max } = quantity;
  if (side === 'min' && value > typical) return `The minimum lies above the typical ${show(typical)}.`;
  if (side === 'max' && value < typical) return `The maximum lies below the typical ${show(typical)}.`;
  if (side !== 'typical') return null;
  if (min !== undefined && value < min) return `The typical lies below the minimum ${show(min)}.`;
  if (max !== undefined && value > max) return `The typical lies above the maximum ${show(max)}.`;
  return null;
}
