import { useMemo } from 'react';
import type { InputProblem } from '#common/schemas/problem.ts';
import { fieldOfPath } from '../model/fields.ts';
import { problemWords } from '../model/problem-words.ts';
import { useEditorStore } from './editor-context.tsx';
import { useSettled } from './use-settled.ts';

/** Problems by the field they belong to; the same map as long as they are the same, so that fields do not render anew. */
export function useFieldProblems(problems: readonly InputProblem[]): ReadonlyMap<string, string> {
  const store = useEditorStore();
  const settled = useSettled(problems);
  return useMemo(() => {
    const { document } = store.getState();
    return new Map(settled.map((problem) => [fieldOfPath(document, problem.path), problemWords(document, problem)]));
  }, [store, settled]);
}
