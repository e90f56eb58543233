import { useEffect, useState } from 'react';
import { removeDraft, writeDraft } from '../model/draft-storage.ts';
import { isDirty } from '../model/editor-state.ts';
import type { EditorStore } from '../model/editor-store.ts';

/** Long enough not to write with each keystroke, short enough to lose nothing that matters. */
const PAUSE_MS = 400;

/** Keeps unsaved work in the browser as it changes and when the page goes; tells whether that works. */
export function useDraftKeeping(store: EditorStore, scenarioId: string, isOn: boolean): boolean {
  const [isKept, setKept] = useState(true);
  useEffect(() => {
    if (!isOn) return undefined;
    let timer: ReturnType<typeof setTimeout> | undefined;
    const keep = (): void => {
      clearTimeout(timer);
      timer = undefined;
      setKept(keepDraft(store, scenarioId));
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
  }, [store, scenarioId, isOn]);
  return isKept;
}

function keepDraft(store: EditorStore, scenarioId: string): boolean {
  const state = store.getState();
  if (!isDirty(state) && Object.keys(state.pending).length === 0) {
    removeDraft(localStorage, scenarioId);
    return true;
  }
  return writeDraft(localStorage, scenarioId, {
    baseVersion: state.saved.version,
    baseRevision: state.saved.revision,
    baseDocument: state.saved.document,
    document: state.document,
    pending: state.pending,
    writtenAt: new Date().toISOString(),
  });
}
