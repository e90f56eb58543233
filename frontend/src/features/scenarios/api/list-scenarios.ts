import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { scenarioPageSchema } from '#common/schemas/api/scenarios.ts';
import { api } from '#frontend/lib/api-client.ts';
import { queryString } from '#frontend/lib/query-string.ts';

/** Start of every key about scenarios, here and in the editor. */
export const SCENARIOS_KEY = ['scenarios'];

export interface ScenarioListQuery {
  page: number;
  sort: string;
  q: string;
  archived: string;
}

export function useScenarios(projectId: string, query: ScenarioListQuery) {
  return useQuery({
    queryKey: [...SCENARIOS_KEY, 'list', projectId, query],
    queryFn: ({ signal }) =>
      api.get(`/projects/${projectId}/scenarios${queryString({ ...query })}`, scenarioPageSchema, signal),
    placeholderData: keepPreviousData,
  });
}
