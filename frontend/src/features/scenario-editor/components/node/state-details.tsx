import type { LoadLaw, Part, State } from '#common/engine/scenario/scenario.types.ts';
import type { ParseOptions } from '#common/units/parse-quantity.ts';
import {
  useDocument,
  useEditorStore,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import {
  DOUBLING,
  POSITIVE_VOLTAGE,
  TEMPERATURE,
  VOLTAGE,
} from '#frontend/features/scenario-editor/model/figure-options.ts';
import { updateState } from '#frontend/features/scenario-editor/model/operations/part-operations.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { typicalOrNew } from '#frontend/features/scenario-editor/model/quantity-sides.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { ProvenanceMark } from '../fields/provenance-mark.tsx';

const LAWS: readonly { value: LoadLaw; label: string }[] = [
  { value: 'constant-current', label: 'constant current' },
  { value: 'constant-power', label: 'constant power' },
  { value: 'resistive', label: 'resistive' },
];

const OPTIONAL: readonly {
  key: 'referenceVoltageV' | 'referenceTemperatureC' | 'doublingK';
  label: string;
  hint: string;
  options: ParseOptions;
}[] = [
  {
    key: 'referenceVoltageV',
    label: 'Given at voltage',
    hint: 'empty: the regulator’s output',
    options: POSITIVE_VOLTAGE,
  },
  { key: 'referenceTemperatureC', label: 'Given at temperature', hint: 'empty: 25 °C', options: TEMPERATURE },
  { key: 'doublingK', label: 'Doubles every', hint: 'empty: not with temperature', options: DOUBLING },
];

/** What the current of the selected state depends on. */
export function StateDetails({ part, state }: { part: Part; state: State }) {
  const field = `node.parts.${part.id}.states.${state.id}`;
  return (
    <fieldset className="mt-3 border-l-2 border-hair pl-5">
      <legend className="sr-only">Details of {state.name}</legend>
      <p aria-hidden="true" className="text-small text-muted">
        <strong className="font-extrabold text-ink">{state.name}</strong> in detail
      </p>
      <div className="mt-1 grid grid-cols-2 gap-x-6 sm:grid-cols-3">
        <ChoiceField
          field={`${field}.law`}
          label="Current follows the voltage as"
          editLabel={`law of ${state.name}`}
          value={state.law ?? 'constant-current'}
          choices={LAWS}
          change={(document, law) =>
            updateState(document, part.id, state.id, (before) =>
              withOptional(before, 'law', law === 'constant-current' ? undefined : law),
            )
          }
        />
        {OPTIONAL.map(({ key, label, hint, options }) => (
          <FigureField
            key={key}
            field={`${field}.${key}`}
            label={label}
            hint={hint}
            editLabel={`${label.toLowerCase()} of ${state.name}`}
            value={state[key]}
            options={options}
            isOptional
            change={(document, value) =>
              updateState(document, part.id, state.id, (before) => withOptional(before, key, value))
            }
          />
        ))}
        <LowestVoltage part={part} state={state} />
        <Needs part={part} state={state} />
      </div>
    </fieldset>
  );
}

function LowestVoltage({ part, state }: { part: Part; state: State }) {
  const lowest = state.lowestVoltageV;
  return (
    <FigureField
      field={`node.parts.${part.id}.states.${state.id}.lowestVoltageV.typical`}
      label="Lowest voltage of this state"
      hint="empty: that of the part"
      editLabel={`lowest voltage of ${state.name}`}
      value={lowest?.typical}
      options={VOLTAGE}
      isOptional
      change={(document, value) =>
        updateState(document, part.id, state.id, (before) =>
          withOptional(
            before,
            'lowestVoltageV',
            value === undefined ? undefined : typicalOrNew(before.lowestVoltageV, value),
          ),
        )
      }
    >
      {lowest && (
        <ProvenanceMark
          label={`${part.name}, ${state.name}: lowest voltage`}
          quantity={lowest}
          change={(document, update) =>
            updateState(document, part.id, state.id, (before) =>
              before.lowestVoltageV ? { ...before, lowestVoltageV: update(before.lowestVoltageV) } : before,
            )
          }
        />
      )}
    </FigureField>
  );
}

/** Another part that must be in one of some states meanwhile, such as the clock it gives. */
function Needs({ part, state }: { part: Part; state: State }) {
  const parts = useDocument((document) => document.node.parts);
  const others = parts.filter(({ id }) => id !== part.id);
  const needed = others.find(({ id }) => id === state.needs?.partId);
  if (others.length === 0) return null;
  return (
    <>
      <ChoiceField
        field={`node.parts.${part.id}.states.${state.id}.needs`}
        label="Needs another part"
        editLabel={`what ${state.name} needs`}
        value={needed?.id ?? ''}
        choices={[{ value: '', label: 'no' }, ...others.map(({ id, name }) => ({ value: id, label: name }))]}
        change={(document, partId) =>
          updateState(document, part.id, state.id, (before) => {
            const chosen = document.node.parts.find(({ id }) => id === partId);
            const stateIds = chosen?.states.filter(({ id }) => id !== chosen.restStateId).map(({ id }) => id) ?? [];
            const first = stateIds.length > 0 ? stateIds : chosen?.states.slice(0, 1).map(({ id }) => id);
            return withOptional(before, 'needs', first && { partId, stateIds: first });
          })
        }
      />
      {needed && <NeededStates part={part} state={state} needed={needed} />}
    </>
  );
}

function NeededStates({ part, state, needed }: { part: Part; state: State; needed: Part }) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const chosen = state.needs?.stateIds ?? [];
  const toggle = (stateId: string): void =>
    store.edit({
      label: `what ${state.name} needs`,
      change: (document) =>
        updateState(document, part.id, state.id, (before) => {
          if (!before.needs) return before;
          const has = before.needs.stateIds.includes(stateId);
          const stateIds = has
            ? before.needs.stateIds.filter((id) => id !== stateId)
            : [...before.needs.stateIds, stateId];
          // Needing no state at all is told by the choice of the part.
          return stateIds.length === 0 ? before : { ...before, needs: { ...before.needs, stateIds } };
        }),
    });
  return (
    <fieldset className="min-w-0">
      <legend className="text-small text-muted">{needed.name} in one of</legend>
      <div className="flex flex-wrap gap-x-4">
        {needed.states.map(({ id, name }) => (
          <label key={id} className="flex min-h-8 items-center gap-1.5">
            <input
              type="checkbox"
              className="accent-[var(--accent)]"
              checked={chosen.includes(id)}
              disabled={isReadOnly}
              onChange={() => toggle(id)}
            />
            {name}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
