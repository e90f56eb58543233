import type { Origin } from '#common/engine/link/exchange-plan.types.ts';

/** How a figure comes about: the formula, and who gives it. */
export function OriginNote({ formula, source }: Origin) {
  return (
    <dl className="grid max-w-[60rem] grid-cols-[auto_minmax(0,1fr)] gap-x-4 text-small">
      <dt className="text-muted">Formula</dt>
      <dd className="min-w-0 [overflow-wrap:anywhere]">{formula}</dd>
      <dt className="text-muted">Source</dt>
      <dd className="min-w-0 [overflow-wrap:anywhere]">{source}</dd>
    </dl>
  );
}
