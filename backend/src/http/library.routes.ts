import {
  createLibraryItemSchema,
  libraryItemParamsSchema,
  libraryItemSchema,
  libraryListQuerySchema,
  libraryPageSchema,
  updateLibraryItemSchema,
} from '#common/schemas/api/library.ts';
import { EDIT, READ } from '#backend/domain/policies.ts';
import type { LibraryService } from '#backend/services/library.service.ts';
import { presentLibraryItem, presentPage } from './presenters.ts';
import { defineRoute, DOCUMENT_BODY, NO_BODY, NO_INPUT, NO_PARAMS, NO_QUERY, type Route } from './route.ts';

export function libraryRoutes(library: LibraryService): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: '/api/v1/library',
      policy: READ,
      params: NO_PARAMS,
      query: libraryListQuerySchema,
      input: NO_INPUT,
      output: libraryPageSchema,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: "Parts, cells and climates: the workspace's own, the catalogue's, or both.",
      handler: async ({ who, query }) => presentPage(await library.list(who, query), presentLibraryItem),
    }),
    defineRoute({
      method: 'post',
      path: '/api/v1/library',
      policy: EDIT,
      params: NO_PARAMS,
      query: NO_QUERY,
      input: createLibraryItemSchema,
      output: libraryItemSchema,
      success: 201,
      statuses: [],
      limits: DOCUMENT_BODY,
      summary: "Adds an item to the workspace's library.",
      handler: async ({ who, input }) => presentLibraryItem(await library.create(who, input)),
    }),
    defineRoute({
      method: 'get',
      path: '/api/v1/library/:itemId',
      policy: READ,
      params: libraryItemParamsSchema,
      query: NO_QUERY,
      input: NO_INPUT,
      output: libraryItemSchema,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: "An item of the workspace's library.",
      handler: async ({ who, params }) => presentLibraryItem(await library.get(who, params.itemId)),
    }),
    defineRoute({
      method: 'patch',
      path: '/api/v1/library/:itemId',
      policy: EDIT,
      params: libraryItemParamsSchema,
      query: NO_QUERY,
      input: updateLibraryItemSchema,
      output: libraryItemSchema,
      success: 200,
      statuses: [409],
      limits: DOCUMENT_BODY,
      summary: 'Changes an item of the version that was read.',
      handler: async ({ who, params, input }) => presentLibraryItem(await library.update(who, params.itemId, input)),
    }),
  ];
}
