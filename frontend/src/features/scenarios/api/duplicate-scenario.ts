import { useMutation, useQueryClient } from '@tanstack/react-query';
import { scenarioDetailSchema } from '#common/schemas/api/scenarios.ts';
import { api } from '#frontend/lib/api-client.ts';
import { refreshLists } from './refresh-lists.ts';

export function useDuplicateScenario() {
  const refresh = refreshLists(useQueryClient());
  return useMutation({
    mutationFn: ({ id, name }: { id: string; name: string }) =>
      api.post(`/scenarios/${id}/duplicate`, { name }, scenarioDetailSchema),
    onSuccess: refresh,
  });
}
