import { queryOptions, useQuery } from '@tanstack/react-query';
import { scenarioDetailSchema, type SaveScenario } from '#common/schemas/api/scenarios.ts';
import { api } from '#frontend/lib/api-client.ts';

export const scenarioQuery = (scenarioId: string) =>
  queryOptions({
    queryKey: ['scenarios', 'one', scenarioId],
    queryFn: ({ signal }) => api.get(`/scenarios/${scenarioId}`, scenarioDetailSchema, signal),
    // The editor holds the document; a fetch behind its back would only take its place.
    staleTime: Number.POSITIVE_INFINITY,
    gcTime: 0,
  });

export function useScenario(scenarioId: string) {
  return useQuery(scenarioQuery(scenarioId));
}

/** Saves a new revision on top of the version that was read. */
export function saveScenario(scenarioId: string, body: SaveScenario) {
  return api.put(`/scenarios/${scenarioId}`, body, scenarioDetailSchema);
}
