import { useMemo, useState, type ReactNode } from 'react';
import type { ExchangePlan } from '#common/engine/link/exchange-plan.types.ts';
import {
  isOneExchange,
  meanRow,
  MOST_ATTEMPTS_DRAWN,
  worstRow,
} from '#frontend/features/scenario-editor/model/link/exchange-picture.ts';
import { phaseTime } from '#frontend/features/scenario-editor/model/link/figure-words.ts';
import { PhaseRow } from './phase-row.tsx';
import { PhaseTable } from './phase-table.tsx';

/** The exchange in time: on average and at worst, each to its own scale, and the same as a table. */
export function ExchangePicture({ plan }: { plan: ExchangePlan }) {
  const [selected, setSelected] = useState<number | null>(null);
  const rows = useMemo(() => ({ mean: meanRow(plan), worst: worstRow(plan) }), [plan]);
  const { phases, worstAttempts } = plan;
  const drawing = { phases, selected, onSelect: setSelected };
  if (phases.length === 0) return <p className="text-muted">The radio does nothing in this exchange.</p>;
  return (
    <section aria-labelledby="exchange-picture" className="mt-7">
      <h4 id="exchange-picture" className="text-small font-extrabold">
        The exchange in time
        <span className="ml-2.5 font-normal text-muted">each row to its own scale; numbers as in the table</span>
      </h4>
      {/* The table below says the same to the keyboard and to screen readers. */}
      <div aria-hidden="true" className="mt-1 grid gap-x-5 sm:grid-cols-[6.5rem_minmax(0,1fr)]">
        <RowTitle title="On average" time={phaseTime(plan.meanS)} />
        <PhaseRow row={rows.mean} {...drawing} />
        <RowTitle title="At worst" time={phaseTime(plan.worstS)}>
          {worstAttempts > 1 && <span className="text-muted"> {worstAttempts} attempts</span>}
        </RowTitle>
        <PhaseRow row={rows.worst} {...drawing} {...meanMark(plan)} />
      </div>
      {worstAttempts > MOST_ATTEMPTS_DRAWN && (
        <p className="mt-1 text-small text-muted">
          The {worstAttempts} attempts at worst are drawn as one: each phase with all its time.
        </p>
      )}
      {!isOneExchange(rows.worst, plan) && (
        <p className="mt-1 text-small text-muted">
          At worst each phase is drawn at its own longest; no single exchange has them all.
        </p>
      )}
      <PhaseTable plan={plan} selected={selected} onSelect={setSelected} />
    </section>
  );
}

function meanMark({ meanS, worstS }: ExchangePlan): { meanAt?: number } {
  return meanS > 0 && meanS < worstS ? { meanAt: meanS / worstS } : {};
}

function RowTitle({ title, time, children }: { title: string; time: string; children?: ReactNode }) {
  return (
    <p className="flex gap-x-2 text-small leading-tight max-sm:mt-3 max-sm:items-baseline sm:flex-col sm:justify-start sm:pt-9">
      <span>{title}</span>
      <strong className="font-extrabold tabular-nums">{time}</strong>
      {children}
    </p>
  );
}
