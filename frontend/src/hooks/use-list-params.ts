import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';

export interface ListParams {
  page: number;
  sort: string;
  q: string;
  archived: string;
  /** Of the library: whose items. */
  origin: string;
}

export type SetListParams = (change: Partial<ListParams>) => void;

/** Page, order, search text and archive filter of a list, kept in the address so that back, reload and links keep them. */
export function useListParams(defaultSort: string): [ListParams, SetListParams] {
  const [search, setSearch] = useSearchParams();
  const params = useMemo<ListParams>(
    () => ({
      page: Math.max(1, Math.trunc(Number(search.get('page') ?? '1')) || 1),
      sort: search.get('sort') ?? defaultSort,
      q: search.get('q') ?? '',
      archived: search.get('archived') === 'true' ? 'true' : 'false',
      origin: search.get('origin') ?? 'all',
    }),
    [search, defaultSort],
  );
  const setParams = useCallback<SetListParams>(
    (change) => {
      setSearch(
        (before) => {
          const next = new URLSearchParams(before);
          // Any other choice leads back to the first page, unless a page was what changed.
          for (const [key, value] of Object.entries({ page: 1, ...change })) {
            const isDefault =
              value === '' ||
              value === 1 ||
              value === 'false' ||
              value === 'all' ||
              (key === 'sort' && value === defaultSort);
            if (isDefault) next.delete(key);
            else next.set(key, String(value));
          }
          return next;
        },
        { replace: change.q !== undefined },
      );
    },
    [setSearch, defaultSort],
  );
  return [params, setParams];
}
