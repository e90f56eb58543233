import { useMemo, useState } from 'react';
import type { InputProblem } from '#common/schemas/problem.ts';
import { fieldOfPath } from '../model/fields.ts';
import { isSameValue } from '../model/same-value.ts';
import { useEditorStore } from './editor-context.tsx';

/** Problems by the field they belong to; the same map as long as they are the same, so that fields do not render anew. */
export function useFieldProblems(problems: readonly InputProblem[]): ReadonlyMap<string, string> {
  const store = useEditorStore();
  const [kept, setKept] = useState(problems);
  const isSame = kept === problems || isSameValue(kept, problems);
  if (!isSame) setKept(problems);
  const settled = isSame ? kept : problems;
  return useMemo(() => {
    const { document } = store.getState();
    return new Map(settled.map(({ path, message }) => [fieldOfPath(document, path), message]));
  }, [store, settled]);
}
