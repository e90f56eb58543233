import { useId, type ComponentProps, type ReactNode } from 'react';

interface Common {
  label: string;
  hint?: ReactNode;
  error?: string | undefined;
  /** Keeps the label for screen readers only, where a heading or column already says it. */
  isLabelHidden?: boolean | undefined;
  className?: string | undefined;
}

const CONTROL =
  'w-full border-0 border-b border-line bg-transparent px-0 py-1.5 text-ink outline-none transition-[border-color,box-shadow] ' +
  'hover:border-ink focus-visible:border-accent focus-visible:shadow-[0_1px_0_0_var(--accent)] rounded-none ' +
  'aria-invalid:border-rust aria-invalid:focus-visible:shadow-[0_1px_0_0_var(--rust)] ' +
  'disabled:border-dashed disabled:text-muted';

type ControlProps = {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
  className: string;
};

/** Label above, control, and one line below that is always there: the hint, or the error in its place. */
function Frame({
  label,
  hint,
  error,
  isLabelHidden,
  className = '',
  children,
}: Common & { children: (control: ControlProps) => ReactNode }) {
  const id = useId();
  const noteId = `${id}-note`;
  const hasNote = error !== undefined || hint !== undefined;
  return (
    <div className={className}>
      <label htmlFor={id} className={isLabelHidden ? 'sr-only' : 'block text-small text-muted'}>
        {label}
      </label>
      {children({
        id,
        'aria-describedby': hasNote ? noteId : undefined,
        'aria-invalid': error === undefined ? undefined : true,
        className: CONTROL,
      })}
      <p id={noteId} className={`min-h-5 pt-1 text-small ${error === undefined ? 'text-muted' : 'text-rust'}`}>
        {error ?? hint}
      </p>
    </div>
  );
}

export function TextField({
  label,
  hint,
  error,
  isLabelHidden,
  className,
  ...input
}: Common & ComponentProps<'input'>) {
  return (
    <Frame {...{ label, hint, error, isLabelHidden, className }}>
      {(control) => <input type="text" {...input} {...control} />}
    </Frame>
  );
}

export function TextArea({
  label,
  hint,
  error,
  isLabelHidden,
  className,
  ...area
}: Common & ComponentProps<'textarea'>) {
  return (
    <Frame {...{ label, hint, error, isLabelHidden, className }}>
      {(control) => (
        <textarea rows={3} {...area} {...control} className={`${CONTROL} field-sizing-content min-h-10 resize-y`} />
      )}
    </Frame>
  );
}

export function SelectField({
  label,
  hint,
  error,
  isLabelHidden,
  className,
  ...select
}: Common & ComponentProps<'select'>) {
  return (
    <Frame {...{ label, hint, error, isLabelHidden, className }}>
      {(control) => (
        <select
          {...select}
          {...control}
          className={`${CONTROL} h-[2.3125rem] [&>option]:bg-raised [&>option]:text-ink`}
        />
      )}
    </Frame>
  );
}

/** A box with its label beside it. */
export function CheckField({
  label,
  hint,
  error,
  className = '',
  ...input
}: Omit<Common, 'isLabelHidden'> & ComponentProps<'input'>) {
  const id = useId();
  const note = error ?? hint;
  return (
    <div className={className}>
      <div className="flex min-h-9 items-center gap-2.5">
        <input
          type="checkbox"
          {...input}
          id={id}
          aria-describedby={note === undefined ? undefined : `${id}-note`}
          aria-invalid={error === undefined ? undefined : true}
          className="size-[1.125rem] accent-[var(--accent)]"
        />
        <label htmlFor={id}>{label}</label>
      </div>
      {note !== undefined && (
        <p id={`${id}-note`} className={`text-small ${error === undefined ? 'text-muted' : 'text-rust'}`}>
          {note}
        </p>
      )}
    </div>
  );
}
