import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { isFieldOf } from './fields.ts';
import { isSameValue } from './same-value.ts';

/** What is chosen on the node page; comes back with undo. */
export interface Selection {
  partId: string | null;
  routineId: string | null;
  stepId: string | null;
}

export interface HistoryEntry {
  /** What undo gives back (for `past`) or redo brings (for `future`). */
  document: Scenario;
  selection: Selection;
  /** The edit in words: "add a part". */
  label: string;
  /** Key of the field that the edit belongs to, where it belongs to one. */
  field: string | null;
}

export interface SavedRevision {
  document: Scenario;
  version: number;
  revision: number;
  savedAt: string;
  savedBy: string;
}

/** Text in a field that is no value yet: kept while the page is open and with the draft, never part of the document. */
export interface PendingText {
  text: string;
  message: string;
}

export interface FocusRequest {
  field: string;
  /** Counts up, so that the same field can be asked for twice. */
  count: number;
}

export interface EditorState {
  document: Scenario;
  selection: Selection;
  /** Oldest first. */
  past: readonly HistoryEntry[];
  /** Next redo last. */
  future: readonly HistoryEntry[];
  saved: SavedRevision;
  /** Field whose next edit joins the last history entry; null once it was left. */
  typingIn: string | null;
  pending: Readonly<Record<string, PendingText>>;
  focus: FocusRequest | null;
  /** What undo or redo did last, for the status line. */
  announcement: string;
}

export interface Edit {
  label: string;
  /** Edits of the same field in a row are undone as one. */
  field?: string;
  /** Field to put the focus on afterwards. */
  focus?: string;
  selection?: Partial<Selection>;
  change: (document: Scenario) => Scenario;
}

/** Undo steps kept; a document shares what did not change with its neighbours, so that many cost little. */
const HISTORY_LIMIT = 500;

export function initialState(saved: SavedRevision): EditorState {
  return {
    document: saved.document,
    selection: firstSelection(saved.document),
    past: [],
    future: [],
    saved,
    typingIn: null,
    pending: {},
    focus: null,
    announcement: '',
  };
}

function firstSelection({ node }: Scenario): Selection {
  const routine = node.routines[0];
  return { partId: node.parts[0]?.id ?? null, routineId: routine?.id ?? null, stepId: routine?.steps[0]?.id ?? null };
}

export function applyEdit(state: EditorState, edit: Edit): EditorState {
  const document = edit.change(state.document);
  if (document === state.document) return withSelection(state, edit);
  const field = edit.field ?? null;
  const joins = field !== null && field === state.typingIn && state.past.at(-1)?.field === field;
  const entry: HistoryEntry = { document: state.document, selection: state.selection, label: edit.label, field };
  return {
    ...withSelection(state, edit),
    document,
    past: joins ? state.past : [...state.past, entry].slice(-HISTORY_LIMIT),
    future: [],
    typingIn: field,
    announcement: '',
  };
}

function withSelection(state: EditorState, edit: Pick<Edit, 'selection' | 'focus'>): EditorState {
  const focus = edit.focus === undefined ? state.focus : requestFocus(state, edit.focus);
  if (!edit.selection && focus === state.focus) return state;
  return { ...state, selection: { ...state.selection, ...edit.selection }, focus };
}

function requestFocus(state: EditorState, field: string): FocusRequest {
  return { field, count: (state.focus?.count ?? 0) + 1 };
}

export function select(state: EditorState, selection: Partial<Selection>): EditorState {
  return { ...state, selection: { ...state.selection, ...selection }, typingIn: null };
}

/** Asks for the focus to go to a field, and chooses the part or the step that it belongs to. */
export function focusField(state: EditorState, field: string): EditorState {
  const [area, list, id, steps, stepId] = field.split('.');
  const ofPart = area === 'node' && list === 'parts' && id !== undefined ? { partId: id } : {};
  const ofRoutine = area === 'node' && list === 'routines' && id !== undefined ? { routineId: id } : {};
  const ofStep = steps === 'steps' && stepId !== undefined ? { stepId } : {};
  return {
    ...state,
    selection: { ...state.selection, ...ofPart, ...ofRoutine, ...ofStep },
    focus: requestFocus(state, field),
    typingIn: null,
  };
}

/** Ends the typing in a field: its next edit is an undo step of its own. */
export function leaveField(state: EditorState): EditorState {
  return state.typingIn === null ? state : { ...state, typingIn: null };
}

export function undo(state: EditorState): EditorState {
  const entry = state.past.at(-1);
  if (!entry) return state;
  return {
    ...travel(state, entry),
    past: state.past.slice(0, -1),
    future: [...state.future, { ...entry, document: state.document, selection: state.selection }],
    announcement: `Undone: ${entry.label}.`,
  };
}

export function redo(state: EditorState): EditorState {
  const entry = state.future.at(-1);
  if (!entry) return state;
  return {
    ...travel(state, entry),
    past: [...state.past, { ...entry, document: state.document, selection: state.selection }],
    future: state.future.slice(0, -1),
    announcement: `Redone: ${entry.label}.`,
  };
}

function travel(state: EditorState, entry: HistoryEntry): EditorState {
  return {
    ...state,
    document: entry.document,
    selection: entry.selection,
    typingIn: null,
    pending: entry.field === null ? state.pending : without(state.pending, entry.field),
    focus: entry.field === null ? state.focus : requestFocus(state, entry.field),
  };
}

/** A save has ended well. What was typed since it was sent stays, and stays unsaved. */
export function markSaved(state: EditorState, saved: SavedRevision): EditorState {
  const document = isSameValue(state.document, saved.document) ? saved.document : state.document;
  return { ...state, saved, document, typingIn: null };
}

/** Puts a whole document in place as one step that can be undone, for example a kept draft or someone else's revision. */
export function replaceDocument(state: EditorState, document: Scenario, label: string): EditorState {
  const next = applyEdit(state, { label, change: () => document });
  return { ...next, selection: existing(next.selection, document), pending: {} };
}

/** The stored revision moved on elsewhere: what is here stays and now stands on that revision. */
export function rebase(state: EditorState, saved: SavedRevision): EditorState {
  return { ...state, saved, typingIn: null };
}

function existing(selection: Selection, document: Scenario): Selection {
  const first = firstSelection(document);
  const routine = document.node.routines.find(({ id }) => id === selection.routineId);
  return {
    partId: document.node.parts.some(({ id }) => id === selection.partId) ? selection.partId : first.partId,
    routineId: routine ? routine.id : first.routineId,
    stepId: routine?.steps.some(({ id }) => id === selection.stepId) ? selection.stepId : first.stepId,
  };
}

export function setPending(state: EditorState, field: string, pending: PendingText | null): EditorState {
  const before = state.pending[field];
  if (pending === null) return before ? { ...state, pending: without(state.pending, field) } : state;
  if (before?.text === pending.text && before.message === pending.message) return state;
  return { ...state, pending: { ...state.pending, [field]: pending } };
}

function without(pending: EditorState['pending'], field: string): EditorState['pending'] {
  const { [field]: _settled, ...others } = pending;
  return others;
}

/** Fields whose text is no value yet, without those of parts or steps that were removed meanwhile. */
export function unsettledFields(state: EditorState): string[] {
  return Object.keys(state.pending).filter((field) => isFieldOf(state.document, field));
}

export function isDirty(state: EditorState): boolean {
  return !isSameValue(state.document, state.saved.document);
}
