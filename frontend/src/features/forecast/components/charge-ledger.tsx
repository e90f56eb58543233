import { useMemo, useState } from 'react';
import type { Forecast, Ledger, Scenario } from '#common/engine/index.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import { YEAR_S } from '#common/units/si.ts';
import { ledgerView, type LedgerRow } from '../model/ledger-rows.ts';

interface Props {
  scenario: Scenario;
  forecast: Forecast;
}

/** Where the charge goes: each routine, rest, leakage and what the supply takes, with lines that add up. */
export function ChargeLedger({ scenario, forecast }: Props) {
  // The ledger comes a moment after its forecast; until then the last one stays.
  const [kept, setKept] = useState<{ scenario: Scenario; ledger: Ledger } | null>(null);
  if (forecast.ledger && forecast.ledger !== kept?.ledger) setKept({ scenario, ledger: forecast.ledger });
  const view = useMemo(() => (kept ? ledgerView(kept.scenario, kept.ledger) : null), [kept]);
  // The largest line is open at first, because what it is made of is the next question. Later ones may grow past it.
  const [openAtFirst, setOpenAtFirst] = useState<string | null>(null);
  if (openAtFirst === null && view?.rows[0]) setOpenAtFirst(view.rows[0].id);
  const [changed, setChanged] = useState<ReadonlySet<string>>(new Set());

  if (!kept || !view) return <p className="text-muted min-h-64">The ledger follows the forecast in a moment.</p>;
  const toggle = (id: string): void => {
    setChanged((ids) => (ids.has(id) ? new Set([...ids].filter((other) => other !== id)) : new Set([...ids, id])));
  };
  const isOpen = (row: LedgerRow): boolean => (row.id === openAtFirst) !== changed.has(row.id);
  return (
    <section aria-labelledby="ledger-heading" aria-busy={forecast.ledger === null}>
      <h3 id="ledger-heading" className="text-small font-extrabold">
        Where the charge goes
        <span className="text-muted ml-2.5 font-normal">{periodInWords(kept.ledger)}</span>
      </h3>
      <table className="mt-2 w-full border-collapse text-left tabular-nums">
        <thead className="sr-only">
          <tr>
            <th>Bar</th>
            <th>Share</th>
            <th>What</th>
            <th>Detail</th>
            <th>Charge</th>
          </tr>
        </thead>
        <tbody>
          {view.rows.map((row) => (
            <Rows key={row.id} row={row} depth={0} isOpen={isOpen} onToggle={toggle} largestC={largest(view.rows)} />
          ))}
        </tbody>
        <tfoot>
          <tr className="border-line border-t font-bold">
            <td className="max-sm:hidden" />
            <td className="py-2 pr-4 text-right whitespace-nowrap">100.0 %</td>
            <td className="py-2 pr-4">Total</td>
            <td className="max-md:hidden" />
            <td className="py-2 text-right whitespace-nowrap">{view.total}</td>
          </tr>
        </tfoot>
      </table>
      <details className="text-small text-muted">
        <summary className="hover:text-ink w-fit">Exact total</summary>
        <p className="mt-1 break-all">
          {view.totalExactC} C{' '}
          {kept.ledger.periodS === YEAR_S ? 'in a mean year' : `in ${formatDuration(kept.ledger.periodS)}`}, the sum of{' '}
          {kept.ledger.entries.length} entries to the last digit.
        </p>
      </details>
    </section>
  );
}

function periodInWords(ledger: Ledger): string {
  return ledger.periodS === YEAR_S ? 'mean year of life, at the cell' : `in ${formatDuration(ledger.periodS)}`;
}

function largest(rows: readonly LedgerRow[]): number {
  return Math.max(...rows.map((row) => Math.abs(row.chargeC)));
}

interface RowsProps {
  row: LedgerRow;
  /** 0 for a line of the ledger, more for what it is made of. */
  depth: number;
  isOpen: (row: LedgerRow) => boolean;
  onToggle: (id: string) => void;
  largestC: number;
}

/** A line and, where it is open, the lines that it is made of. */
function Rows({ row, depth, isOpen, onToggle, largestC }: RowsProps) {
  const canOpen = row.children.length > 0;
  const toggle = canOpen ? { isOpen: isOpen(row), onToggle: () => onToggle(row.id) } : {};
  return (
    <>
      <Line row={row} depth={depth} largestC={largestC} {...toggle} />
      {canOpen &&
        isOpen(row) &&
        row.children.map((child) => (
          <Rows key={child.id} row={child} depth={depth + 1} isOpen={isOpen} onToggle={onToggle} largestC={largestC} />
        ))}
    </>
  );
}

const INDENT = ['', 'pl-4', 'pl-8'];

interface LineProps {
  row: LedgerRow;
  depth: number;
  largestC: number;
  isOpen?: boolean;
  onToggle?: () => void;
}

function Line({ row, depth, largestC, isOpen = false, onToggle }: LineProps) {
  const isChild = depth > 0;
  const width = `${Math.min(100, (Math.abs(row.chargeC) / largestC) * 100).toFixed(2)}%`;
  return (
    <tr className={`border-hair border-b align-baseline ${isChild ? 'text-muted text-small' : ''}`}>
      <td className="w-28 max-w-28 py-1.5 pr-4 max-sm:hidden" aria-hidden="true">
        <span className="block h-2.25 w-full">
          <span
            className={`block h-full min-w-px ${row.chargeC < 0 ? 'border-line border' : isChild ? 'bg-tint-3' : 'bg-tint-4'}`}
            style={{ width }}
          />
        </span>
      </td>
      <td className="w-20 py-1.5 pr-4 text-right whitespace-nowrap">{row.share}</td>
      <th scope="row" className={`py-1.5 pr-4 text-left font-normal md:min-w-52 ${INDENT[depth] ?? 'pl-8'}`}>
        {onToggle ? (
          <button type="button" aria-expanded={isOpen} onClick={onToggle} className="group text-left hover:text-accent">
            {row.what}
            <span
              aria-hidden="true"
              className={`text-muted ml-2 inline-block text-[1.15em] leading-none ${isOpen ? 'rotate-90' : ''}`}
            >
              ›
            </span>
          </button>
        ) : (
          row.what
        )}
        <span className="text-muted text-small block md:hidden">{row.detail}</span>
      </th>
      <td className="text-muted py-1.5 pr-4 max-md:hidden">{row.detail}</td>
      <td className="py-1.5 text-right whitespace-nowrap">{row.charge}</td>
    </tr>
  );
}
