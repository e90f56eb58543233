import { z } from 'zod';
import { scenarioSchema } from '../scenario.schema.ts';
import { SCHEMA_VERSION } from '../limits.ts';
import {
  listQuerySchema,
  nameSchema,
  noteSchema,
  pageSchema,
  timestampSchema,
  uuidSchema,
  versionSchema,
} from './common.ts';

const outcomeSchema = z.enum([
  'charge-exhausted',
  'undervoltage',
  'shelf-life',
  'outlives-horizon',
  'never-starts',
  'oversubscribed',
]);

/** What lists show of the latest revision's forecast; null when its document cannot be computed. */
export const forecastSummarySchema = z.strictObject({
  engineVersion: z.string(),
  outcome: outcomeSchema,
  lifeS: z.number().nullable(),
  endMonth: z.int().nullable(),
  targetLifeS: z.number(),
});
export type ForecastSummary = z.infer<typeof forecastSummarySchema>;

const summaryFields = {
  id: uuidSchema,
  projectId: uuidSchema,
  name: z.string(),
  /** Bumped by every change of the row; sent back with each save. */
  version: z.int(),
  /** Number of the latest revision, from 1. */
  revision: z.int(),
  forecast: forecastSummarySchema.nullable(),
  archivedAt: timestampSchema.nullable(),
  createdAt: timestampSchema,
  updatedAt: timestampSchema,
  updatedBy: z.string(),
};

export const scenarioSummarySchema = z.strictObject(summaryFields);
export type ScenarioSummary = z.infer<typeof scenarioSummarySchema>;

/** A scenario with the document of its latest revision. */
export const scenarioDetailSchema = z.strictObject({
  ...summaryFields,
  projectName: z.string(),
  document: scenarioSchema,
});
export type ScenarioDetail = z.infer<typeof scenarioDetailSchema>;

export const scenarioListQuerySchema = listQuerySchema(
  ['name', '-name', 'updatedAt', '-updatedAt', 'life', '-life'],
  '-updatedAt',
);
export const scenarioPageSchema = pageSchema(scenarioSummarySchema);

export const createScenarioSchema = z.strictObject({ document: scenarioSchema, note: noteSchema.default('') });
export type CreateScenario = z.input<typeof createScenarioSchema>;

/** PUT /scenarios/:id: saves a new revision on top of the version that was read. */
export const saveScenarioSchema = z.strictObject({
  version: versionSchema,
  document: scenarioSchema,
  note: noteSchema.default(''),
});
export type SaveScenario = z.input<typeof saveScenarioSchema>;

export const archiveScenarioSchema = z.strictObject({ version: versionSchema, archived: z.boolean() });

export const duplicateScenarioSchema = z.strictObject({ name: nameSchema, projectId: uuidSchema.optional() });

const revisionFields = {
  scenarioId: uuidSchema,
  revision: z.int(),
  note: z.string(),
  author: z.string(),
  createdAt: timestampSchema,
  /** Revision whose document this one took back, if it was made by restoring. */
  restoredFrom: z.int().nullable(),
  forecast: forecastSummarySchema.nullable(),
};
export const revisionSummarySchema = z.strictObject(revisionFields);
export type RevisionSummary = z.infer<typeof revisionSummarySchema>;
export const revisionDetailSchema = z.strictObject({ ...revisionFields, document: scenarioSchema });
export type RevisionDetail = z.infer<typeof revisionDetailSchema>;
export const revisionListQuerySchema = listQuerySchema(['revision', '-revision'], '-revision');
export const revisionPageSchema = pageSchema(revisionSummarySchema);

export const restoreRevisionSchema = z.strictObject({ version: versionSchema, note: noteSchema.default('') });

const revisionNumber = z
  .string()
  .regex(/^[1-9]\d{0,8}$/, 'Revisions count from 1.')
  .transform(Number);
export const diffQuerySchema = z.strictObject({ from: revisionNumber, to: revisionNumber });
export const revisionParamsSchema = z.strictObject({ scenarioId: uuidSchema, revision: revisionNumber });

/** One difference of two documents. List items are matched by id, so a move is no change of its contents. */
export const changeSchema = z.strictObject({
  kind: z.enum(['added', 'removed', 'changed', 'moved']),
  /** Path in the later document (in the earlier one for 'removed'), such as `node.parts[0].states[2].current.typical`. */
  path: z.string(),
  /** The path in words: names of parts, states, routines and steps. */
  label: z.string(),
  before: z.unknown().optional(),
  after: z.unknown().optional(),
});
export type Change = z.infer<typeof changeSchema>;
export const diffSchema = z.strictObject({ from: z.int(), to: z.int(), changes: z.array(changeSchema) });
export type Diff = z.infer<typeof diffSchema>;

/** File of an exported scenario. */
export const scenarioFileSchema = z.strictObject({
  format: z.literal('overwinter-scenario'),
  schemaVersion: z.literal(SCHEMA_VERSION),
  exportedAt: timestampSchema,
  revision: z.int(),
  scenario: scenarioSchema,
});
export type ScenarioFile = z.infer<typeof scenarioFileSchema>;

export const forecastRequestSchema = z.strictObject({ document: scenarioSchema });
