import { useEffect, useId, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';
import { isSameNumbers } from './quantity-input-value.ts';

export type Parsed<T> = { kind: 'value'; value: T } | { kind: 'problem'; message: string };

/** Text that is no value yet, with the reason. */
export interface UnsettledText {
  text: string;
  message: string;
}

export interface ParsedInputProps<T> {
  label: string;
  value: T;
  parse: (text: string) => Parsed<T>;
  format: (value: T) => string;
  /** Called with each keystroke that makes a value. */
  onCommit: (value: T) => void;
  onLeave?: (() => void) | undefined;
  /** Unsettled text kept outside, so that it outlives this input; kept here without it. */
  unsettled?: UnsettledText | null | undefined;
  onUnsettled?: ((unsettled: UnsettledText | null) => void) | undefined;
  /** A problem found elsewhere, for example by the server. */
  problem?: string | undefined;
  /** Key that problems and undo find this input by. */
  field?: string | undefined;
  hint?: string | undefined;
  placeholder?: string | undefined;
  /** In a table: no label to see, and the problem is shown by the table. */
  isCell?: boolean;
  align?: 'left' | 'right';
  /** Shown below the text, such as where the figure comes from. */
  children?: ReactNode;
}

interface Typed<T> {
  text: string;
  value: T;
}

/**
 * What an input shows and does while someone types. Valid text goes out at once and is written anew when the field is
 * left; text that is no value stays as it was typed, with the reason, and goes out as soon as it becomes one.
 */
function useParsedText<T>({ value, parse, format, onCommit, onLeave, ...props }: ParsedInputProps<T>) {
  const [typed, setTyped] = useState<Typed<T> | null>(null);
  const [ownUnsettled, setOwnUnsettled] = useState<UnsettledText | null>(null);
  const valueAtFocus = useRef(value);
  const setUnsettled = props.onUnsettled ?? setOwnUnsettled;
  const unsettled = (props.onUnsettled ? props.unsettled : ownUnsettled) ?? null;
  // What was typed counts only as long as the value is still the one that it made: undo changes it from outside.
  const text = unsettled?.text ?? (typed && isSameNumbers(typed.value, value) ? typed.text : format(value));

  const take = (next: string): void => {
    const parsed = parse(next);
    if (parsed.kind === 'problem') {
      setUnsettled({ text: next, message: parsed.message });
      return;
    }
    setUnsettled(null);
    setTyped({ text: next, value: parsed.value });
    if (!isSameNumbers(parsed.value, value)) onCommit(parsed.value);
  };

  const settled = unsettled ? parse(unsettled.text) : null;
  const isSettledNow = settled?.kind === 'value';
  useEffect(() => {
    // A maximum raised in the field beside it can make this text right.
    if (settled?.kind !== 'value') return;
    setUnsettled(null);
    onCommit(settled.value);
    // Only the turn from wrong to right counts; the rest is new with each render.
    // eslint-disable-next-line react-hooks/exhaustive-deps -- reason: see the line above
  }, [isSettledNow]);

  return {
    text,
    message: (settled?.kind === 'problem' ? settled.message : undefined) ?? props.problem,
    take,
    onFocus: () => {
      valueAtFocus.current = value;
    },
    onBlur: () => {
      setTyped(null);
      onLeave?.();
    },
    /** Takes back what was typed since the field was entered; false when there is nothing to take back. */
    restore: (): boolean => {
      const isChanged = unsettled !== null || !isSameNumbers(valueAtFocus.current, value);
      setUnsettled(null);
      setTyped(null);
      if (!isSameNumbers(valueAtFocus.current, value)) onCommit(valueAtFocus.current);
      return isChanged;
    },
  };
}

/** A text input for anything that is typed as text and kept as a value. Arrow keys never change the value. */
export function ParsedInput<T>(props: ParsedInputProps<T>): ReactNode {
  const { label, field, hint, placeholder, isCell = false, align = 'left', children } = props;
  const id = useId();
  const input = useParsedText(props);
  const handleKeyDown = (event: KeyboardEvent<HTMLInputElement>): void => {
    if (event.key === 'Escape' && input.restore()) event.stopPropagation();
  };
  const messageId = `${id}-message`;
  const isDescribed = input.message !== undefined || (hint !== undefined && !isCell);
  return (
    <div className="group/field min-w-0">
      <label htmlFor={id} className={isCell ? 'sr-only' : 'block text-small text-muted'}>
        {label}
      </label>
      <input
        id={id}
        type="text"
        data-field={field}
        value={input.text}
        placeholder={placeholder}
        autoComplete="off"
        autoCapitalize="off"
        spellCheck={false}
        aria-invalid={input.message === undefined ? undefined : true}
        title={input.message ?? (isCell ? input.text : undefined)}
        aria-describedby={isDescribed ? messageId : undefined}
        onChange={(event) => input.take(event.target.value)}
        onFocus={input.onFocus}
        onBlur={input.onBlur}
        onKeyDown={handleKeyDown}
        className={`${isCell ? CELL_INPUT : LINE_INPUT} ${align === 'right' ? 'text-right' : ''}`}
      />
      <Message id={messageId} isCell={isCell} message={input.message} hint={hint}>
        {children}
      </Message>
    </div>
  );
}

const LINE_INPUT =
  'w-full min-w-0 rounded-none border-b border-line bg-transparent py-1.5 font-semibold text-ink outline-none ' +
  'hover:border-ink focus-visible:border-accent focus-visible:shadow-[0_1px_0_0_var(--accent)] ' +
  'aria-invalid:border-rust aria-invalid:text-rust aria-invalid:focus-visible:shadow-[0_1px_0_0_var(--rust)]';
const CELL_INPUT =
  'h-9 w-full min-w-0 rounded-none border-b border-transparent bg-transparent px-1.5 text-ink ' +
  'hover:border-line focus-visible:outline-offset-[-2px] aria-invalid:border-rust aria-invalid:text-rust';

// One line that moves nothing below it; the whole text lies over what follows while the field is being edited.
const MESSAGE =
  'min-w-0 truncate text-rust group-focus-within/field:absolute group-focus-within/field:top-1 ' +
  'group-focus-within/field:left-0 group-focus-within/field:z-20 group-focus-within/field:w-max ' +
  'group-focus-within/field:max-w-72 group-focus-within/field:bg-paper group-focus-within/field:pr-2 ' +
  'group-focus-within/field:pb-1 group-focus-within/field:whitespace-normal';

interface MessageProps {
  id: string;
  isCell: boolean;
  message: string | undefined;
  hint: string | undefined;
  children: ReactNode;
}

function Message({ id, isCell, message, hint, children }: MessageProps) {
  // The table that a cell is in shows its message in a place kept free for it.
  if (isCell) {
    return message === undefined ? null : (
      <span id={id} className="sr-only">
        {message}
      </span>
    );
  }
  return (
    <div className="relative flex min-h-6 flex-wrap items-baseline gap-x-3 pt-1 text-small">
      {(message ?? hint) !== undefined && (
        <p id={id} className={message === undefined ? 'text-muted' : MESSAGE}>
          {message ?? hint}
        </p>
      )}
      {children}
    </div>
  );
}
