import { z } from 'zod';
import { problemSchema, type Problem } from '#common/schemas/problem.ts';

interface Answer {
  body: unknown;
}

/** The problem that an answer must be. */
export function problemOf({ body }: Answer): Problem {
  return problemSchema.parse(body);
}

/** Paths of all problems that an answer tells. */
export function pathsOf(answer: Answer): string[] {
  return problemOf(answer).errors.map(({ path }) => path);
}

const page = z.object({
  items: z.array(z.record(z.string(), z.unknown())),
  page: z.int(),
  pageSize: z.int(),
  total: z.int(),
});

/** The page of a list that an answer must be. */
export function pageOf({ body }: Answer): z.infer<typeof page> {
  return page.parse(body);
}

/** One field of every item of a page. */
export function fieldOf(answer: Answer, field: string): unknown[] {
  return pageOf(answer).items.map((item) => item[field]);
}

/** An answer as an object, for sending it again or comparing its fields. */
export function objectOf({ body }: Answer): Record<string, unknown> {
  return z.record(z.string(), z.unknown()).parse(body);
}
