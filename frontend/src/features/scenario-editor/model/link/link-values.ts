/** Reads what stands at a dotted key of an object, such as `crystal.startUpS`; undefined where nothing does. */
export function valueAt(object: object | undefined, key: string): unknown {
  let value: unknown = object;
  for (const segment of key.split('.')) {
    if (typeof value !== 'object' || value === null) return undefined;
    value = Reflect.get(value, segment);
  }
  return value;
}

/**
 * The object with another value at a dotted key; `undefined` takes the key away, and with it objects that are then empty.
 * The same object when nothing changes.
 */
export function withValueAt<T extends object>(object: T, key: string, value: unknown): T {
  const [head = '', ...rest] = key.split('.');
  const before: unknown = Reflect.get(object, head);
  const next = rest.length === 0 ? value : nested(before, rest.join('.'), value);
  if (Object.is(before, next)) return object;
  if (next !== undefined) return { ...object, [head]: next };
  const copy = { ...object };
  Reflect.deleteProperty(copy, head);
  return copy;
}

function nested(before: unknown, key: string, value: unknown): object | undefined {
  const object = typeof before === 'object' && before !== null ? before : undefined;
  const next = withValueAt(object ?? {}, key, value);
  if (object && Object.keys(next).length > 0) return next;
  return Object.keys(next).length === 0 ? undefined : next;
}
