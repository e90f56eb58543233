/** Shared limits of documents and requests; forms, API and database agree on them. */
export const LIMITS = {
  nameLength: 120,
  noteLength: 2_000,
  provenanceLength: 500,
  idLength: 64,
  parts: 32,
  statesPerPart: 32,
  transitionsPerPart: 128,
  leakages: 32,
  routines: 40,
  stepsPerRoutine: 200,
  tableRows: 200,
  jsonDepth: 32,
  documentBytes: 512 * 1024,
  emailLength: 254,
  passwordMinLength: 12,
  passwordMaxLength: 128,
  pageSizeMax: 100,
  searchLength: 200,
} as const;

export const SCHEMA_VERSION = 1;
