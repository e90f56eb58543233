import type { FigureRow, FigureTable } from '../model/figures.ts';
import { ProvenanceNote } from './provenance-note.tsx';

/** Single figures: label, value set large with its range beside it, and where it comes from. */
export function FigureRows({ caption, rows }: { caption: string; rows: readonly FigureRow[] }) {
  return (
    <table className="w-full border-collapse text-left">
      <caption className="mb-2 text-left text-lead font-light">{caption}</caption>
      <thead className="sr-only">
        <tr>
          <th scope="col">Figure</th>
          <th scope="col">Typical, and range</th>
          <th scope="col">Origin</th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr
            key={row.label}
            className="border-b border-hair align-baseline max-md:flex max-md:flex-wrap max-md:justify-between max-md:gap-x-4 max-md:py-2.5 md:[&>*]:py-2.5"
          >
            <th scope="row" className="pr-5 font-normal md:w-[32%]">
              {row.label}
            </th>
            <td className="whitespace-nowrap md:pr-5 tabular-nums md:w-[28%]">
              <strong className="font-extrabold">{row.value}</strong>
              {row.range !== null && <span className="ml-2 text-small text-muted">{row.range}</span>}
            </td>
            <td className="max-md:basis-full">
              <ProvenanceNote provenance={row.provenance} />
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** A table of pairs, as narrow as its numbers. */
export function PairTable({ table }: { table: FigureTable }) {
  return (
    <div>
      <table className="border-collapse text-right tabular-nums">
        <caption className="mb-2 text-left font-extrabold whitespace-nowrap">{table.title}</caption>
        <thead>
          <tr className="border-b border-line text-small text-muted">
            <th scope="col" className="py-1 pr-8 pl-0 text-right font-normal">
              {table.columns[0]}
            </th>
            <th scope="col" className="py-1 text-right font-normal">
              {table.columns[1]}
            </th>
          </tr>
        </thead>
        <tbody>
          {table.rows.map((row) => (
            <tr key={row[0]} className="border-b border-hair">
              <th scope="row" className="py-1.5 pr-8 text-right font-normal">
                {row[0]}
              </th>
              <td className="py-1.5">{row[1]}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <div className="mt-2 max-w-64">
        <ProvenanceNote provenance={table.provenance} />
      </div>
    </div>
  );
}
