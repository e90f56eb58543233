import { memo, useState } from 'react';
import type { ClimateMonth } from '#common/engine/scenario/scenario.types.ts';
import { MONTH_NAMES } from '#common/units/format-duration.ts';
import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { SWING, TEMPERATURE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateMonth } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { monthsPasteTarget } from '#frontend/features/scenario-editor/model/paste/months-paste.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { EditGrid, GridCell, GridRow, PINNED_CELL, type PastedBlock } from '../grid/edit-grid.tsx';
import { PasteDialog } from '../paste/paste-dialog.tsx';

const COLUMNS = [
  { key: 'month', header: 'Month', width: '8rem' },
  { key: 'meanC', header: 'Mean', width: '7rem', isNumber: true },
  { key: 'amplitudeK', header: 'Daily swing', width: '7rem', isNumber: true },
];

/** Twelve months, January first. */
export function MonthsTable() {
  const months = useDocument(({ climate }) => climate.months);
  const [pasted, setPasted] = useState<PastedBlock | null>(null);
  return (
    <div className="max-w-md">
      <EditGrid label="Months" columns={COLUMNS} fieldPrefix="climate.months." onPasteBlock={setPasted}>
        {months.map((month, index) => (
          <MonthRow key={MONTH_NAMES[index]} month={month} index={index} />
        ))}
      </EditGrid>
      {pasted && <PasteDialog block={pasted} target={monthsPasteTarget} onClose={() => setPasted(null)} />}
    </div>
  );
}

const MonthRow = memo(function MonthRow({ month, index }: { month: ClimateMonth; index: number }) {
  const name = MONTH_NAMES[index] ?? '';
  return (
    <GridRow rowId={String(index)}>
      <th scope="row" className={`${PINNED_CELL} px-1.5 text-left`}>
        {name}
      </th>
      <GridCell column="meanC">
        <FigureField
          field={`climate.months.${index}.meanC`}
          label={`Mean of ${name}`}
          isCell
          align="right"
          value={month.meanC}
          options={TEMPERATURE}
          change={(document, meanC = 0) => updateMonth(document, index, (before) => ({ ...before, meanC }))}
        />
      </GridCell>
      <GridCell column="amplitudeK">
        <FigureField
          field={`climate.months.${index}.amplitudeK`}
          label={`Daily swing in ${name}`}
          isCell
          align="right"
          value={month.amplitudeK}
          options={SWING}
          change={(document, amplitudeK = 0) => updateMonth(document, index, (before) => ({ ...before, amplitudeK }))}
        />
      </GridCell>
    </GridRow>
  );
});
