import { useMutation, useQueryClient } from '@tanstack/react-query';
import { scenarioDetailSchema } from '#common/schemas/api/scenarios.ts';
import { api } from '#frontend/lib/api-client.ts';
import { refreshLists } from './refresh-lists.ts';

export function useArchiveScenario() {
  const refresh = refreshLists(useQueryClient());
  return useMutation({
    mutationFn: ({ id, ...body }: { id: string; version: number; archived: boolean }) =>
      api.patch(`/scenarios/${id}`, body, scenarioDetailSchema),
    onSettled: refresh,
  });
}
