import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { diffSchema, revisionPageSchema, scenarioDetailSchema } from '#common/schemas/api/scenarios.ts';
import { api } from '#frontend/lib/api-client.ts';
import { queryString } from '#frontend/lib/query-string.ts';

export const REVISIONS_KEY = 'revisions';

/** A page of a scenario's revisions, the latest first. */
export function useRevisions(scenarioId: string, page: number) {
  return useQuery({
    queryKey: [REVISIONS_KEY, scenarioId, 'list', page],
    queryFn: ({ signal }) =>
      api.get(
        `/scenarios/${scenarioId}/revisions${queryString({ page, pageSize: 20, sort: '-revision' })}`,
        revisionPageSchema,
        signal,
      ),
    placeholderData: keepPreviousData,
    staleTime: 0,
  });
}

/** What changed from one revision to another. Revisions never change, so the answer holds for good. */
export function useRevisionDiff(scenarioId: string, from: number, to: number) {
  return useQuery({
    queryKey: [REVISIONS_KEY, scenarioId, 'diff', from, to],
    queryFn: ({ signal }) => api.get(`/scenarios/${scenarioId}/diff${queryString({ from, to })}`, diffSchema, signal),
    staleTime: Number.POSITIVE_INFINITY,
  });
}

/** Makes a new revision with the document of an earlier one. */
export function restoreRevision(scenarioId: string, revision: number, version: number) {
  return api.post(`/scenarios/${scenarioId}/revisions/${revision}/restore`, { version }, scenarioDetailSchema);
}
