import type { ExchangeDuration, FrameLoading, Part, Scenario } from '#common/engine/scenario/scenario.types.ts';
import {
  useDocument,
  useEditorStore,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { CLOCK, POSITIVE_NUMBER, STEP_TIME } from '#frontend/features/scenario-editor/model/figure-options.ts';
import {
  newLoading,
  withLoading,
  workingState,
} from '#frontend/features/scenario-editor/model/operations/exchange-operations.ts';
import type { FieldDescriptor } from '#frontend/features/scenario-editor/model/link/field-descriptor.ts';
import { valueAt, withValueAt } from '#frontend/features/scenario-editor/model/link/link-values.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { ChoiceField } from '../fields/choice-field.tsx';
import { DescriptorField } from './descriptor-field.tsx';

export type ChangeExchange = (document: Scenario, apply: (exchange: ExchangeDuration) => ExchangeDuration) => Scenario;

export interface ExchangeFieldsProps {
  /** Field key of the step's duration. */
  field: string;
  stepName: string;
  exchange: ExchangeDuration;
  change: ChangeExchange;
}

const LINE_FIELDS: readonly FieldDescriptor[] = [
  { type: 'figure', key: 'clockHz', label: 'Clock of the line', options: CLOCK },
  {
    type: 'figure',
    key: 'bitsPerOctet',
    label: 'Bits an octet',
    hint: 'empty: 8',
    options: POSITIVE_NUMBER,
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'overheadPerOctetS',
    label: 'Pause an octet',
    hint: 'empty: none',
    options: STEP_TIME,
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'overheadS',
    label: 'Pause in all',
    hint: 'empty: none',
    options: STEP_TIME,
    isOptional: true,
  },
  {
    type: 'choice',
    key: 'beside',
    label: 'Loaded',
    absent: 'before the exchange',
    choices: [{ value: true, label: 'while it is being sent' }],
  },
];

/** Loading of the frame into the radio over a serial line; absent where it takes no time worth counting. */
export function LoadingFields({ field, stepName, exchange, change }: ExchangeFieldsProps) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const parts = useDocument((document) => document.node.parts);
  const { loading } = exchange;
  const start = newLoading(parts);
  if (!loading && (isReadOnly || !start)) return null;
  const toggle = (): void =>
    store.edit({
      label: `loading of the frame of ${stepName}`,
      change: (document) =>
        change(document, (before) =>
          withOptional(before, 'loading', loading ? undefined : newLoading(document.node.parts)),
        ),
    });
  return (
    <div className="border-b border-hair py-1">
      {loading && (
        <fieldset className="grid grid-cols-2 gap-x-6 sm:grid-cols-3 sm:pl-[1.125rem] xl:grid-cols-4">
          <legend className="pt-1 pb-1 font-semibold">Loading the frame over a serial line</legend>
          <LoadingPart {...{ field, stepName, exchange, change, parts, loading }} />
          {LINE_FIELDS.map((descriptor) => (
            <DescriptorField
              key={descriptor.key}
              descriptor={descriptor}
              holder={{
                path: `${field}.loading`,
                of: `loading in ${stepName}`,
                values: loading,
                inherited: null,
                write: (document, key, update) =>
                  change(document, (before) =>
                    withLoading(before, (line) => withValueAt(line, key, update(valueAt(line, key)))),
                  ),
              }}
            />
          ))}
        </fieldset>
      )}
      {!isReadOnly && (
        <button type="button" className="link min-h-9 text-small" onClick={toggle}>
          {loading ? 'Do not count loading' : 'Count loading of the frame over a serial line'}
        </button>
      )}
    </div>
  );
}

type PartProps = ExchangeFieldsProps & { parts: readonly Part[]; loading: FrameLoading };

function LoadingPart({ field, stepName, change, parts, loading }: PartProps) {
  const states = parts.find(({ id }) => id === loading.partId)?.states ?? [];
  return (
    <>
      <ChoiceField
        field={`${field}.loading.partId`}
        label="Loaded by"
        editLabel={`what loads the frame of ${stepName}`}
        value={loading.partId}
        choices={parts.map(({ id, name }) => ({ value: id, label: name }))}
        change={(document, partId) =>
          change(document, (before) =>
            withLoading(before, (line) => {
              const part = document.node.parts.find(({ id }) => id === partId);
              const state = part && workingState(part);
              return state ? { ...line, partId, stateId: state.id } : line;
            }),
          )
        }
      />
      <ChoiceField
        field={`${field}.loading.stateId`}
        label="which is meanwhile in"
        editLabel={`state while the frame of ${stepName} is loaded`}
        value={loading.stateId}
        choices={states.map(({ id, name }) => ({ value: id, label: name }))}
        change={(document, stateId) =>
          change(document, (before) => withLoading(before, (line) => ({ ...line, stateId })))
        }
      />
    </>
  );
}
