import { forecastSchema } from '#common/schemas/api/forecast.ts';
import {
  diffQuerySchema,
  diffSchema,
  forecastRequestSchema,
  restoreRevisionSchema,
  revisionDetailSchema,
  revisionListQuerySchema,
  revisionPageSchema,
  revisionParamsSchema,
  scenarioDetailSchema,
} from '#common/schemas/api/scenarios.ts';
import { EDIT, READ } from '#backend/domain/policies.ts';
import type { ForecastService } from '#backend/services/forecast.service.ts';
import type { RevisionsService } from '#backend/services/revisions.service.ts';
import { presentPage, presentRevision, presentRevisionDetail, presentScenarioDetail } from './presenters.ts';
import { defineRoute, DOCUMENT_BODY, NO_BODY, NO_INPUT, NO_PARAMS, NO_QUERY, SMALL_BODY, type Route } from './route.ts';
import { scenarioParams } from './scenarios.routes.ts';

export function revisionRoutes(revisions: RevisionsService): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: '/api/v1/scenarios/:scenarioId/revisions',
      policy: READ,
      params: scenarioParams,
      query: revisionListQuerySchema,
      input: NO_INPUT,
      output: revisionPageSchema,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: 'Revisions of a scenario; `q` looks in their notes.',
      handler: async ({ who, params, query }) =>
        presentPage(await revisions.list(who, params.scenarioId, query), presentRevision),
    }),
    defineRoute({
      method: 'get',
      path: '/api/v1/scenarios/:scenarioId/revisions/:revision',
      policy: READ,
      params: revisionParamsSchema,
      query: NO_QUERY,
      input: NO_INPUT,
      output: revisionDetailSchema,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: 'A revision with its document.',
      handler: async ({ who, params }) =>
        presentRevisionDetail(await revisions.get(who, params.scenarioId, params.revision)),
    }),
    defineRoute({
      method: 'post',
      path: '/api/v1/scenarios/:scenarioId/revisions/:revision/restore',
      policy: EDIT,
      params: revisionParamsSchema,
      query: NO_QUERY,
      input: restoreRevisionSchema,
      output: scenarioDetailSchema,
      success: 200,
      statuses: [409],
      limits: SMALL_BODY,
      summary: 'Makes a new revision with the document of an earlier one.',
      handler: async ({ who, params, input }) =>
        presentScenarioDetail(await revisions.restore(who, params.scenarioId, params.revision, input)),
    }),
  ];
}

/** What is worked out from stored revisions. */
export function comparisonRoutes(revisions: RevisionsService): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: '/api/v1/scenarios/:scenarioId/revisions/:revision/forecast',
      policy: READ,
      params: revisionParamsSchema,
      query: NO_QUERY,
      input: NO_INPUT,
      output: forecastSchema,
      success: 200,
      statuses: [400],
      limits: NO_BODY,
      summary: 'The forecast of a stored revision.',
      handler: ({ who, params }) => revisions.forecast(who, params.scenarioId, params.revision),
    }),
    defineRoute({
      method: 'get',
      path: '/api/v1/scenarios/:scenarioId/diff',
      policy: READ,
      params: scenarioParams,
      query: diffQuerySchema,
      input: NO_INPUT,
      output: diffSchema,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: 'What changed between two revisions.',
      handler: async ({ who, params, query }) => ({
        ...query,
        changes: await revisions.diff(who, params.scenarioId, query),
      }),
    }),
  ];
}

export function forecastRoutes(forecasts: ForecastService): Route[] {
  return [
    defineRoute({
      method: 'post',
      path: '/api/v1/forecast',
      policy: READ,
      params: NO_PARAMS,
      query: NO_QUERY,
      input: forecastRequestSchema,
      output: forecastSchema,
      success: 200,
      statuses: [],
      limits: DOCUMENT_BODY,
      summary: 'The forecast of a document that need not be stored.',
      handler: ({ input }) => forecasts.compute(input.document, 'document'),
    }),
  ];
}
