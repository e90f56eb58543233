import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { libraryPageSchema, type LibraryKind } from '#common/schemas/api/library.ts';
import { api } from '#frontend/lib/api-client.ts';
import { queryString } from '#frontend/lib/query-string.ts';

export const LIBRARY_KEY = ['library'];

export interface LibraryListQuery {
  kind: LibraryKind;
  page: number;
  sort: string;
  q: string;
  archived: string;
  origin: string;
}

export function useLibrary({ kind, page, sort, q, archived, origin }: LibraryListQuery) {
  const query = { kind, page, sort, q, archived, origin };
  return useQuery({
    queryKey: [...LIBRARY_KEY, 'list', query],
    queryFn: ({ signal }) => api.get(`/library${queryString(query)}`, libraryPageSchema, signal),
    placeholderData: keepPreviousData,
  });
}
