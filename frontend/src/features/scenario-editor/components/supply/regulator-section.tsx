import type { Regulator, Table } from '#common/engine/scenario/scenario.types.ts';
import type { ParseOptions } from '#common/units/parse-quantity.ts';
import {
  useDocument,
  useEditorStore,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { CURRENT, POSITIVE_VOLTAGE, SHARE, VOLTAGE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import {
  regulatorOfKind,
  updateSupply,
} from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { Section } from '../node/section.tsx';
import { PairTable } from '../tables/pair-table.tsx';

const KINDS: readonly { value: Regulator['kind']; label: string }[] = [
  { value: 'none', label: 'none: the cell is the rail' },
  { value: 'linear', label: 'linear' },
  { value: 'switching', label: 'switching' },
];

interface Row {
  key: string;
  label: string;
  hint?: string;
  options: ParseOptions;
  isOptional?: boolean;
}

const OUTPUT: Row = { key: 'outputV', label: 'Output', options: POSITIVE_VOLTAGE };
const QUIESCENT: Row = { key: 'quiescentA', label: 'Own current', options: CURRENT };

const ROWS: Record<Regulator['kind'], readonly Row[]> = {
  none: [],
  linear: [
    OUTPUT,
    QUIESCENT,
    { key: 'dropoutV', label: 'Dropout', options: VOLTAGE },
    { key: 'minimumInputV', label: 'Lowest input', hint: 'empty: none', options: VOLTAGE, isOptional: true },
  ],
  switching: [
    OUTPUT,
    QUIESCENT,
    { key: 'minimumInputV', label: 'Lowest input', options: VOLTAGE },
    { key: 'maximumInputV', label: 'Highest input', hint: 'empty: none', options: POSITIVE_VOLTAGE, isOptional: true },
  ],
};

/** What stands between the cells and the rail. */
export function RegulatorSection() {
  const regulator = useDocument(({ supply }) => supply.regulator);
  return (
    <Section id="regulator" title="Regulator" note="what stands between the cells and the parts">
      <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">
        <ChoiceField
          field="supply.regulator.kind"
          label="Kind"
          editLabel="kind of regulator"
          value={regulator.kind}
          choices={KINDS}
          change={(document, kind) =>
            updateSupply(document, (supply) => ({ ...supply, regulator: regulatorOfKind(kind, supply.regulator) }))
          }
        />
        {ROWS[regulator.kind].map((row) => (
          <RegulatorFigure key={`${regulator.kind} ${row.key}`} regulator={regulator} row={row} />
        ))}
        {regulator.kind === 'switching' && typeof regulator.efficiency === 'number' && (
          <Efficiency efficiency={regulator.efficiency} />
        )}
      </div>
      {regulator.kind === 'switching' && <EfficiencyTable efficiency={regulator.efficiency} />}
    </Section>
  );
}

function RegulatorFigure({ regulator, row }: { regulator: Regulator; row: Row }) {
  const value: unknown = Reflect.get(regulator, row.key);
  return (
    <FigureField
      field={`supply.regulator.${row.key}`}
      label={row.label}
      editLabel={`${row.label.toLowerCase()} of the regulator`}
      value={typeof value === 'number' ? value : undefined}
      options={row.options}
      isOptional={row.isOptional ?? false}
      {...(row.hint === undefined ? {} : { hint: row.hint })}
      change={(document, next) =>
        updateSupply(document, (supply) => ({ ...supply, regulator: withFigure(supply.regulator, row.key, next) }))
      }
    />
  );
}

function withFigure(regulator: Regulator, key: string, value: number | undefined): Regulator {
  const rest = Object.fromEntries(Object.entries(regulator).filter(([name]) => name !== key));
  return { ...regulator, ...rest, [key]: value };
}

function Efficiency({ efficiency }: { efficiency: number }) {
  return (
    <FigureField
      field="supply.regulator.efficiency"
      label="Efficiency"
      value={efficiency}
      options={SHARE}
      change={(document, next) => withEfficiency(document, next)}
    />
  );
}

function withEfficiency(document: Parameters<typeof updateSupply>[0], efficiency: number | Table | undefined) {
  return updateSupply(document, (supply) =>
    supply.regulator.kind === 'switching' && efficiency !== undefined
      ? { ...supply, regulator: { ...supply.regulator, efficiency } }
      : supply,
  );
}

/** Efficiency by output current, or the way to one. */
function EfficiencyTable({ efficiency }: { efficiency: number | Table }) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const isTable = typeof efficiency !== 'number';
  const toggle = (): void =>
    store.edit({
      label: isTable ? 'one efficiency for all currents' : 'efficiency by current',
      change: (document) =>
        withEfficiency(
          document,
          isTable
            ? (efficiency.at(-1)?.[1] ?? 0.85)
            : [
                [1e-6, efficiency],
                [0.01, efficiency],
              ],
        ),
    });
  return (
    <>
      {isTable && (
        <PairTable
          field="supply.regulator.efficiency"
          label="Efficiency"
          columns={[
            { header: 'Output current', options: CURRENT },
            { header: 'Efficiency', options: SHARE },
          ]}
          table={efficiency}
          read={({ supply: { regulator } }) =>
            regulator.kind === 'switching' && typeof regulator.efficiency !== 'number' ? regulator.efficiency : []
          }
          write={withEfficiency}
          fewest={1}
        />
      )}
      {!isReadOnly && (
        <button type="button" className="link min-h-9 text-small" onClick={toggle}>
          {isTable ? 'Use one efficiency for all currents' : 'Give the efficiency by output current'}
        </button>
      )}
    </>
  );
}
