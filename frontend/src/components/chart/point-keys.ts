/**
 * The point of a chart that a key leads to; null for a key that leads nowhere.
 *
 * @param page points that Page Up and Page Down pass; absent: they lead nowhere
 */
export function pointAfterKey(
  key: string,
  { from, last, page }: { from: number; last: number; page?: number },
): number | null {
  const targets: Record<string, number> = {
    ArrowRight: from + 1,
    ArrowUp: from + 1,
    ArrowLeft: from - 1,
    ArrowDown: from - 1,
    Home: 0,
    End: last,
    ...(page === undefined ? {} : { PageUp: from + page, PageDown: from - page }),
  };
  const next = targets[key];
  return next === undefined ? null : Math.max(0, Math.min(last, next));
}
