import type { Cell, Part, Provenance } from '#common/engine/scenario/scenario.types.ts';
import type { LibraryContent } from '#common/schemas/api/library.ts';

/** Where a figure of a catalogue entry comes from that has no place for it in the document, such as a table. */
export interface FigureOrigin {
  /** Path in the entry, such as `openCircuitTableV`. */
  path: string;
  provenance: Provenance;
}

export type CatalogueClimate = Extract<LibraryContent, { kind: 'climate' }>['climate'];

interface Entry {
  /** Kind and key, such as `cell:CR2032`; never changed once published. */
  id: string;
  name: string;
  /** What the entry is, what it is not, and where the figures come from. */
  note: string;
}

export interface CatalogueCell extends Entry {
  cell: Cell;
  origins: FigureOrigin[];
}

export interface CataloguePart extends Entry {
  part: Part;
}

export interface CatalogueClimateEntry extends Entry {
  climate: CatalogueClimate;
}
