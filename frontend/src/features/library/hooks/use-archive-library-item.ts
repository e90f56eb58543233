import type { LibraryItem } from '#common/schemas/api/library.ts';
import { useToast } from '#frontend/components/toast.tsx';
import { wordsOfError } from '#frontend/lib/form-errors.ts';
import { useUpdateLibraryItem } from '../api/change-library.ts';

/** Archives an item of the workspace or takes it back out; the message offers the way back. */
export function useArchiveLibraryItem(): (item: LibraryItem, archived: boolean) => void {
  const toast = useToast();
  const update = useUpdateLibraryItem();
  const set = (item: LibraryItem, archived: boolean, canUndo = true): void => {
    if (item.version === null) return;
    update.mutate(
      { id: item.id, version: item.version, archived },
      {
        onSuccess: (stored) =>
          toast({
            text: `“${item.name}” ${archived ? 'is in the archive.' : 'is in use again.'}`,
            ...(canUndo ? { undo: () => set(stored, !archived, false) } : {}),
          }),
        onError: (error) => toast({ text: wordsOfError(error), isError: true }),
      },
    );
  };
  return (item, archived) => set(item, archived);
}
