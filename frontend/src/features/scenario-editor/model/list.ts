/** Replaces the item with this id; the same list when nothing changes, so that unchanged rows keep their identity. */
export function updateById<T extends { id: string }>(list: T[], id: string, change: (item: T) => T): T[] {
  const index = list.findIndex((item) => item.id === id);
  return updateAt(list, index, change);
}

/** Replaces the item at an index; the same list when the index is out of range or nothing changes. */
export function updateAt<T>(list: T[], index: number, change: (item: T) => T): T[] {
  const item = list[index];
  if (item === undefined) return list;
  const changed = change(item);
  return changed === item ? list : list.with(index, changed);
}

/** Replaces every item; the same list when no item changes. */
export function mapKeeping<T>(list: T[], change: (item: T, index: number) => T): T[] {
  const changed = list.map(change);
  return changed.every((item, index) => item === list[index]) ? list : changed;
}

/** Keeps the items that fit; the same list when all do. */
export function filterKeeping<T>(list: T[], keep: (item: T) => boolean): T[] {
  return list.every(keep) ? list : list.filter(keep);
}

export function insertAt<T>(list: T[], index: number, item: T): T[] {
  return list.toSpliced(index, 0, item);
}

/** Moves an item by some places, held at the ends; the same list when it cannot move. */
export function moveBy<T>(list: T[], index: number, places: number): T[] {
  const item = list[index];
  const target = Math.max(0, Math.min(list.length - 1, index + places));
  if (item === undefined || target === index) return list;
  return list.toSpliced(index, 1).toSpliced(target, 0, item);
}
