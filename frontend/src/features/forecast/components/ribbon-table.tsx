import { useState } from 'react';
import type { RibbonMonth } from '../model/ribbon.ts';
import { monthInWords } from '../model/ribbon-words.ts';

/** The numbers of the ribbon, made only when asked for: a long life has hundreds of months. */
export function RibbonTable({ months }: { months: RibbonMonth[] }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <details className="mt-3 text-small" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary className="text-muted hover:text-ink w-fit">The same numbers as a table</summary>
      {isOpen && (
        <div className="mt-2 max-h-80 overflow-auto" tabIndex={0} role="group" aria-label="Months of life, a table">
          <table className="w-full text-left tabular-nums">
            <thead className="bg-paper sticky top-0">
              <tr className="border-line border-b">
                <th className="py-1 pr-3 font-bold">Month</th>
                <th className="py-1 pr-3 text-right font-bold">Headroom</th>
                <th className="py-1 pr-3 text-right font-bold">Coldest</th>
                <th className="py-1 text-right font-bold">Charge left</th>
              </tr>
            </thead>
            <tbody>
              {months.map((month) => (
                <MonthRow key={month.index} month={month} />
              ))}
            </tbody>
          </table>
        </div>
      )}
    </details>
  );
}

function MonthRow({ month }: { month: RibbonMonth }) {
  const words = monthInWords(month);
  return (
    <tr className="border-hair border-b">
      <th scope="row" className="py-1 pr-3 text-left font-normal">
        {words.when}
        {words.event === '' ? '' : ` (${words.event})`}
      </th>
      <td className="py-1 pr-3 text-right">{words.headroom === 'no' ? 'none' : words.headroom}</td>
      <td className="py-1 pr-3 text-right">{words.coldest}</td>
      <td className="py-1 text-right">{words.chargeLeft}</td>
    </tr>
  );
}
