import { useMutation, useQueryClient } from '@tanstack/react-query';
import { libraryItemSchema, type CreateLibraryItem, type UpdateLibraryItem } from '#common/schemas/api/library.ts';
import { api } from '#frontend/lib/api-client.ts';
import { LIBRARY_KEY } from './list-library.ts';

export function useCreateLibraryItem() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: CreateLibraryItem) => api.post('/library', body, libraryItemSchema),
    onSuccess: () => client.invalidateQueries({ queryKey: LIBRARY_KEY }),
  });
}

/** Renames, notes, changes figures, archives or takes out of the archive. */
export function useUpdateLibraryItem() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ id, ...body }: UpdateLibraryItem & { id: string }) =>
      api.patch(`/library/${id}`, body, libraryItemSchema),
    onSettled: () => client.invalidateQueries({ queryKey: LIBRARY_KEY }),
  });
}
