import { createContext, use, useCallback, useEffect, useMemo, useRef, useState, type ReactNode } from 'react';

export interface ToastMessage {
  text: string;
  /** Takes the act back; offered as "Undo" until the message goes. */
  undo?: () => void;
  isError?: boolean;
}

interface Shown extends ToastMessage {
  id: number;
}

const ToastContext = createContext<(message: ToastMessage) => void>(() => undefined);

/** Long enough to read, think and reach the button by keyboard. */
const STAYS_MS = 12_000;

/** Says what was done, at the foot of the page: `toast({ text: 'Archived.', undo })`. */
export function useToast(): (message: ToastMessage) => void {
  return use(ToastContext);
}

export function ToastProvider({ children }: { children: ReactNode }) {
  const [messages, setMessages] = useState<readonly Shown[]>([]);
  const nextId = useRef(1);
  const dismiss = useCallback((id: number) => setMessages((all) => all.filter((message) => message.id !== id)), []);
  const show = useCallback((message: ToastMessage) => {
    const id = nextId.current++;
    setMessages((all) => [...all.slice(-2), { ...message, id }]);
  }, []);
  const list = useMemo(
    () => messages.map((message) => <Toast key={message.id} message={message} onDismiss={() => dismiss(message.id)} />),
    [messages, dismiss],
  );
  return (
    <ToastContext value={show}>
      {children}
      <div
        role="status"
        aria-live="polite"
        className="no-print pointer-events-none fixed inset-x-0 bottom-0 z-40 flex flex-col items-center gap-2 p-4"
      >
        {list}
      </div>
    </ToastContext>
  );
}

function Toast({ message, onDismiss }: { message: Shown; onDismiss: () => void }) {
  const [isHeld, setHeld] = useState(false);
  useEffect(() => {
    if (isHeld) return undefined;
    const timer = setTimeout(onDismiss, STAYS_MS);
    return () => clearTimeout(timer);
  }, [isHeld, onDismiss]);
  return (
    <div
      onMouseEnter={() => setHeld(true)}
      onMouseLeave={() => setHeld(false)}
      onFocus={() => setHeld(true)}
      onBlur={() => setHeld(false)}
      className={`pointer-events-auto flex max-w-xl items-center gap-5 px-5 py-3 shadow-[0_1rem_2.5rem_-0.75rem_rgb(0_0_0/0.4)] ${message.isError === true ? 'bg-rust text-paper' : 'bg-ink text-paper'}`}
    >
      <span>{message.text}</span>
      {message.undo && (
        <button
          type="button"
          className="font-extrabold underline underline-offset-4 focus-visible:outline-paper"
          onClick={() => {
            message.undo?.();
            onDismiss();
          }}
        >
          Undo
        </button>
      )}
      <button
        type="button"
        aria-label="Dismiss"
        className="text-lg leading-none focus-visible:outline-paper"
        onClick={onDismiss}
      >
        ×
      </button>
    </div>
  );
}
