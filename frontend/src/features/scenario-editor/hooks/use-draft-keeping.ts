import { useEffect, useState } from 'react';
import { removeDraft, writeDraft, type DraftKey } from '../model/draft-storage.ts';
import { isDirty } from '../model/editor-state.ts';
import type { EditorStore } from '../model/editor-store.ts';

/** Long enough not to write with each keystroke, short enough to lose nothing that matters. */
const PAUSE_MS = 400;

/** Keeps unsaved work of `userId` in the browser as it changes and when the page goes; tells whether that works. Null keeps nothing. */
export function useDraftKeeping(store: EditorStore, userId: string | null, scenarioId: string): boolean {
  const [isKept, setKept] = useState(true);
  useEffect(() => {
    if (userId === null) return undefined;
    let timer: ReturnType<typeof setTimeout> | undefined;
    const keep = (): void => {
      clearTimeout(timer);
      timer = undefined;
      setKept(keepDraft(store, { userId, scenarioId }));
    };
    const keepSoon = (): void => {
      timer ??= setTimeout(keep, PAUSE_MS);
    };
    const keepNow = (): void => {
      if (timer !== undefined) keep();
    };
    const unsubscribe = store.subscribe(keepSoon);
    window.addEventListener('pagehide', keepNow);
    document.addEventListener('visibilitychange', keepNow);
    return () => {
      unsubscribe();
      keepNow();
      window.removeEventListener('pagehide', keepNow);
      document.removeEventListener('visibilitychange', keepNow);
    };
  }, [store, userId, scenarioId]);
  return isKept;
}

function keepDraft(store: EditorStore, key: DraftKey): boolean {
  const state = store.getState();
  if (!isDirty(state) && Object.keys(state.pending).length === 0) {
    removeDraft(localStorage, key);
    return true;
  }
  return writeDraft(localStorage, key, {
    baseVersion: state.saved.version,
    baseRevision: state.saved.revision,
    baseDocument: state.saved.document,
    document: state.document,
    pending: state.pending,
    writtenAt: new Date().toISOString(),
  });
}
