/** Whether two JSON values are equal; key order does not count, and a key that is undefined counts as absent. */
export function isSameValue(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false;
  if (Array.isArray(a) || Array.isArray(b)) {
    return (
      Array.isArray(a) &&
      Array.isArray(b) &&
      a.length === b.length &&
      a.every((item, index) => isSameValue(item, b[index]))
    );
  }
  const left = definedEntries(a);
  const right = new Map(definedEntries(b));
  return (
    left.length === right.size && left.every(([key, value]) => right.has(key) && isSameValue(value, right.get(key)))
  );
}

function definedEntries(value: object): [string, unknown][] {
  return Object.entries(value).filter(([, item]) => item !== undefined);
}
