import { useState } from 'react';
import type { LibraryItem } from '#common/schemas/api/library.ts';
import { formatQuantity } from '#common/units/format-quantity.ts';
import { Button } from '#frontend/components/button.tsx';
import { Dialog } from '#frontend/components/dialog.tsx';
import {
  useDocument,
  useEditorStore,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { RETURN_YEARS, TEMPERATURE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import {
  applyClimate,
  updateClimate,
  withOptional,
} from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { MONTHS } from '#frontend/features/scenario-editor/model/words.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { LibraryPicker } from '../library-picker.tsx';
import { Section } from '../node/section.tsx';
import { MonthsTable } from './months-table.tsx';
import { StorageFields } from './storage-fields.tsx';

/** The temperatures that a node lives in, and where it lay before. */
export function ClimateEditor() {
  const startMonth = useDocument(({ climate }) => climate.startMonth);
  return (
    <>
      <Section id="months" title="The year" note="mean of each month, and how far a day swings to each side of it">
        <TakeClimate />
        <MonthsTable />
        <div className="mt-4 grid grid-cols-2 gap-x-6 sm:grid-cols-4">
          <ChoiceField
            field="climate.startMonth"
            label="Life starts in"
            value={String(startMonth)}
            choices={MONTHS}
            change={(document, month) =>
              updateClimate(document, (climate) => ({ ...climate, startMonth: Number(month) }))
            }
          />
        </div>
      </Section>
      <Section id="extremes" title="Extremes" note="the coldest night and the hottest day, each year in their month">
        <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-6">
          <ExtremeFields side="coldest" label="Coldest night" />
          <ExtremeFields side="hottest" label="Hottest day" />
        </div>
      </Section>
      <Section id="storage" title="Storage" note="before life starts">
        <StorageFields />
      </Section>
    </>
  );
}

function TakeClimate() {
  const store = useEditorStore();
  const [isPicking, setPicking] = useState(false);
  if (useIsReadOnly()) return null;
  return (
    <>
      <Button className="mb-3" onClick={() => setPicking(true)}>
        Take a typical climate
      </Button>
      <Dialog title="Take a climate" isOpen={isPicking} onClose={() => setPicking(false)}>
        <LibraryPicker
          kind="climate"
          label="Find a climate by name"
          describe={describeClimate}
          onPick={({ name, content }) => {
            if (content.kind !== 'climate') return;
            store.edit({
              label: `take the climate “${name}”`,
              change: (document) => applyClimate(document, content.climate),
            });
            setPicking(false);
          }}
        />
      </Dialog>
    </>
  );
}

function describeClimate({ content }: LibraryItem): string {
  if (content.kind !== 'climate') return '';
  const means = content.climate.months.map(({ meanC }) => meanC);
  const show = (value: number): string => formatQuantity(value, 'temperature');
  return `months from ${show(Math.min(...means))} to ${show(Math.max(...means))}`;
}

function ExtremeFields({ side, label }: { side: 'coldest' | 'hottest'; label: string }) {
  const extremes = useDocument(({ climate }) => climate.extremes);
  const extreme = extremes?.[side];
  const field = `climate.extremes.${side}`;
  return (
    <>
      <FigureField
        field={`${field}.temperatureC`}
        label={label}
        hint="empty: none"
        value={extreme?.temperatureC}
        options={TEMPERATURE}
        isOptional
        change={(document, temperatureC) =>
          updateClimate(document, (climate) => {
            const before = climate.extremes?.[side] ?? { temperatureC: 0, month: side === 'coldest' ? 1 : 7 };
            const next = temperatureC === undefined ? undefined : { ...before, temperatureC };
            const all = withOptional(climate.extremes ?? {}, side, next);
            return withOptional(climate, 'extremes', Object.keys(all).length === 0 ? undefined : all);
          })
        }
      />
      {extreme ? (
        <>
          <ChoiceField
            field={`${field}.month`}
            label="in"
            editLabel={`month of the ${label.toLowerCase()}`}
            value={String(extreme.month)}
            choices={MONTHS}
            change={(document, month) =>
              updateClimate(document, (climate) => ({
                ...climate,
                extremes: { ...climate.extremes, [side]: { ...extreme, month: Number(month) } },
              }))
            }
          />
          <FigureField
            field={`${field}.returnYears`}
            label="once in years"
            hint="empty: each year"
            editLabel={`return of the ${label.toLowerCase()}`}
            value={extreme.returnYears}
            options={RETURN_YEARS}
            isOptional
            change={(document, returnYears) =>
              updateClimate(document, (climate) => ({
                ...climate,
                extremes: { ...climate.extremes, [side]: withOptional(extreme, 'returnYears', returnYears) },
              }))
            }
          />
        </>
      ) : (
        <div className="hidden sm:col-span-2 sm:block" />
      )}
    </>
  );
}
