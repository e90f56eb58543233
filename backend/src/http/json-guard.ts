import { LIMITS } from '#common/schemas/limits.ts';
import { joinPath, type InputProblem } from '#common/schemas/problem.ts';

const RESERVED = new Set(['__proto__', 'constructor', 'prototype']);
/** Enough to show; a hostile body could name thousands. */
const MOST_PROBLEMS = 20;

interface Place {
  value: unknown;
  path: (string | number)[];
}

/**
 * Problems that hold for any input, whatever its schema: nesting too deep, keys that reach into object internals, numbers
 * that JSON cannot hold (`1e400` parses as infinity), text that the database cannot store. Walks without recursion.
 */
export function problemsOfJson(root: unknown): InputProblem[] {
  const problems: InputProblem[] = [];
  const stack: Place[] = [{ value: root, path: [] }];
  for (let place = stack.pop(); place && problems.length < MOST_PROBLEMS; place = stack.pop()) {
    const message = problemOf(place);
    if (message !== null) problems.push({ path: joinPath(place.path), message });
    else stack.push(...childrenOf(place).reverse());
  }
  return problems;
}

function problemOf({ value, path }: Place): string | null {
  const key = path.at(-1);
  if (typeof key === 'string') {
    if (RESERVED.has(key)) return 'This key is reserved.';
    if (!isStorable(key)) return 'This key holds characters that cannot be stored.';
  }
  if (typeof value === 'number' && !Number.isFinite(value)) return 'This number is too large.';
  if (typeof value === 'string' && !isStorable(value)) {
    return 'This text holds a NUL or half a surrogate pair, which cannot be stored.';
  }
  const isNested = typeof value === 'object' && value !== null;
  if (isNested && path.length >= LIMITS.jsonDepth) return `Nesting goes deeper than ${LIMITS.jsonDepth} levels.`;
  return null;
}

/** PostgreSQL stores neither NUL nor, in JSON, half a surrogate pair (with `u`, a whole pair is no surrogate). */
function isStorable(text: string): boolean {
  return !text.includes('\0') && !/\p{Surrogate}/u.test(text);
}

function childrenOf({ value, path }: Place): Place[] {
  if (Array.isArray(value)) return value.map((item: unknown, index) => ({ value: item, path: [...path, index] }));
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).map(([key, item]: [string, unknown]) => ({ value: item, path: [...path, key] }));
}
