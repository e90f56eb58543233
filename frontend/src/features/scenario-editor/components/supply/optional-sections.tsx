import type { ReactNode } from 'react';
import type { Capacitor, Harvest, LowBattery, Supply } from '#common/engine/scenario/scenario.types.ts';
import { MONTH_NAMES } from '#common/units/format-duration.ts';
import { useDocument, useEditorStore, useIsReadOnly } from '../../hooks/editor-context.tsx';
import {
  CAPACITANCE,
  CHARGE,
  CURRENT,
  ENERGY,
  PER_DAY,
  POSITIVE_VOLTAGE,
  RESISTANCE,
  SHARE,
  TEMPERATURE,
  VOLTAGE,
} from '../../model/figure-options.ts';
import { updateSupply, withOptional } from '../../model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { QuantityField } from '../fields/quantity-fields.tsx';
import { Section } from '../node/section.tsx';

type OptionalKey = 'capacitor' | 'lowBattery' | 'harvest';
type Change<T> = (
  apply: (value: T) => T,
) => (document: Parameters<typeof updateSupply>[0]) => ReturnType<typeof updateSupply>;

function changeOf<K extends OptionalKey>(key: K): Change<NonNullable<Supply[K]>> {
  return (apply) => (document) =>
    updateSupply(document, (supply) => {
      const value = supply[key];
      return value === undefined ? supply : { ...supply, [key]: apply(value) };
    });
}

interface OptionalSectionProps {
  id: OptionalKey;
  title: string;
  note: string;
  /** What to begin with. */
  start: Pick<Supply, OptionalKey>;
  isThere: boolean;
  children: ReactNode;
}

/** A piece of the supply that may be absent. */
function OptionalSection({ id, title, note, start, isThere, children }: OptionalSectionProps) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const word = title.toLowerCase();
  return (
    <Section id={id} title={title} note={isThere ? note : `none; ${note}`}>
      {isThere && <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">{children}</div>}
      {!isReadOnly && (
        <button
          type="button"
          className="link min-h-9 text-small"
          onClick={() =>
            store.edit({
              label: `${isThere ? 'remove' : 'add'} the ${word}`,
              change: (document) =>
                updateSupply(document, (supply) => withOptional(supply, id, isThere ? undefined : start[id])),
            })
          }
        >
          {isThere ? `Remove the ${word}` : `Add a ${word}`}
        </button>
      )}
    </Section>
  );
}

const NEW_MONITOR: LowBattery = { thresholdV: 2.4, hysteresisV: 0.1, readAt: 'rest' };
const monitor = changeOf('lowBattery');
const READ_AT = [
  { value: 'rest', label: 'at rest' },
  { value: 'critical', label: 'in the critical step' },
] as const;

export function LowBatterySection() {
  const lowBattery = useDocument(({ supply }) => supply.lowBattery);
  const field = 'supply.lowBattery';
  return (
    <OptionalSection
      id="lowBattery"
      title="Low-battery monitor"
      note="what the node itself says about its battery"
      start={{ lowBattery: NEW_MONITOR }}
      isThere={lowBattery !== undefined}
    >
      {lowBattery && (
        <>
          <FigureField
            field={`${field}.thresholdV`}
            label="Warns below"
            value={lowBattery.thresholdV}
            options={POSITIVE_VOLTAGE}
            change={(document, thresholdV = 1) => monitor((before) => ({ ...before, thresholdV }))(document)}
          />
          <FigureField
            field={`${field}.hysteresisV`}
            label="Hysteresis"
            value={lowBattery.hysteresisV}
            options={VOLTAGE}
            change={(document, hysteresisV = 0) => monitor((before) => ({ ...before, hysteresisV }))(document)}
          />
          <FigureField
            field={`${field}.stepV`}
            label="Step of the monitor"
            hint="empty: as fine as typed"
            value={lowBattery.stepV}
            options={POSITIVE_VOLTAGE}
            isOptional
            change={(document, value) => monitor((before) => withOptional(before, 'stepV', value))(document)}
          />
          <ChoiceField
            field={`${field}.readAt`}
            label="Reads"
            editLabel="moment of reading"
            value={lowBattery.readAt}
            choices={READ_AT}
            change={(document, readAt) => monitor((before) => ({ ...before, readAt }))(document)}
          />
          <FigureField
            field={`${field}.readingsPerDay`}
            label="Readings"
            hint="empty: one a day"
            value={lowBattery.readingsPerDay}
            options={PER_DAY}
            isOptional
            change={(document, value) => monitor((before) => withOptional(before, 'readingsPerDay', value))(document)}
          />
          <FigureField
            field={`${field}.chargePerReadingC`}
            label="Charge of a reading"
            hint="empty: none"
            value={lowBattery.chargePerReadingC}
            options={CHARGE}
            isOptional
            change={(document, value) =>
              monitor((before) => withOptional(before, 'chargePerReadingC', value))(document)
            }
          />
        </>
      )}
    </OptionalSection>
  );
}

const NEW_CAPACITOR: Capacitor = {
  capacitanceF: { typical: 0.00022, provenance: { kind: 'assumed' } },
  esrOhm: 0.1,
  leakageA: { typical: 1e-6, provenance: { kind: 'assumed' } },
};
const ofCapacitor = changeOf('capacitor');

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

const NEW_HARVEST: Harvest = { energyPerDayJ: MONTH_NAMES.map(() => 0), efficiency: 0.8 };
const ofHarvest = changeOf('harvest');

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
