import { MONTH_NAMES } from '#common/units/format-duration.ts';
import type { Harvest } from '#common/engine/scenario/scenario.types.ts';
import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { ENERGY, SHARE, TEMPERATURE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { changeOf, OptionalSection } from './optional-section.tsx';

const NEW_HARVEST: Harvest = { energyPerDayJ: MONTH_NAMES.map(() => 0), efficiency: 0.8 };
const ofHarvest = changeOf('harvest');

/** What a harvester brings, month by month. */
export function HarvestSection() {
  const harvest = useDocument(({ supply }) => supply.harvest);
  const field = 'supply.harvest';
  return (
    <OptionalSection
      id="harvest"
      title="Harvester"
      note="kept with the scenario; whether it is counted yet stands among the cautions"
      start={{ harvest: NEW_HARVEST }}
      isThere={harvest !== undefined}
    >
      {harvest && (
        <>
          {MONTH_NAMES.map((name, index) => (
            <FigureField
              key={name}
              field={`${field}.energyPerDayJ.${index}`}
              label={`A day in ${name}`}
              value={harvest.energyPerDayJ[index]}
              options={ENERGY}
              change={(document, value = 0) =>
                ofHarvest((before) => ({ ...before, energyPerDayJ: before.energyPerDayJ.with(index, value) }))(document)
              }
            />
          ))}
          <FigureField
            field={`${field}.efficiency`}
            label="Share that reaches the cell"
            value={harvest.efficiency}
            options={SHARE}
            change={(document, efficiency = 1) => ofHarvest((before) => ({ ...before, efficiency }))(document)}
          />
          <FigureField
            field={`${field}.noChargeBelowC`}
            label="No charge below"
            hint="empty: at any temperature"
            value={harvest.noChargeBelowC}
            options={TEMPERATURE}
            isOptional
            change={(document, value) => ofHarvest((before) => withOptional(before, 'noChargeBelowC', value))(document)}
          />
        </>
      )}
    </OptionalSection>
  );
}
