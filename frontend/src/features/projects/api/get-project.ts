import { useQuery } from '@tanstack/react-query';
import { projectSchema } from '#common/schemas/api/projects.ts';
import { api } from '#frontend/lib/api-client.ts';
import { PROJECTS_KEY } from './list-projects.ts';

export function useProject(projectId: string) {
  return useQuery({
    queryKey: [...PROJECTS_KEY, 'one', projectId],
    queryFn: ({ signal }) => api.get(`/projects/${projectId}`, projectSchema, signal),
  });
}
