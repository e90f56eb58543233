import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { libraryPageSchema, type LibraryKind } from '#common/schemas/api/library.ts';
import { api } from '#frontend/lib/api-client.ts';
import { queryString } from '#frontend/lib/query-string.ts';

/** Items of one kind whose name contains a text, the workspace's own and the catalogue's. */
export function useLibrarySearch(kind: LibraryKind, q: string) {
  const query = { kind, q, origin: 'all', pageSize: 50, sort: 'name' };
  return useQuery({
    queryKey: ['library', 'list', query],
    queryFn: ({ signal }) => api.get(`/library${queryString(query)}`, libraryPageSchema, signal),
    placeholderData: keepPreviousData,
  });
}
