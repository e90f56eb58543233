/** Whether two typed values are the same: numbers, texts, nothing, or flat objects of those. */
export function isSameNumbers(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false;
  const left = Object.entries(a).filter(([, value]) => value !== undefined);
  const right = Object.entries(b).filter(([, value]) => value !== undefined);
  return left.length === right.length && left.every(([key, value]) => Object.is(value, Reflect.get(b, key)));
}
