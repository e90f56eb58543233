import type { SelfDischarge } from '#common/engine/scenario/scenario.types.ts';
import {
  ACTIVATION,
  LOSS,
  POSITIVE_NUMBER,
  TEMPERATURE,
} from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateCell } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { QuantityField } from '../fields/quantity-fields.tsx';

const LAWS = [
  { value: 'default', label: 'doubling every 10 K' },
  { value: 'q10', label: 'Q10' },
  { value: 'activation', label: 'activation energy' },
] as const;

type Law = (typeof LAWS)[number]['value'];

function lawOf({ q10, activationEnergyJPerMol }: SelfDischarge): Law {
  if (q10 !== undefined) return 'q10';
  return activationEnergyJPerMol === undefined ? 'default' : 'activation';
}

function withLaw({ q10: _q10, activationEnergyJPerMol: _energy, ...loss }: SelfDischarge, law: Law): SelfDischarge {
  if (law === 'q10') return { ...loss, q10: 2 };
  return law === 'activation' ? { ...loss, activationEnergyJPerMol: 50_000 } : loss;
}

/** How much a cell loses by itself, and how that grows with temperature. */
export function SelfDischargeFields({ loss, designation }: { loss: SelfDischarge; designation: string }) {
  const field = 'supply.cell.selfDischarge';
  const change = (apply: (loss: SelfDischarge) => SelfDischarge) => (document: Parameters<typeof updateCell>[0]) =>
    updateCell(document, (before) => ({ ...before, selfDischarge: apply(before.selfDischarge) }));
  return (
    <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">
      <div className="col-span-2">
        <QuantityField
          title="Self-discharge a year"
          field={`${field}.lossPerYear`}
          label={`${designation}: self-discharge a year`}
          quantity={loss.lossPerYear}
          options={LOSS}
          change={(document, update) =>
            change((before) => ({ ...before, lossPerYear: update(before.lossPerYear) }))(document)
          }
        />
      </div>
      <FigureField
        field={`${field}.referenceC`}
        label="Given at"
        editLabel="temperature of the self-discharge"
        value={loss.referenceC}
        options={TEMPERATURE}
        change={(document, referenceC = 20) => change((before) => ({ ...before, referenceC }))(document)}
      />
      <ChoiceField
        field={`${field}.law`}
        label="Grows with temperature by"
        value={lawOf(loss)}
        choices={LAWS}
        change={(document, law) => change((before) => withLaw(before, law))(document)}
      />
      {loss.q10 !== undefined && (
        <FigureField
          field={`${field}.q10`}
          label="Q10"
          hint="factor for 10 K"
          value={loss.q10}
          options={POSITIVE_NUMBER}
          change={(document, q10 = 2) => change((before) => ({ ...before, q10 }))(document)}
        />
      )}
      {loss.activationEnergyJPerMol !== undefined && (
        <FigureField
          field={`${field}.activationEnergyJPerMol`}
          label="Activation energy"
          value={loss.activationEnergyJPerMol}
          options={ACTIVATION}
          change={(document, energy = 0) =>
            change((before) => ({ ...before, activationEnergyJPerMol: energy }))(document)
          }
        />
      )}
    </div>
  );
}
