import type { ReactNode } from 'react';
import { LIMITS } from '#common/schemas/limits.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import type { ParseOptions } from '#common/units/parse-quantity.ts';
import { ParsedInput, type Parsed } from '#frontend/components/quantity-input-text.tsx';
import { figureText, QuantityInput } from '#frontend/components/quantity-input.tsx';
import { useEditorStore, useField, useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';

export interface BoundProps {
  /** Key of the field, see `model/fields.ts`. */
  field: string;
  label: string;
  /** What the edit is called in undo; default: the label. */
  editLabel?: string;
  hint?: string;
  isCell?: boolean;
  align?: 'left' | 'right';
  children?: ReactNode;
}

interface FigureProps extends BoundProps {
  value: number | undefined;
  options: ParseOptions;
  /** Gives the document with this value; `undefined` only where the figure is optional. */
  change: (document: Scenario, value: number | undefined) => Scenario;
  isOptional?: boolean;
  check?: (value: number) => string | null;
}

/** One number of the document. */
export function FigureField({ value, options, change, editLabel, isOptional, check, ...props }: FigureProps) {
  const store = useEditorStore();
  const bound = useField(props.field);
  if (useIsReadOnly()) {
    const text = value === undefined ? '' : figureText(value, options);
    return <PlainText {...props} text={text} />;
  }
  return (
    <QuantityInput
      {...props}
      {...bound}
      value={value}
      options={options}
      isOptional={isOptional ?? false}
      check={check}
      onCommit={(next) =>
        store.edit({
          label: editLabel ?? props.label,
          field: props.field,
          change: (document) => change(document, next),
        })
      }
    />
  );
}

interface NameProps extends BoundProps {
  value: string;
  change: (document: Scenario, value: string) => Scenario;
  isOptional?: boolean;
  maxLength?: number;
}

/** A text of the document: a name, a note. */
export function TextFieldOf({ value, change, editLabel, isOptional = false, maxLength, ...props }: NameProps) {
  const store = useEditorStore();
  const bound = useField(props.field);
  const longest = maxLength ?? LIMITS.nameLength;
  if (useIsReadOnly()) return <PlainText {...props} text={value} />;
  const parse = (text: string): Parsed<string> => {
    const trimmed = text.trim();
    if (trimmed === '' && !isOptional) return { kind: 'problem', message: 'Give it a name.' };
    if (trimmed.length > longest) return { kind: 'problem', message: `At most ${longest} characters.` };
    return { kind: 'value', value: trimmed };
  };
  return (
    <ParsedInput
      {...props}
      {...bound}
      value={value}
      parse={parse}
      format={(text) => text}
      onCommit={(next) =>
        store.edit({
          label: editLabel ?? props.label,
          field: props.field,
          change: (document) => change(document, next),
        })
      }
    />
  );
}

/** What a reader without the right to edit sees: the text, no field. */
export function PlainText({ label, text, isCell, align, children }: Omit<BoundProps, 'field'> & { text: string }) {
  const shown = text === '' ? '—' : text;
  if (isCell) {
    return <div className={`flex min-h-9 items-center px-1.5 ${align === 'right' ? 'justify-end' : ''}`}>{shown}</div>;
  }
  return (
    <div>
      <p className="text-small text-muted">{label}</p>
      <p className="py-1.5 font-semibold">{shown}</p>
      <div className="flex min-h-6 items-baseline gap-x-3 pt-1 text-small">{children}</div>
    </div>
  );
}
