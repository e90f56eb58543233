import { LIMITS } from '#common/schemas/limits.ts';
import type { PasteColumn } from './paste.ts';

/** The column that names the rows. */
export function nameColumn<Item extends { name: string }>(header: string): PasteColumn<Item> {
  return {
    key: 'name',
    header,
    read: (text) =>
      text.length > LIMITS.nameLength
        ? { kind: 'problem', message: `This name has ${text.length} characters; at most ${LIMITS.nameLength} fit.` }
        : { kind: 'value', apply: (item) => ({ ...item, name: text }) },
  };
}
