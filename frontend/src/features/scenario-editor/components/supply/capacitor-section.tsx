import type { Capacitor } from '#common/engine/scenario/scenario.types.ts';
import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { CAPACITANCE, CURRENT, RESISTANCE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { QuantityField } from '../fields/quantity-fields.tsx';
import { changeOf, OptionalSection } from './optional-section.tsx';

const NEW_CAPACITOR: Capacitor = {
  capacitanceF: { typical: 0.00022, provenance: { kind: 'assumed' } },
  esrOhm: 0.1,
  leakageA: { typical: 1e-6, provenance: { kind: 'assumed' } },
};
const ofCapacitor = changeOf('capacitor');

/** A capacitor beside the cells. */
export function CapacitorSection() {
  const capacitor = useDocument(({ supply }) => supply.capacitor);
  const field = 'supply.capacitor';
  return (
    <OptionalSection
      id="capacitor"
      title="Capacitor"
      note="kept with the scenario; whether it is counted yet stands among the cautions"
      start={{ capacitor: NEW_CAPACITOR }}
      isThere={capacitor !== undefined}
    >
      {capacitor && (
        <>
          <div className="col-span-2">
            <QuantityField
              title="Capacitance"
              field={`${field}.capacitanceF`}
              label="Capacitor: capacitance"
              quantity={capacitor.capacitanceF}
              options={CAPACITANCE}
              change={(document, update) =>
                ofCapacitor((before) => ({ ...before, capacitanceF: update(before.capacitanceF) }))(document)
              }
            />
          </div>
          <div className="col-span-2">
            <QuantityField
              title="Leakage"
              field={`${field}.leakageA`}
              label="Capacitor: leakage"
              quantity={capacitor.leakageA}
              options={CURRENT}
              change={(document, update) =>
                ofCapacitor((before) => ({ ...before, leakageA: update(before.leakageA) }))(document)
              }
            />
          </div>
          <FigureField
            field={`${field}.esrOhm`}
            label="Series resistance"
            value={capacitor.esrOhm}
            options={RESISTANCE}
            change={(document, esrOhm = 0) => ofCapacitor((before) => ({ ...before, esrOhm }))(document)}
          />
        </>
      )}
    </OptionalSection>
  );
}
