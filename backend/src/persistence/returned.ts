import { z } from 'zod';

/** The number in a column of the single row that a statement returned; null when it touched none. */
export function returnedNumber(raw: unknown, column: string): number | null {
  const [row] = z.array(z.record(z.string(), z.unknown())).max(1).parse(raw);
  return row === undefined ? null : z.int().parse(row[column]);
}
