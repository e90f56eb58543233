import { useRef, useState, type KeyboardEvent } from 'react';
import type { LibraryItem, LibraryKind } from '#common/schemas/api/library.ts';
import { SearchField } from '#frontend/components/search-field.tsx';
import { wordsOfError } from '#frontend/lib/form-errors.ts';
import { useLibrarySearch } from '../api/find-library.ts';

interface LibraryPickerProps {
  kind: LibraryKind;
  label: string;
  describe: (item: LibraryItem) => string;
  onPick: (item: LibraryItem) => void;
}

/** Finds something in the library and the catalogue while one types; arrow keys go through what was found. */
export function LibraryPicker({ kind, label, describe, onPick }: LibraryPickerProps) {
  const [q, setQ] = useState('');
  const list = useRef<HTMLUListElement>(null);
  const { data, error, isPending } = useLibrarySearch(kind, q);
  const handleKeyDown = (event: KeyboardEvent<HTMLElement>): void => {
    const places = event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : 0;
    const buttons = [...(list.current?.querySelectorAll('button') ?? [])];
    if (places === 0 || buttons.length === 0) return;
    event.preventDefault();
    const at = buttons.findIndex((button) => button === document.activeElement);
    buttons[Math.max(0, Math.min(buttons.length - 1, at + places))]?.focus();
  };
  return (
    <div onKeyDown={handleKeyDown}>
      <SearchField label={label} value={q} onChange={setQ} />
      <ul
        ref={list}
        aria-label={label}
        aria-busy={isPending}
        className="mt-3 h-72 overflow-y-auto border-y border-hair"
      >
        {data?.items.map((item) => (
          <li key={item.id} className="border-b border-hair last:border-b-0">
            <button
              type="button"
              onClick={() => onPick(item)}
              className="flex w-full flex-wrap items-baseline justify-between gap-x-4 px-1 py-2 text-left hover:bg-accent-soft focus-visible:outline-offset-[-2px]"
            >
              <span className="font-semibold">{item.name}</span>
              <span className="text-small text-muted">
                {describe(item)}
                {item.origin === 'workspace' && ', from your library'}
              </span>
            </button>
          </li>
        ))}
        {data?.items.length === 0 && <li className="py-3 text-muted">Nothing found. Another word may help.</li>}
        {error && <li className="py-3 text-rust">{wordsOfError(error)}</li>}
      </ul>
    </div>
  );
}
