import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { EXCHANGES, type PatternId } from '#frontend/features/scenario-editor/model/link/exchange-fields.table.ts';
import { valueAt } from '#frontend/features/scenario-editor/model/link/link-values.ts';
import {
  exchangeOfPattern,
  withExchangeValue,
} from '#frontend/features/scenario-editor/model/operations/exchange-operations.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { ChoiceField } from '../fields/choice-field.tsx';
import { DescriptorField, type FieldHolder } from './descriptor-field.tsx';
import type { ExchangeFieldsProps } from './loading-fields.tsx';
import { ReceiveWindows } from './receive-windows.tsx';

const isPattern = (id: string): id is PatternId => id in EXCHANGES;
const PATTERNS = Object.keys(EXCHANGES)
  .filter(isPattern)
  .map((id) => ({ value: id, label: EXCHANGES[id].label, group: EXCHANGES[id].group }));

/** Which exchange, of which radio, and its own figures. */
export function ExchangeFields(props: ExchangeFieldsProps) {
  const { field, stepName, exchange, change } = props;
  const kind = EXCHANGES[exchange.pattern];
  const holder: FieldHolder = {
    path: field,
    of: stepName,
    values: exchange,
    inherited: null,
    write: (document, key, update) =>
      change(document, (before) => withExchangeValue(before, key, update(valueAt(before, key)))),
  };
  return (
    <>
      <div className="col-span-full pb-2 sm:col-span-2">
        <ChoiceField<PatternId>
          field={`${field}.pattern`}
          label="Exchange"
          editLabel={`exchange of ${stepName}`}
          hint={kind.note}
          value={exchange.pattern}
          choices={PATTERNS}
          change={(document, pattern) => change(document, (before) => exchangeOfPattern(before, pattern))}
        />
      </div>
      <div className="max-sm:col-span-full">
        <RadioChoice {...props} />
      </div>
      {kind.fields.map((descriptor) => (
        <DescriptorField key={`${exchange.pattern} ${descriptor.key}`} descriptor={descriptor} holder={holder} />
      ))}
      <ReceiveWindows {...props} />
    </>
  );
}

function RadioChoice({ field, stepName, exchange, change }: ExchangeFieldsProps) {
  const parts = useDocument((document) => document.node.parts);
  const radios = parts.filter(({ kind }) => kind === 'radio');
  const only = radios.length === 1 ? radios[0] : undefined;
  const usual = only ? `${only.name}, the only one` : radios.length === 0 ? 'there is no radio' : 'choose one';
  const offered = parts.filter(({ id, kind }) => kind === 'radio' || id === exchange.radioPartId);
  return (
    <ChoiceField
      field={`${field}.radioPartId`}
      label="Radio"
      editLabel={`radio of ${stepName}`}
      value={exchange.radioPartId ?? ''}
      choices={[{ value: '', label: usual }, ...offered.map(({ id, name }) => ({ value: id, label: name }))]}
      change={(document, partId) =>
        change(document, (before) => withOptional(before, 'radioPartId', partId === '' ? undefined : partId))
      }
    />
  );
}
