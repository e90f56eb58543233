import { z } from 'zod';
import { LIMITS } from '../limits.ts';

export const uuidSchema = z.uuid('This is not a valid id.');
export const timestampSchema = z.iso.datetime();
export const nameSchema = z.string().trim().min(1, 'Give it a name.').max(LIMITS.nameLength);
export const noteSchema = z.string().trim().max(LIMITS.noteLength);
/** Version of a row for optimistic concurrency: the one that the client has read. */
export const versionSchema = z.int().min(1);

export const roleSchema = z.enum(['owner', 'engineer', 'sales', 'viewer']);
export type Role = z.infer<typeof roleSchema>;

const wholeNumber = (fallback: number) =>
  z
    .string()
    .regex(/^\d{1,6}$/, 'Must be a whole number.')
    .transform(Number)
    .pipe(z.int())
    .default(fallback);

/** Query of a paged list. `sort` is a field, with a leading hyphen for descending order. */
export function listQuerySchema<const Sort extends string>(sorts: readonly [Sort, ...Sort[]], fallback: NoInfer<Sort>) {
  return z.strictObject({
    page: wholeNumber(1).refine((page) => page >= 1, 'Pages count from 1.'),
    pageSize: wholeNumber(25).refine(
      (size) => size >= 1 && size <= LIMITS.pageSizeMax,
      `Between 1 and ${LIMITS.pageSizeMax}.`,
    ),
    sort: z.enum(sorts).default(fallback as never),
    /** Text that the name contains, case ignored. */
    q: z.string().trim().max(LIMITS.searchLength).default(''),
    archived: z.enum(['true', 'false', 'all']).default('false'),
  });
}

/** Answer of a paged list; `total` counts all pages. */
export function pageSchema<T extends z.ZodType>(item: T) {
  return z.strictObject({
    items: z.array(item),
    page: z.int(),
    pageSize: z.int(),
    total: z.int(),
  });
}

export interface Page<T> {
  items: T[];
  page: number;
  pageSize: number;
  total: number;
}
