import { useEffect, useId, useRef, type ReactNode } from 'react';

export interface DialogProps {
  title: string;
  isOpen: boolean;
  onClose: () => void;
  children: ReactNode;
  /** Wide enough for a table. */
  isWide?: boolean;
}

/** The browser's own dialog: it keeps the focus inside, closes on Escape, and gives the focus back. */
export function Dialog({ title, isOpen, onClose, children, isWide = false }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null);
  const titleId = useId();
  useEffect(() => {
    const dialog = ref.current;
    if (!isOpen || !dialog) return undefined;
    const before = document.activeElement;
    if (!dialog.open) dialog.showModal();
    return () => {
      dialog.close();
      if (before instanceof HTMLElement && before.isConnected) before.focus();
    };
  }, [isOpen]);
  if (!isOpen) return null;
  return (
    <dialog
      ref={ref}
      aria-labelledby={titleId}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      onMouseDown={(event) => {
        if (event.target === event.currentTarget) onClose();
      }}
      className={`max-h-[calc(100dvh-2rem)] w-[calc(100vw-2rem)] overflow-y-auto bg-raised p-0 text-ink shadow-[0_1.5rem_4rem_-1rem_rgb(0_0_0/0.35)] outline outline-1 outline-hair backdrop:bg-[rgb(10_18_14/0.45)] ${isWide ? 'max-w-4xl' : 'max-w-lg'}`}
    >
      <div className="px-6 pt-6 pb-7 sm:px-8">
        <h2 id={titleId} className="mb-5 text-lead font-light">
          {title}
        </h2>
        {children}
      </div>
    </dialog>
  );
}

/** Buttons at the foot of a dialog, the main one last. */
export function DialogActions({ children }: { children: ReactNode }) {
  return <div className="mt-4 flex flex-wrap justify-end gap-3">{children}</div>;
}
