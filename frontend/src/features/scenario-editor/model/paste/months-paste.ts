import type { ClimateMonth, Scenario } from '#common/engine/scenario/scenario.types.ts';
import { MONTH_NAMES } from '#common/units/format-duration.ts';
import { parseQuantity, type ParseOptions } from '#common/units/parse-quantity.ts';
import { SWING, TEMPERATURE } from '../figure-options.ts';
import { updateClimate } from '../operations/supply-operations.ts';
import { layBlock, splitBlock, type PasteColumn } from './paste.ts';
import type { PasteTarget } from './steps-paste.ts';

function column(key: 'meanC' | 'amplitudeK', header: string, options: ParseOptions): PasteColumn<ClimateMonth> {
  return {
    key,
    header,
    read: (text) => {
      const parsed = parseQuantity(text, options);
      if (parsed.kind === 'problem') return parsed;
      return { kind: 'value', apply: (month) => ({ ...month, [key]: parsed.value }) };
    },
  };
}

const COLUMNS = [column('meanC', 'Mean', TEMPERATURE), column('amplitudeK', 'Daily swing', SWING)];

/** Pasting into the twelve months: means, and daily swings beside them. */
export const monthsPasteTarget: PasteTarget = (scenario, { text, rowId, column: start }) => {
  const { months } = scenario.climate;
  const result = layBlock<ClimateMonth>(
    {
      columns: COLUMNS,
      items: months,
      nameOf: (month) => MONTH_NAMES[months.indexOf(month)] ?? 'month',
      blank: () => ({ meanC: 0, amplitudeK: 0 }),
      limit: 12,
    },
    splitBlock(text),
    { row: Number(rowId), column: start },
  );
  return {
    ...result,
    apply: (document: Scenario) => updateClimate(document, (climate) => ({ ...climate, months: result.items })),
  };
};
