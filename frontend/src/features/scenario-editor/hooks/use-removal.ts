import { useToast } from '#frontend/components/toast.tsx';
import type { Edit } from '../model/editor-state.ts';
import { useEditorStore } from './editor-context.tsx';

/** Makes an edit that takes something away and says so, with an undo that holds as long as nothing else was changed. */
export function useRemoval(): (edit: Edit, text: string) => void {
  const store = useEditorStore();
  const toast = useToast();
  return (edit, text) => {
    store.edit(edit);
    const entry = store.getState().past.at(-1);
    toast({
      text,
      undo: () => {
        if (store.getState().past.at(-1) === entry) store.undo();
        else toast({ text: 'Other changes came after it. Undo goes back through them one by one.' });
      },
    });
  };
}
