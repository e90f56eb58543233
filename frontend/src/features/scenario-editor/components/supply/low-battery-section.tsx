import type { LowBattery } from '#common/engine/scenario/scenario.types.ts';
import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { CHARGE, PER_DAY, POSITIVE_VOLTAGE, VOLTAGE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { changeOf, OptionalSection } from './optional-section.tsx';

const NEW_MONITOR: LowBattery = { thresholdV: 2.4, hysteresisV: 0.1, readAt: 'rest' };
const monitor = changeOf('lowBattery');
const READ_AT = [
  { value: 'rest', label: 'at rest' },
  { value: 'critical', label: 'in the critical step' },
] as const;

/** What the node itself says about its battery. */
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
