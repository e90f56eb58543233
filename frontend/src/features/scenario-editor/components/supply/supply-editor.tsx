import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { CELL_COUNT, RESERVE, VOLTAGE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateSupply, withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { MaximaSection } from '../node/maxima-section.tsx';
import { Section } from '../node/section.tsx';
import { CellSection } from './cell-section.tsx';
import { CapacitorSection } from './capacitor-section.tsx';
import { HarvestSection } from './harvest-section.tsx';
import { LowBatterySection } from './low-battery-section.tsx';
import { RegulatorSection } from './regulator-section.tsx';

/** Where the charge comes from: cells, regulator, and what guards them. */
export function SupplyEditor() {
  return (
    <>
      <Section id="pack" title="Pack" note="cells in series add voltage, in parallel capacity">
        <Pack />
      </Section>
      <CellSection />
      <RegulatorSection />
      <LowBatterySection />
      <CapacitorSection />
      <HarvestSection />
      <MaximaSection />
    </>
  );
}

function Pack() {
  const series = useDocument(({ supply }) => supply.series);
  const parallel = useDocument(({ supply }) => supply.parallel);
  const cutOffV = useDocument(({ supply }) => supply.cutOffV);
  const reserve = useDocument(({ supply }) => supply.reserveFraction);
  return (
    <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">
      <FigureField
        field="supply.series"
        label="In series"
        value={series}
        options={CELL_COUNT}
        change={(document, value = 1) => updateSupply(document, (supply) => ({ ...supply, series: value }))}
      />
      <FigureField
        field="supply.parallel"
        label="In parallel"
        value={parallel}
        options={CELL_COUNT}
        change={(document, value = 1) => updateSupply(document, (supply) => ({ ...supply, parallel: value }))}
      />
      <FigureField
        field="supply.cutOffV"
        label="Cut-off of the pack"
        hint="empty: the parts decide"
        value={cutOffV}
        options={VOLTAGE}
        isOptional
        change={(document, value) => updateSupply(document, (supply) => withOptional(supply, 'cutOffV', value))}
      />
      <FigureField
        field="supply.reserveFraction"
        label="Reserve"
        hint="kept out of the forecast"
        value={reserve ?? 0}
        options={RESERVE}
        change={(document, value) =>
          updateSupply(document, (supply) => withOptional(supply, 'reserveFraction', value === 0 ? undefined : value))
        }
      />
    </div>
  );
}
