import type { Cell, Part } from '#common/engine/scenario/scenario.types.ts';
import { InconsistentInputError } from '#common/errors.ts';
import type { LibraryItem } from '#common/schemas/api/library.ts';
import { libraryItemSchema } from '#common/schemas/api/library.ts';
import { cellSchema, climateSchema, partSchema } from '#common/schemas/scenario.schema.ts';
import type { CatalogueClimate } from './catalogue.types.ts';
import { CATALOGUE_CELLS } from './cells.ts';
import { CATALOGUE_CLIMATES } from './climates.ts';
import { CATALOGUE_PARTS } from './parts.ts';

const catalogueClimateSchema = climateSchema.omit({ startMonth: true, storage: true });

/** Fields that only a workspace's own items have. Parsing makes the copies that the functions below return. */
const FIXED = { origin: 'catalogue', version: null, archivedAt: null, updatedAt: null } as const;

const ITEMS: readonly LibraryItem[] = [
  ...CATALOGUE_PARTS.map(({ id, name, note, part }) => ({
    ...FIXED,
    id,
    name,
    note,
    content: { kind: 'part' as const, part },
  })),
  ...CATALOGUE_CELLS.map(({ id, name, note, cell }) => ({
    ...FIXED,
    id,
    name,
    note,
    content: { kind: 'cell' as const, cell },
  })),
  ...CATALOGUE_CLIMATES.map(({ id, name, note, climate }) => ({
    ...FIXED,
    id,
    name,
    note,
    content: { kind: 'climate' as const, climate },
  })),
];

/**
 * Everything that comes with the program: parts, cells and climates, in the form of library items.
 *
 * @returns Copies, so that a caller may change what it gets.
 * @example catalogueItems().some((item) => item.id === 'cell:CR2032') // true
 */
export function catalogueItems(): LibraryItem[] {
  return ITEMS.map((item) => libraryItemSchema.parse(item));
}

/**
 * One item of the catalogue.
 *
 * @param id Such as `cell:CR2032`, `climate:oceanic-orchard` or `part:transceiver-2450`.
 * @returns A copy, or null when there is none.
 * @example catalogueItem('cell:LR6')?.name // 'LR6'
 */
export function catalogueItem(id: string): LibraryItem | null {
  const item = ITEMS.find((candidate) => candidate.id === id);
  return item ? libraryItemSchema.parse(item) : null;
}

const missing = (id: string): InconsistentInputError =>
  new InconsistentInputError(`The catalogue has no "${id}".`, { code: 'not-found', field: 'id', value: id });

/**
 * A cell of the catalogue.
 *
 * @param designation IEC designation such as `CR2032` or `LR6`.
 * @returns A copy.
 * @throws InconsistentInputError if there is none.
 * @example catalogueCell('CR2032').capacityC.typical // 810
 */
export function catalogueCell(designation: string): Cell {
  const entry = CATALOGUE_CELLS.find(({ cell }) => cell.designation === designation);
  if (!entry) throw missing(`cell:${designation}`);
  return cellSchema.parse(entry.cell);
}

/**
 * A part of the catalogue under an id of its own in a node.
 *
 * @param key Key without `part:`, such as `controller-low-power`.
 * @param id Id in the node; default the key.
 * @returns A copy.
 * @throws InconsistentInputError if there is none.
 * @example cataloguePart('transceiver-2450', 'radio').id // 'radio'
 */
export function cataloguePart(key: string, id: string = key): Part {
  const entry = CATALOGUE_PARTS.find((candidate) => candidate.id === `part:${key}`);
  if (!entry) throw missing(`part:${key}`);
  return partSchema.parse({ ...entry.part, id });
}

/**
 * A climate of the catalogue, still without start month and storage.
 *
 * @param key Key without `climate:`, such as `oceanic-orchard`.
 * @returns A copy.
 * @throws InconsistentInputError if there is none.
 * @example catalogueClimate('cold-store').months.length // 12
 */
export function catalogueClimate(key: string): CatalogueClimate {
  const entry = CATALOGUE_CLIMATES.find((candidate) => candidate.id === `climate:${key}`);
  if (!entry) throw missing(`climate:${key}`);
  return catalogueClimateSchema.parse(entry.climate);
}
