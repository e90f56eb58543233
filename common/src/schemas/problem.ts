import { z } from 'zod';
import { EngineErrors, type EngineError, type StateMove } from '#common/errors.ts';

/** One problem of an input: where, as `node.parts[0].name`, and what is wrong in words. */
export interface InputProblem {
  path: string;
  message: string;
  /** Of a part that cannot get from one state to another: which. */
  move?: StateMove;
}

/** Body of every error answer, `application/problem+json` (RFC 9457). */
export const problemSchema = z.strictObject({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  code: z.string(),
  detail: z.string().optional(),
  requestId: z.string(),
  errors: z.array(
    z.strictObject({
      path: z.string(),
      message: z.string(),
      move: z.strictObject({ partId: z.string(), fromStateId: z.string(), toStateId: z.string() }).optional(),
    }),
  ),
  /** With code `conflict`: what is stored now, so that nothing is lost. */
  current: z.unknown().optional(),
  /** With code `conflict`: what was sent. */
  yours: z.unknown().optional(),
});
export type Problem = z.infer<typeof problemSchema>;

/** Joins path segments as `a.b[2].c`. */
export function joinPath(segments: readonly PropertyKey[]): string {
  return segments.reduce<string>((path, segment) => {
    if (typeof segment === 'number') return `${path}[${segment}]`;
    return path === '' ? String(segment) : `${path}.${String(segment)}`;
  }, '');
}

/** Splits `a.b[2].c` into its segments, numbers for indices. */
export function splitPath(path: string): (string | number)[] {
  return [...path.matchAll(/\[(\d+)\]|([^.[\]]+)/g)].map(([, index, key]) =>
    index === undefined ? (key ?? '') : Number(index),
  );
}

/** Every problem of a zod error, unions told by their best matching branch, unknown keys by their own path. */
export function problemsOfZod(error: z.ZodError): InputProblem[] {
  return error.issues.flatMap((issue) => problemsOfIssue(issue, []));
}

/** Every problem of an engine error, prefixed where the engine's input is part of a larger body. */
export function problemsOfEngine(error: EngineError, prefix = ''): InputProblem[] {
  const errors = error instanceof EngineErrors ? error.errors : [error];
  return errors.map(({ field, message, move }) => ({
    path: [prefix, field].filter(Boolean).join('.'),
    message,
    ...(move === undefined ? {} : { move }),
  }));
}

function problemsOfIssue(issue: z.core.$ZodIssue, parent: readonly PropertyKey[]): InputProblem[] {
  const path = [...parent, ...issue.path];
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({ path: joinPath([...path, key]), message: 'This key is not known here.' }));
  }
  if (issue.code === 'invalid_union' && issue.errors.length > 0) {
    const best = issue.errors.reduce((a, b) => (b.length < a.length ? b : a));
    return best.flatMap((inner) => problemsOfIssue(inner, path));
  }
  return [{ path: joinPath(path), message: issue.message }];
}
