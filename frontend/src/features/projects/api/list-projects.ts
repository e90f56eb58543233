import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { projectPageSchema } from '#common/schemas/api/projects.ts';
import { api } from '#frontend/lib/api-client.ts';
import { queryString } from '#frontend/lib/query-string.ts';

export const PROJECTS_KEY = ['projects'];

export interface ProjectListQuery {
  page: number;
  sort: string;
  q: string;
  archived: string;
}

export function useProjects({ page, sort, q, archived }: ProjectListQuery) {
  return useQuery({
    queryKey: [...PROJECTS_KEY, 'list', { page, sort, q, archived }],
    queryFn: ({ signal }) => api.get(`/projects${queryString({ page, sort, q, archived })}`, projectPageSchema, signal),
    placeholderData: keepPreviousData,
  });
}
