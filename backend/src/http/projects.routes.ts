import { z } from 'zod';
import { uuidSchema } from '#common/schemas/api/common.ts';
import {
  createProjectSchema,
  projectListQuerySchema,
  projectPageSchema,
  projectSchema,
  updateProjectSchema,
} from '#common/schemas/api/projects.ts';
import { EDIT, READ } from '#backend/domain/policies.ts';
import type { ProjectsService } from '#backend/services/projects.service.ts';
import { presentPage, presentProject } from './presenters.ts';
import { defineRoute, NO_BODY, NO_INPUT, NO_PARAMS, NO_QUERY, SMALL_BODY, type Route } from './route.ts';

export const projectParams = z.strictObject({ projectId: uuidSchema });

export function projectRoutes(projects: ProjectsService): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: '/api/v1/projects',
      policy: READ,
      params: NO_PARAMS,
      query: projectListQuerySchema,
      input: NO_INPUT,
      output: projectPageSchema,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: 'Projects of the workspace.',
      handler: async ({ who, query }) => presentPage(await projects.list(who, query), presentProject),
    }),
    defineRoute({
      method: 'post',
      path: '/api/v1/projects',
      policy: EDIT,
      params: NO_PARAMS,
      query: NO_QUERY,
      input: createProjectSchema,
      output: projectSchema,
      success: 201,
      statuses: [],
      limits: SMALL_BODY,
      summary: 'Makes a project.',
      handler: async ({ who, input }) => presentProject(await projects.create(who, input)),
    }),
    defineRoute({
      method: 'get',
      path: '/api/v1/projects/:projectId',
      policy: READ,
      params: projectParams,
      query: NO_QUERY,
      input: NO_INPUT,
      output: projectSchema,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: 'A project.',
      handler: async ({ who, params }) => presentProject(await projects.get(who, params.projectId)),
    }),
    defineRoute({
      method: 'patch',
      path: '/api/v1/projects/:projectId',
      policy: EDIT,
      params: projectParams,
      query: NO_QUERY,
      input: updateProjectSchema,
      output: projectSchema,
      success: 200,
      statuses: [409],
      limits: SMALL_BODY,
      summary: 'Changes name, description or archive state of the version that was read.',
      handler: async ({ who, params, input }) => presentProject(await projects.update(who, params.projectId, input)),
    }),
  ];
}
