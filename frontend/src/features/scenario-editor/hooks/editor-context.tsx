import { createContext, use, useMemo, useSyncExternalStore, type ReactNode } from 'react';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import type { EditorState, PendingText } from '../model/editor-state.ts';
import type { EditorStore } from '../model/editor-store.ts';

interface EditorContextValue {
  store: EditorStore;
  isReadOnly: boolean;
}

const EditorContext = createContext<EditorContextValue | null>(null);
const ProblemContext = createContext<ReadonlyMap<string, string>>(new Map());

export function EditorProvider({ store, isReadOnly, children }: EditorContextValue & { children: ReactNode }) {
  const value = useMemo(() => ({ store, isReadOnly }), [store, isReadOnly]);
  return <EditorContext value={value}>{children}</EditorContext>;
}

/** Gives every field the problems found elsewhere: field key to message. */
export function ProblemProvider({
  problems,
  children,
}: {
  problems: ReadonlyMap<string, string>;
  children: ReactNode;
}) {
  return <ProblemContext value={problems}>{children}</ProblemContext>;
}

function useEditorContext(): EditorContextValue {
  const value = use(EditorContext);
  if (!value) throw new Error('A part of the scenario editor stands outside its EditorProvider.');
  return value;
}

export function useEditorStore(): EditorStore {
  return useEditorContext().store;
}

export function useIsReadOnly(): boolean {
  return useEditorContext().isReadOnly;
}

/** Reads from the editor; the component renders again only when the chosen value changes its identity. */
export function useEditorState<T>(choose: (state: EditorState) => T): T {
  const { store } = useEditorContext();
  const read = (): T => choose(store.getState());
  return useSyncExternalStore(store.subscribe, read, read);
}

export function useDocument<T>(choose: (document: Scenario) => T): T {
  return useEditorState((state) => choose(state.document));
}

export function useProblems(): ReadonlyMap<string, string> {
  return use(ProblemContext);
}

export function useFieldProblem(field: string): string | undefined {
  return use(ProblemContext).get(field);
}

/** What an input of the editor needs besides its value: text kept while it is none, and the end of typing. */
export function useField(field: string) {
  const store = useEditorStore();
  const unsettled = useEditorState((state) => state.pending[field]);
  const problem = useFieldProblem(field);
  return {
    field,
    unsettled: unsettled ?? null,
    problem,
    onUnsettled: (pending: PendingText | null) => store.setPending(field, pending),
    onLeave: store.leaveField,
  };
}
