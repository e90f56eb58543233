import { useDeferredValue, useState } from 'react';
import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import type { WhatIfTarget } from '#frontend/features/scenario-editor/model/what-if/what-if-axes.ts';
import { WhatIfAlternatives } from './what-if-alternatives.tsx';
import { WhatIfCharts } from './what-if-charts.tsx';

/** What other values would do to a step on the air, to its routine and to the life, without changing the document. */
export function WhatIf({ routineId, stepId }: WhatIfTarget) {
  const [isOpen, setOpen] = useState(false);
  return (
    <details
      className="mt-4 border-y border-hair"
      open={isOpen}
      onToggle={(event) => setOpen(event.currentTarget.open)}
    >
      <summary className="flex min-h-10 list-none flex-wrap items-baseline gap-x-3 py-2 hover:text-accent [&::-webkit-details-marker]:hidden">
        <span className="shrink-0 font-semibold sm:w-56">
          <span aria-hidden="true" className="mr-1.5 inline-block w-3 text-muted">
            {isOpen ? '−' : '+'}
          </span>
          What if
        </span>
        <span className="min-w-0 flex-1 text-small text-muted max-sm:basis-full max-sm:pl-[1.125rem]">
          what another value would do, before it is taken
        </span>
      </summary>
      {isOpen && <Answers routineId={routineId} stepId={stepId} />}
    </details>
  );
}

function Answers({ routineId, stepId }: WhatIfTarget) {
  // The field being typed into comes first.
  const document = useDeferredValue(useDocument((current) => current));
  return (
    <div className="pb-4">
      <WhatIfAlternatives document={document} routineId={routineId} stepId={stepId} />
      <WhatIfCharts document={document} routineId={routineId} stepId={stepId} />
    </div>
  );
}
