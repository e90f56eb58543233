import type { Cell } from '#common/engine/scenario/scenario.types.ts';
import type { ParseOptions } from '#common/units/parse-quantity.ts';
import {
  CAPACITY,
  LIFE,
  MASS,
  PER_SECOND,
  POSITIVE_CURRENT,
  POSITIVE_VOLTAGE,
  PRICE,
  SHARE,
  TEMPERATURE,
  VOLTAGE_SLOPE,
  VOLUME,
} from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateCell, withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField, TextFieldOf } from '../fields/bound-fields.tsx';
import { QuantityField } from '../fields/quantity-fields.tsx';
import { SelfDischargeFields } from './self-discharge-fields.tsx';

const GRID = 'grid grid-cols-2 gap-x-6 sm:grid-cols-4';

/** The figures of a cell that are no tables. */
export function CellFigures({ cell }: { cell: Cell }) {
  return (
    <>
      <div className={GRID}>
        <TextFieldOf
          field="supply.cell.designation"
          label="Designation"
          value={cell.designation}
          change={(document, designation) => updateCell(document, (before) => ({ ...before, designation }))}
        />
        <TextFieldOf
          field="supply.cell.chemistry"
          label="Chemistry"
          value={cell.chemistry ?? ''}
          isOptional
          change={(document, text) =>
            updateCell(document, (before) => withOptional(before, 'chemistry', text === '' ? undefined : text))
          }
        />
        <div className="col-span-2">
          <QuantityField
            title="Capacity of one cell"
            field="supply.cell.capacityC"
            label={`${cell.designation}: capacity`}
            quantity={cell.capacityC}
            options={CAPACITY}
            change={(document, update) =>
              updateCell(document, (before) => ({ ...before, capacityC: update(before.capacityC) }))
            }
          />
        </div>
      </div>
      <SelfDischargeFields loss={cell.selfDischarge} designation={cell.designation} />
      <details className="group">
        <summary className="w-fit py-1 text-small text-muted hover:text-ink">Limits, shelf life, mass, price</summary>
        <div className={GRID}>
          {OPTIONAL.map((row) => (
            <OptionalFigure key={row.key} cell={cell} row={row} />
          ))}
          {LIMIT_ROWS.map((row) => (
            <LimitFigure key={row.key} cell={cell} row={row} />
          ))}
          <KineticFields cell={cell} />
        </div>
      </details>
    </>
  );
}

interface Row<Key> {
  key: Key;
  label: string;
  options: ParseOptions;
}

type OptionalKey = 'openCircuitTemperatureVPerK' | 'shelfLifeS' | 'ratingEndV' | 'massKg' | 'volumeM3' | 'price';

const OPTIONAL: readonly Row<OptionalKey>[] = [
  { key: 'shelfLifeS', label: 'Shelf life', options: LIFE },
  { key: 'openCircuitTemperatureVPerK', label: 'Voltage by temperature', options: VOLTAGE_SLOPE },
  { key: 'ratingEndV', label: 'Rated down to', options: POSITIVE_VOLTAGE },
  { key: 'massKg', label: 'Mass', options: MASS },
  { key: 'volumeM3', label: 'Volume', options: VOLUME },
  { key: 'price', label: 'Price', options: PRICE },
];

function OptionalFigure({ cell, row: { key, label, options } }: { cell: Cell; row: Row<OptionalKey> }) {
  return (
    <FigureField
      field={`supply.cell.${key}`}
      label={label}
      value={cell[key]}
      options={options}
      isOptional
      change={(document, value) => updateCell(document, (before) => withOptional(before, key, value))}
    />
  );
}

type LimitKey = keyof NonNullable<Cell['limits']>;

const LIMIT_ROWS: readonly Row<LimitKey>[] = [
  { key: 'continuousA', label: 'Highest steady current', options: POSITIVE_CURRENT },
  { key: 'pulseA', label: 'Highest pulse', options: POSITIVE_CURRENT },
  { key: 'lowestC', label: 'Coldest', options: TEMPERATURE },
  { key: 'highestC', label: 'Hottest', options: TEMPERATURE },
];

function LimitFigure({ cell, row: { key, label, options } }: { cell: Cell; row: Row<LimitKey> }) {
  return (
    <FigureField
      field={`supply.cell.limits.${key}`}
      label={label}
      value={cell.limits?.[key]}
      options={options}
      isOptional
      change={(document, value) =>
        updateCell(document, (before) => {
          const limits = withOptional(before.limits ?? {}, key, value);
          return withOptional(before, 'limits', Object.keys(limits).length === 0 ? undefined : limits);
        })
      }
    />
  );
}

/** Both figures of the two-well model together, or neither. */
function KineticFields({ cell: { kinetic } }: { cell: Cell }) {
  return (
    <>
      <FigureField
        field="supply.cell.kinetic.availableFraction"
        label="Charge at hand at once"
        hint="empty: all of it"
        value={kinetic?.availableFraction}
        options={SHARE}
        isOptional
        change={(document, availableFraction) =>
          updateCell(document, (before) =>
            withOptional(
              before,
              'kinetic',
              availableFraction === undefined
                ? undefined
                : { availableFraction, rateConstantPerS: before.kinetic?.rateConstantPerS ?? 0.0001 },
            ),
          )
        }
      />
      {kinetic && (
        <FigureField
          field="supply.cell.kinetic.rateConstantPerS"
          label="How fast the rest follows"
          value={kinetic.rateConstantPerS}
          options={PER_SECOND}
          change={(document, rateConstantPerS = 0) =>
            updateCell(document, (before) =>
              before.kinetic ? { ...before, kinetic: { ...before.kinetic, rateConstantPerS } } : before,
            )
          }
        />
      )}
    </>
  );
}
