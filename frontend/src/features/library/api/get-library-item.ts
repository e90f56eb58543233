import { useQuery } from '@tanstack/react-query';
import {
  libraryItemSchema,
  libraryKindSchema,
  libraryPageSchema,
  type LibraryItem,
} from '#common/schemas/api/library.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { api, ApiError } from '#frontend/lib/api-client.ts';
import { queryString } from '#frontend/lib/query-string.ts';
import { LIBRARY_KEY } from './list-library.ts';

/** One item of the workspace (a UUID) or of the catalogue (a key such as `cell:CR2032`). */
export function useLibraryItem(itemId: string) {
  return useQuery({
    queryKey: [...LIBRARY_KEY, 'one', itemId],
    queryFn: ({ signal }) =>
      itemId.includes(':')
        ? catalogueItem(itemId, signal)
        : api.get(`/library/${encodeURIComponent(itemId)}`, libraryItemSchema, signal),
  });
}

/** The catalogue is small and comes as a list only. */
async function catalogueItem(itemId: string, signal: AbortSignal): Promise<LibraryItem> {
  const kind = libraryKindSchema.safeParse(itemId.split(':')[0]);
  if (!kind.success) throw new ApiError(404, null);
  const query = queryString({ kind: kind.data, origin: 'catalogue', pageSize: LIMITS.pageSizeMax });
  const { items } = await api.get(`/library${query}`, libraryPageSchema, signal);
  const item = items.find(({ id }) => id === itemId);
  if (!item) throw new ApiError(404, null);
  return item;
}
