import {
  applyEdit,
  focusField,
  initialState,
  leaveField,
  markSaved,
  rebase,
  redo,
  replaceDocument,
  select,
  setPending,
  undo,
  type Edit,
  type EditorState,
  type PendingText,
  type SavedRevision,
  type Selection,
} from './editor-state.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';

/** Holds the state of one open scenario and tells its readers; every method is a pure step of `editor-state.ts`. */
export interface EditorStore {
  getState: () => EditorState;
  subscribe: (listener: () => void) => () => void;
  edit: (edit: Edit) => void;
  undo: () => void;
  redo: () => void;
  select: (selection: Partial<Selection>) => void;
  focusField: (field: string) => void;
  leaveField: () => void;
  setPending: (field: string, pending: PendingText | null) => void;
  replaceDocument: (document: Scenario, label: string) => void;
  markSaved: (saved: SavedRevision) => void;
  rebase: (saved: SavedRevision) => void;
}

export function createEditorStore(saved: SavedRevision): EditorStore {
  let state = initialState(saved);
  const listeners = new Set<() => void>();
  const step = (next: EditorState): void => {
    if (next === state) return;
    state = next;
    listeners.forEach((listener) => listener());
  };
  return {
    getState: () => state,
    subscribe: (listener) => {
      listeners.add(listener);
      return () => void listeners.delete(listener);
    },
    edit: (edit) => step(applyEdit(state, edit)),
    undo: () => step(undo(state)),
    redo: () => step(redo(state)),
    select: (selection) => step(select(state, selection)),
    focusField: (field) => step(focusField(state, field)),
    leaveField: () => step(leaveField(state)),
    setPending: (field, pending) => step(setPending(state, field, pending)),
    replaceDocument: (document, label) => step(replaceDocument(state, document, label)),
    markSaved: (revision) => step(markSaved(state, revision)),
    rebase: (revision) => step(rebase(state, revision)),
  };
}
