import type { ScenarioDetail } from '#common/schemas/api/scenarios.ts';
import type { Draft } from './draft-storage.ts';
import type { SavedRevision } from './editor-state.ts';
import { createEditorStore, type EditorStore } from './editor-store.ts';
import { isSameValue } from './same-value.ts';

export interface KeptWork {
  writtenAt: string;
  /** The stored scenario moved on since the work began; null where it did not. */
  newer: SavedRevision | null;
  baseRevision: number;
}

export function savedOf(detail: ScenarioDetail): SavedRevision {
  const { document, version, revision, updatedAt, updatedBy } = detail;
  return { document, version, revision, savedAt: updatedAt, savedBy: updatedBy };
}

/**
 * Opens a scenario, with the unsaved work that this browser has kept. Work on an older revision stays on that revision, so
 * that saving it shows what the others changed meanwhile.
 */
export function openScenario(
  detail: ScenarioDetail,
  draft: Draft | null,
): { store: EditorStore; kept: KeptWork | null } {
  const stored = savedOf(detail);
  const isNothingNew =
    draft === null || (isSameValue(draft.document, detail.document) && Object.keys(draft.pending).length === 0);
  if (isNothingNew) return { store: createEditorStore(stored), kept: null };
  const isCurrent = draft.baseVersion === stored.version;
  const base: SavedRevision = isCurrent
    ? stored
    : { ...stored, document: draft.baseDocument, version: draft.baseVersion, revision: draft.baseRevision };
  const store = createEditorStore(base);
  store.replaceDocument(draft.document, 'take up the unsaved changes');
  for (const [field, pending] of Object.entries(draft.pending)) store.setPending(field, pending);
  return {
    store,
    kept: { writtenAt: draft.writtenAt, newer: isCurrent ? null : stored, baseRevision: draft.baseRevision },
  };
}

/** Lets go of unsaved work; undo still brings it back until the page is left. */
export function discardKept(store: EditorStore, kept: KeptWork): void {
  const target = kept.newer ?? store.getState().saved;
  if (kept.newer) store.rebase(kept.newer);
  store.replaceDocument(target.document, 'discard the unsaved changes');
  for (const field of Object.keys(store.getState().pending)) store.setPending(field, null);
}
