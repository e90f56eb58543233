import type { Scenario } from '#common/engine/scenario/scenario.types.ts';

export interface PasteCell {
  text: string;
  /** What is wrong and what would be right; null when the cell can be taken. */
  problem: string | null;
}

export interface PasteRow {
  cells: PasteCell[];
  /** Name of the row that it goes into, or null for one that will be added. */
  into: string | null;
}

export interface PastePreview {
  headers: string[];
  rows: PasteRow[];
  /** Rows that the limits leave no room for. */
  dropped: number;
  /** Takes every cell without a problem over into the document, as one step. */
  apply: (scenario: Scenario) => Scenario;
}

/** What a cell's text means in its column. */
export type CellResult<Item> = { kind: 'value'; apply: (item: Item) => Item } | { kind: 'problem'; message: string };

export interface PasteColumn<Item> {
  key: string;
  header: string;
  read: (text: string, item: Item) => CellResult<Item>;
}

export interface PasteInto<Item> {
  columns: PasteColumn<Item>[];
  items: readonly Item[];
  nameOf: (item: Item) => string;
  /** A row to be added, by its number from 1. */
  blank: (count: number) => Item;
  limit: number;
}

/** Splits text from a spreadsheet into cells; quotes around cells with line breaks are understood. */
export function splitBlock(text: string): string[][] {
  const rows: string[][] = [[]];
  const cells = text.replace(/\r\n?/g, '\n').matchAll(/(?:"((?:[^"]|"")*)"|([^\t\n]*))(\t|\n|$)/g);
  for (const [, quoted, plain = '', end] of cells) {
    rows.at(-1)?.push((quoted?.replaceAll('""', '"') ?? plain).trim());
    if (end === '\n') rows.push([]);
    if (end === '') break;
  }
  return rows.filter((row) => row.some((cell) => cell !== ''));
}

export interface PasteResult<Item> {
  headers: string[];
  rows: PasteRow[];
  dropped: number;
  /** Every item of the table afterwards, in order. */
  items: Item[];
}

/** Lays a block over a table from a cell on: rows below the last are added, empty cells leave what is there. */
export function layBlock<Item>(
  into: PasteInto<Item>,
  block: readonly string[][],
  start: { row: number; column: string },
): PasteResult<Item> {
  const first = Math.max(
    0,
    into.columns.findIndex(({ key }) => key === start.column),
  );
  const columns = into.columns.slice(first);
  const body = isHeader(block[0], columns) ? block.slice(1) : block;
  const width = Math.max(0, ...body.map((row) => row.length));
  const items = [...into.items];
  const rows: PasteRow[] = [];
  let dropped = 0;
  body.forEach((texts, offset) => {
    const index = start.row + offset;
    if (index >= into.limit) {
      dropped += 1;
      return;
    }
    const existing = into.items[index];
    const result = readRow(columns, texts, existing ?? into.blank(offset + 1));
    items[index] = result.item;
    rows.push({ cells: result.cells, into: existing === undefined ? null : into.nameOf(existing) });
  });
  const headers = Array.from({ length: width }, (_, at) => columns[at]?.header ?? '');
  return { headers, rows, dropped, items };
}

function isHeader<Item>(row: readonly string[] | undefined, columns: readonly PasteColumn<Item>[]): boolean {
  if (!row) return false;
  const matches = row.filter((text, at) => {
    const header = columns[at]?.header.toLowerCase();
    return (
      header !== undefined &&
      text !== '' &&
      (header.startsWith(text.toLowerCase()) || text.toLowerCase().startsWith(header))
    );
  });
  return matches.length >= Math.max(1, Math.ceil(row.length / 2));
}

function readRow<Item>(columns: readonly PasteColumn<Item>[], texts: readonly string[], item: Item) {
  const cells: PasteCell[] = [];
  let current = item;
  texts.forEach((text, at) => {
    const column = columns[at];
    if (!column) {
      cells.push({ text, problem: text === '' ? null : 'There is no column here; this cell is left out.' });
      return;
    }
    if (text === '') {
      cells.push({ text, problem: null });
      return;
    }
    const result = column.read(text, current);
    if (result.kind === 'value') current = result.apply(current);
    cells.push({ text, problem: result.kind === 'problem' ? result.message : null });
  });
  return { item: current, cells };
}

/** The word of a list that a text means, ignoring case; a unique beginning is enough. */
export function matchWord<T extends { value: string; label: string }>(words: readonly T[], text: string): T | null {
  const wanted = text.trim().toLowerCase();
  const exact = words.find(({ label, value }) => label.toLowerCase() === wanted || value.toLowerCase() === wanted);
  if (exact) return exact;
  const beginning = words.filter(({ label }) => label.toLowerCase().startsWith(wanted));
  return beginning.length === 1 ? (beginning[0] ?? null) : null;
}
