import type { Cell } from '#common/engine/scenario/scenario.types.ts';
import { cellFigures, cellTables } from '../model/figures.ts';
import { FigureRows, PairTable } from './figure-tables.tsx';

export function CellContent({ cell }: { cell: Cell }) {
  return (
    <>
      <FigureRows caption="Figures" rows={cellFigures(cell)} />
      <h2 className="mt-12 text-lead font-light">Tables</h2>
      <div className="mt-4 flex flex-wrap gap-x-16 gap-y-10">
        {cellTables(cell).map((table) => (
          <PairTable key={table.title} table={table} />
        ))}
      </div>
    </>
  );
}
