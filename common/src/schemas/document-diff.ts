import type { Change } from './api/scenarios.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { joinPath } from './problem.ts';
import { labelOf } from './document-labels.ts';

type Path = readonly (string | number)[];
type Fields = Readonly<Record<string, unknown>>;

interface Item {
  key: string;
  index: number;
  value: Fields;
}

interface Comparison {
  from: Scenario;
  to: Scenario;
  changes: Change[];
}

/**
 * What changed from one scenario document to another, in the order of the later one. Items of lists are matched by their
 * id (transitions by the states they join), so an item that only moved is told as moved and not as changed. Of an item that
 * is new or gone the whole value is told, not its fields.
 */
export function diffDocuments(from: Scenario, to: Scenario): Change[] {
  const comparison: Comparison = { from, to, changes: [] };
  compareValues(comparison, { path: [], earlierPath: [] }, from, to);
  return comparison.changes;
}

/** Where a value stands in the later document, and where its counterpart stands in the earlier one. */
interface Place {
  path: Path;
  earlierPath: Path;
}

function compareValues(comparison: Comparison, place: Place, before: unknown, after: unknown): void {
  if (Object.is(before, after)) return;
  const items = itemsOf(before, after);
  if (items !== null) return compareItems(comparison, place, ...items);
  if (isFields(before) && isFields(after) && sameKind(before, after)) {
    return compareFields(comparison, place, before, after);
  }
  if (isEqual(before, after)) return;
  if (before === undefined) report(comparison, 'added', place, { after });
  else if (after === undefined) report(comparison, 'removed', place, { before });
  else report(comparison, 'changed', place, { before, after });
}

function compareFields(comparison: Comparison, place: Place, before: Fields, after: Fields): void {
  const keys = new Set([...Object.keys(after), ...Object.keys(before)]);
  for (const key of keys) {
    compareValues(comparison, below(place, key, key), before[key], after[key]);
  }
}

function compareItems(comparison: Comparison, place: Place, before: readonly Item[], after: readonly Item[]): void {
  const earlierByKey = new Map(before.map((item) => [item.key, item]));
  const laterKeys = new Set(after.map(({ key }) => key));
  const stable = longestStableRun(before, after);
  for (const item of after) {
    const earlier = earlierByKey.get(item.key);
    if (earlier === undefined) {
      report(comparison, 'added', below(place, item.index, item.index), { after: item.value });
      continue;
    }
    const at = below(place, item.index, earlier.index);
    if (!stable.has(item.key)) report(comparison, 'moved', at, { before: earlier.index, after: item.index });
    compareValues(comparison, at, earlier.value, item.value);
  }
  for (const { key, index, value } of before) {
    if (!laterKeys.has(key)) report(comparison, 'removed', below(place, index, index), { before: value });
  }
}

/** Keys of the most items that kept their order; the others are the ones that moved. */
function longestStableRun(before: readonly Item[], after: readonly Item[]): Set<string> {
  const laterIndex = new Map(after.map(({ key, index }) => [key, index]));
  const position = (key: string | undefined): number => laterIndex.get(key ?? '') ?? -1;
  const longest = (runs: readonly string[][]): string[] =>
    runs.reduce<string[]>((best, run) => (run.length > best.length ? run : best), []);
  const runs: string[][] = [];
  for (const { key } of before) {
    if (laterIndex.has(key)) runs.push([...longest(runs.filter((run) => position(run.at(-1)) < position(key))), key]);
  }
  return new Set(longest(runs));
}

function report(
  comparison: Comparison,
  kind: Change['kind'],
  { path, earlierPath }: Place,
  values: { before?: unknown; after?: unknown },
): void {
  const [document, at] = kind === 'removed' ? [comparison.from, earlierPath] : [comparison.to, path];
  comparison.changes.push({ kind, path: joinPath(at), label: labelOf(document, at), ...values });
}

function below({ path, earlierPath }: Place, key: string | number, earlierKey: string | number): Place {
  return { path: [...path, key], earlierPath: [...earlierPath, earlierKey] };
}

function isFields(value: unknown): value is Fields {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/** Variants of a union, such as two kinds of schedule, are told whole; a part that changes its kind stays that part. */
function sameKind(before: Fields, after: Fields): boolean {
  const isPart = 'restStateId' in before && 'restStateId' in after;
  return isPart || (before['kind'] === after['kind'] && before['pattern'] === after['pattern']);
}

/** Items of two lists with the keys that match them; null when the lists are told whole, as tables of numbers are. */
function itemsOf(before: unknown, after: unknown): [Item[], Item[]] | null {
  if (!isListOfFields(before) || !isListOfFields(after)) return null;
  const all = [...before, ...after];
  if (all.length === 0) return null;
  const keyOf = KEYS.find((key) => all.every((item) => key(item, 0) !== null));
  if (keyOf === undefined) return null;
  return [keyed(before, keyOf), keyed(after, keyOf)];
}

type Key = (item: Fields, index: number) => string | null;

/** By id; transitions by the states they join; anything else by its place. */
const KEYS: readonly Key[] = [
  ({ id }) => (typeof id === 'string' ? id : null),
  ({ fromStateId, toStateId }) =>
    typeof fromStateId === 'string' && typeof toStateId === 'string' ? `${fromStateId} ${toStateId}` : null,
  (_, index) => String(index),
];

function keyed(list: readonly Fields[], keyOf: Key): Item[] {
  const counts = new Map<string, number>();
  return list.map((value, index) => {
    const key = keyOf(value, index) ?? '';
    const count = counts.get(key) ?? 0;
    counts.set(key, count + 1);
    return { key: `${key} ${count}`, index, value };
  });
}

function isListOfFields(value: unknown): value is readonly Fields[] {
  return Array.isArray(value) && value.every(isFields);
}

function isEqual(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (Array.isArray(a) && Array.isArray(b)) {
    return a.length === b.length && a.every((item, index) => isEqual(item, b[index]));
  }
  if (!isFields(a) || !isFields(b)) return false;
  const keys = new Set([...Object.keys(a), ...Object.keys(b)]);
  return [...keys].every((key) => isEqual(a[key], b[key]));
}
