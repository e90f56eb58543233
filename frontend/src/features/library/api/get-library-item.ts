import { useQuery } from '@tanstack/react-query';
import { libraryItemSchema } from '#common/schemas/api/library.ts';
import { api } from '#frontend/lib/api-client.ts';
import { LIBRARY_KEY } from './list-library.ts';

/** One item of the workspace (a UUID) or of the catalogue (a key such as `cell:CR2032`). */
export function useLibraryItem(itemId: string) {
  return useQuery({
    queryKey: [...LIBRARY_KEY, 'one', itemId],
    queryFn: ({ signal }) => api.get(`/library/${encodeURIComponent(itemId)}`, libraryItemSchema, signal),
  });
}
