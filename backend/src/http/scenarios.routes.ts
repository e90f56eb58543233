import { z } from 'zod';
import { uuidSchema } from '#common/schemas/api/common.ts';
import {
  archiveScenarioSchema,
  createScenarioSchema,
  duplicateScenarioSchema,
  saveScenarioSchema,
  scenarioDetailSchema,
  scenarioFileSchema,
  scenarioListQuerySchema,
  scenarioPageSchema,
} from '#common/schemas/api/scenarios.ts';
import { EDIT, READ } from '#backend/domain/policies.ts';
import type { ScenariosService } from '#backend/services/scenarios.service.ts';
import { presentPage, presentScenario, presentScenarioDetail, presentScenarioFile } from './presenters.ts';
import { projectParams } from './projects.routes.ts';
import { defineRoute, DOCUMENT_BODY, NO_BODY, NO_INPUT, NO_QUERY, SMALL_BODY, type Route } from './route.ts';

export const scenarioParams = z.strictObject({ scenarioId: uuidSchema });

/** Scenarios of a project: list, create, import. */
export function projectScenarioRoutes(scenarios: ScenariosService): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: '/api/v1/projects/:projectId/scenarios',
      policy: READ,
      params: projectParams,
      query: scenarioListQuerySchema,
      input: NO_INPUT,
      output: scenarioPageSchema,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: 'Scenarios of a project with what their latest revision forecasts.',
      handler: async ({ who, params, query }) =>
        presentPage(await scenarios.list(who, params.projectId, query), presentScenario),
    }),
    defineRoute({
      method: 'post',
      path: '/api/v1/projects/:projectId/scenarios',
      policy: EDIT,
      params: projectParams,
      query: NO_QUERY,
      input: createScenarioSchema,
      output: scenarioDetailSchema,
      success: 201,
      statuses: [],
      limits: DOCUMENT_BODY,
      summary: 'Makes a scenario with its first revision.',
      handler: async ({ who, params, input }) =>
        presentScenarioDetail(await scenarios.create(who, params.projectId, input)),
    }),
    defineRoute({
      method: 'post',
      path: '/api/v1/projects/:projectId/import',
      policy: EDIT,
      params: projectParams,
      query: NO_QUERY,
      input: scenarioFileSchema,
      output: scenarioDetailSchema,
      success: 201,
      statuses: [],
      limits: DOCUMENT_BODY,
      summary: 'Makes a scenario from an exported file.',
      handler: async ({ who, params, input }) => {
        const note = `Imported from a file of revision ${input.revision}, exported ${input.exportedAt}.`;
        const first = { document: input.scenario, note };
        return presentScenarioDetail(await scenarios.create(who, params.projectId, first));
      },
    }),
  ];
}

const detail = { params: scenarioParams, query: NO_QUERY, output: scenarioDetailSchema } as const;

/** One scenario: read, save, archive. */
export function scenarioRoutes(scenarios: ScenariosService): Route[] {
  return [
    defineRoute({
      ...detail,
      method: 'get',
      path: '/api/v1/scenarios/:scenarioId',
      policy: READ,
      input: NO_INPUT,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: 'A scenario with the document of its latest revision.',
      handler: async ({ who, params }) => presentScenarioDetail(await scenarios.get(who, params.scenarioId)),
    }),
    defineRoute({
      ...detail,
      method: 'put',
      path: '/api/v1/scenarios/:scenarioId',
      policy: EDIT,
      input: saveScenarioSchema,
      success: 200,
      statuses: [409],
      limits: DOCUMENT_BODY,
      summary: 'Saves a new revision on top of the version that was read.',
      handler: async ({ who, params, input }) =>
        presentScenarioDetail(await scenarios.save(who, params.scenarioId, { ...input, restoredFrom: null })),
    }),
    defineRoute({
      ...detail,
      method: 'patch',
      path: '/api/v1/scenarios/:scenarioId',
      policy: EDIT,
      input: archiveScenarioSchema,
      success: 200,
      statuses: [409],
      limits: SMALL_BODY,
      summary: 'Archives a scenario, or brings it back.',
      handler: async ({ who, params, input }) =>
        presentScenarioDetail(await scenarios.archive(who, params.scenarioId, input)),
    }),
  ];
}

/** Copies of a scenario: inside the workspace, and as a file. */
export function scenarioCopyRoutes(scenarios: ScenariosService, now: () => number): Route[] {
  return [
    defineRoute({
      ...detail,
      method: 'post',
      path: '/api/v1/scenarios/:scenarioId/duplicate',
      policy: EDIT,
      input: duplicateScenarioSchema,
      success: 201,
      statuses: [],
      limits: SMALL_BODY,
      summary: 'Copies the latest document into a scenario of its own.',
      handler: async ({ who, params, input }) =>
        presentScenarioDetail(await scenarios.duplicate(who, params.scenarioId, input)),
    }),
    defineRoute({
      ...detail,
      method: 'get',
      path: '/api/v1/scenarios/:scenarioId/export',
      policy: READ,
      input: NO_INPUT,
      output: scenarioFileSchema,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: 'The latest document as a file.',
      download: ({ scenario, revision }) => `${scenario.name} r${revision}.json`,
      handler: async ({ who, params }) =>
        presentScenarioFile(await scenarios.get(who, params.scenarioId), new Date(now())),
    }),
  ];
}
