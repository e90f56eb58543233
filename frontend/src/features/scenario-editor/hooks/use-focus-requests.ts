import { useEffect } from 'react';
import { tabOfField, type EditorTab } from '../model/fields.ts';
import { useEditorState } from './editor-context.tsx';

/** Frames to wait for a page that is still being fetched. */
const PATIENCE = 60;

/** Puts the focus where undo, adding or a list of problems asks for it, on another tab if need be. */
export function useFocusRequests(current: EditorTab | 'revisions', openTab: (tab: EditorTab) => void): void {
  const request = useEditorState((state) => state.focus);
  useEffect(() => {
    if (!request) return undefined;
    const tab = tabOfField(request.field);
    if (tab !== null && tab !== current) openTab(tab);
    let frame = 0;
    let left = PATIENCE;
    const attempt = (): void => {
      const target = fieldElement(request.field);
      if (target) focusAndShow(target);
      else if (left > 0) {
        left -= 1;
        frame = requestAnimationFrame(attempt);
      }
    };
    attempt();
    return () => cancelAnimationFrame(frame);
    // A change of tab by the user is no request.
    // eslint-disable-next-line react-hooks/exhaustive-deps -- only the request starts this
  }, [request]);
}

function fieldElement(field: string): HTMLElement | null {
  const within = (prefix: string): HTMLElement | null =>
    document.querySelector<HTMLElement>(`[data-field^="${CSS.escape(`${prefix}.`)}"]`);
  const exact = document.querySelector<HTMLElement>(`[data-field="${CSS.escape(field)}"]`);
  // A minimum or maximum that is not shown leads to the typical value beside it.
  return exact ?? within(field) ?? within(field.replace(/\.(min|max)$/, ''));
}

function focusAndShow(target: HTMLElement): void {
  if (target === document.activeElement) return;
  target.focus();
  target.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  if (target instanceof HTMLInputElement && target.type === 'text') target.select();
}
