import { useMutation, useQueryClient } from '@tanstack/react-query';
import { projectSchema, type UpdateProject } from '#common/schemas/api/projects.ts';
import { api } from '#frontend/lib/api-client.ts';
import { PROJECTS_KEY } from './list-projects.ts';

/** Renames, describes, archives or takes out of the archive. */
export function useUpdateProject() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ id, ...body }: UpdateProject & { id: string }) => api.patch(`/projects/${id}`, body, projectSchema),
    onSettled: () => client.invalidateQueries({ queryKey: PROJECTS_KEY }),
  });
}
