import { LIMITS } from '#common/schemas/limits.ts';

/**
 * An id that is readable, unique among those taken, and the same for the same input. It is made from the name,
 * because ids appear in paths and exported files.
 */
export function uniqueId(name: string, taken: Iterable<string>, fallback: string): string {
  const used = new Set(taken);
  const base = slug(name) || fallback;
  if (!used.has(base)) return base;
  let count = 2;
  while (used.has(`${base}-${count}`)) count += 1;
  return `${base}-${count}`;
}

/** A name that is not among those taken: "Radio", "Radio 2", "Radio 3"; never longer than a name may be. */
export function uniqueName(name: string, taken: Iterable<string>): string {
  const used = new Set(taken);
  const trimmed = name.trim().slice(0, LIMITS.nameLength);
  if (!used.has(trimmed)) return trimmed;
  const base = trimmed.replace(/ \d+$/, '');
  let count = 2;
  while (used.has(numbered(base, count))) count += 1;
  return numbered(base, count);
}

function numbered(base: string, count: number): string {
  const suffix = ` ${count}`;
  return base.slice(0, LIMITS.nameLength - suffix.length).trimEnd() + suffix;
}

const RESERVED = new Set(['constructor', 'prototype']);

function slug(name: string): string {
  const plain = name
    .normalize('NFKD')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+/, '')
    // Room for the counter behind it.
    .slice(0, LIMITS.idLength - 8)
    .replace(/-+$/, '');
  return RESERVED.has(plain) ? '' : plain;
}
