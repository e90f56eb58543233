import { z } from 'zod';
import { cellSchema, climateSchema, partSchema } from '../scenario.schema.ts';
import {
  listQuerySchema,
  nameSchema,
  noteSchema,
  pageSchema,
  timestampSchema,
  uuidSchema,
  versionSchema,
} from './common.ts';

export const libraryKindSchema = z.enum(['part', 'cell', 'climate']);
export type LibraryKind = z.infer<typeof libraryKindSchema>;

/** Content of a library item by kind. A climate is stored without its start month and storage, which belong to a scenario. */
export const libraryContentSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('part'), part: partSchema }),
  z.strictObject({ kind: z.literal('cell'), cell: cellSchema }),
  z.strictObject({ kind: z.literal('climate'), climate: climateSchema.omit({ startMonth: true, storage: true }) }),
]);
export type LibraryContent = z.infer<typeof libraryContentSchema>;

const itemFields = {
  /** UUID for the workspace's own items, a readable key such as `cell:CR2032` for catalogue items. */
  id: z.string(),
  origin: z.enum(['workspace', 'catalogue']),
  name: z.string(),
  note: z.string(),
  content: libraryContentSchema,
  /** Null for catalogue items, which cannot be changed. */
  version: z.int().nullable(),
  archivedAt: timestampSchema.nullable(),
  updatedAt: timestampSchema.nullable(),
};
export const libraryItemSchema = z.strictObject(itemFields);
export type LibraryItem = z.infer<typeof libraryItemSchema>;

/** `origin=all` puts the workspace's own items and the catalogue's into one list. */
export const libraryListQuerySchema = listQuerySchema(['name', '-name', 'updatedAt', '-updatedAt'], 'name').extend({
  kind: libraryKindSchema.optional(),
  origin: z.enum(['workspace', 'catalogue', 'all']).default('all'),
});
export const libraryPageSchema = pageSchema(libraryItemSchema);

export const createLibraryItemSchema = z.strictObject({
  name: nameSchema,
  note: noteSchema.default(''),
  content: libraryContentSchema,
});
export type CreateLibraryItem = z.input<typeof createLibraryItemSchema>;

export const updateLibraryItemSchema = z.strictObject({
  version: versionSchema,
  name: nameSchema.optional(),
  note: noteSchema.optional(),
  content: libraryContentSchema.optional(),
  archived: z.boolean().optional(),
});
export type UpdateLibraryItem = z.infer<typeof updateLibraryItemSchema>;
export const libraryItemParamsSchema = z.strictObject({ itemId: uuidSchema });
