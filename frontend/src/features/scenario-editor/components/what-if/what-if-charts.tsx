import { useMemo, useState } from 'react';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { useJobs } from '#frontend/features/scenario-editor/hooks/use-jobs.ts';
import type { WhatIfTarget } from '#frontend/features/scenario-editor/model/what-if/what-if-axes.ts';
import {
  chartJobs,
  chartPlans,
  chartsOf,
  deliveredWords,
  type ChartPoints,
} from '#frontend/features/scenario-editor/model/what-if/what-if-charts.ts';
import { WhatIfChart } from './what-if-chart.tsx';

/** Charge against payload and against a busy channel, as far as the step has either. */
export function WhatIfCharts({ document, routineId, stepId }: WhatIfTarget & { document: Scenario }) {
  const set = useMemo(() => {
    const target = { routineId, stepId };
    const plans = chartPlans(document, target);
    return { subject: plans, jobs: plans.flatMap((plan) => chartJobs(plan, target)) };
  }, [document, routineId, stepId]);
  const done = useJobs(set);
  const charts = useMemo(() => chartsOf(done?.set.subject ?? [], done?.results ?? []), [done]);
  if (set.subject.length === 0) return null;
  return (
    <div
      className={`mt-3 grid min-h-60 gap-x-8 gap-y-5 sm:grid-cols-2 ${done?.set === set ? '' : 'opacity-50'}`}
      aria-busy={done?.set !== set}
    >
      {charts.map((chart) => (
        <div key={chart.plan.id} className="min-w-0">
          <WhatIfChart chart={chart} />
          <PointsTable chart={chart} />
        </div>
      ))}
    </div>
  );
}

function PointsTable({ chart: { plan, points, current } }: { chart: ChartPoints }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <details className="mt-1 text-small" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary className="w-fit text-muted hover:text-ink">{plan.title}, as a table</summary>
      {isOpen && (
        <div className="mt-2 max-h-60 overflow-auto" tabIndex={0} role="group" aria-label={`${plan.title}, a table`}>
          <table className="w-full text-left tabular-nums">
            <thead className="sticky top-0 bg-paper">
              <tr className="border-b border-line">
                <th className="py-1 pr-4 font-bold">{plan.xTitle}</th>
                <th className="py-1 pr-4 font-bold">{plan.yTitle}</th>
                <th className="py-1 pr-4 font-bold">Delivery</th>
              </tr>
            </thead>
            <tbody>
              {points.map((point, index) => (
                <tr key={point.x} className="border-b border-hair">
                  <th scope="row" className="py-1 pr-4 font-normal">
                    {plan.tellX(point.x)}
                    {index === current && <span className="text-muted"> now</span>}
                  </th>
                  <td className="py-1 pr-4">{plan.tellY(point.y)}</td>
                  <td className="py-1 pr-4">{deliveredWords(point)}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
    </details>
  );
}
