import { useEffect } from 'react';
import type { EditorStore } from '../model/editor-store.ts';

/** Ctrl+Z, Ctrl+Shift+Z, Ctrl+Y and Ctrl+S on the whole page; with the command key on a Mac. */
export function useEditorKeys(store: EditorStore, onSave: () => void, isReadOnly: boolean): void {
  useEffect(() => {
    if (isReadOnly) return undefined;
    const handleKeyDown = (event: KeyboardEvent): void => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey || document.querySelector('dialog[open]')) return;
      const key = event.key.toLowerCase();
      const action =
        key === 's' ? onSave : isForeignText(event.target) ? null : historyAction(store, key, event.shiftKey);
      if (!action) return;
      event.preventDefault();
      action();
    };
    window.addEventListener('keydown', handleKeyDown);
    return () => window.removeEventListener('keydown', handleKeyDown);
  }, [store, onSave, isReadOnly]);
}

function historyAction(store: EditorStore, key: string, isShift: boolean): (() => void) | null {
  if (key === 'y' || (key === 'z' && isShift)) return store.redo;
  if (key !== 'z') return null;
  const field = document.activeElement instanceof HTMLElement ? document.activeElement.dataset['field'] : undefined;
  // Text that is no value yet is taken back first: it was typed last.
  if (field !== undefined && field in store.getState().pending) return () => store.setPending(field, null);
  return store.undo;
}

/** A text that is no field of the document, such as a search, keeps the browser's own undo. */
function isForeignText(target: EventTarget | null): boolean {
  const isText = target instanceof HTMLInputElement || target instanceof HTMLTextAreaElement;
  return isText && target.dataset['field'] === undefined;
}
