import { z } from 'zod';
import {
  listQuerySchema,
  nameSchema,
  noteSchema,
  pageSchema,
  timestampSchema,
  uuidSchema,
  versionSchema,
} from './common.ts';

export const projectSchema = z.strictObject({
  id: uuidSchema,
  name: z.string(),
  description: z.string(),
  version: z.int(),
  scenarioCount: z.int(),
  archivedAt: timestampSchema.nullable(),
  createdAt: timestampSchema,
  updatedAt: timestampSchema,
});
export type Project = z.infer<typeof projectSchema>;

export const projectListQuerySchema = listQuerySchema(
  ['name', '-name', 'updatedAt', '-updatedAt', 'createdAt', '-createdAt'],
  '-updatedAt',
);
export const projectPageSchema = pageSchema(projectSchema);

export const createProjectSchema = z.strictObject({ name: nameSchema, description: noteSchema.default('') });
export type CreateProject = z.input<typeof createProjectSchema>;

/** Archiving hides a project; setting `archived` to false undoes it. */
export const updateProjectSchema = z.strictObject({
  version: versionSchema,
  name: nameSchema.optional(),
  description: noteSchema.optional(),
  archived: z.boolean().optional(),
});
export type UpdateProject = z.infer<typeof updateProjectSchema>;
