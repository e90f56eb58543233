import { useMutation, useQueryClient } from '@tanstack/react-query';
import { projectSchema, type CreateProject } from '#common/schemas/api/projects.ts';
import { api } from '#frontend/lib/api-client.ts';
import { PROJECTS_KEY } from './list-projects.ts';

export function useCreateProject() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: CreateProject) => api.post('/projects', body, projectSchema),
    onSuccess: () => client.invalidateQueries({ queryKey: PROJECTS_KEY }),
  });
}
