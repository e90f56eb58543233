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

export function useScenarios(projectId: string, { page, sort, q, archived }: ScenarioListQuery) {
  return useQuery({
    queryKey: [...SCENARIOS_KEY, 'list', projectId, { page, sort, q, archived }],
    queryFn: ({ signal }) =>
      api.get(
        `/projects/${projectId}/scenarios${queryString({ page, sort, q, archived })}`,
        scenarioPageSchema,
        signal,
      ),
    placeholderData: keepPreviousData,
  });
}
