import { useMutation, useQueryClient } from '@tanstack/react-query';
import { scenarioDetailSchema, type CreateScenario, type ScenarioFile } from '#common/schemas/api/scenarios.ts';
import { api } from '#frontend/lib/api-client.ts';
import { refreshLists } from './refresh-lists.ts';

export function useCreateScenario(projectId: string) {
  const refresh = refreshLists(useQueryClient());
  return useMutation({
    mutationFn: (body: CreateScenario) => api.post(`/projects/${projectId}/scenarios`, body, scenarioDetailSchema),
    onSuccess: refresh,
  });
}

/** Makes a scenario of an exported file; the server checks the whole file. */
export function useImportScenario(projectId: string) {
  const refresh = refreshLists(useQueryClient());
  return useMutation({
    mutationFn: (file: ScenarioFile) => api.post(`/projects/${projectId}/import`, file, scenarioDetailSchema),
    onSuccess: refresh,
  });
}
