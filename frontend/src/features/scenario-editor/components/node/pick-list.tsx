import type { ReactNode } from 'react';

export interface PickItem {
  id: string;
  name: string;
  note?: string;
  isFaint?: boolean;
}

interface PickListProps {
  label: string;
  items: readonly PickItem[];
  selectedId: string | null;
  onSelect: (id: string) => void;
  /** Alt with up or down on the selected one. */
  onMove?: (id: string, places: number) => void;
  children?: ReactNode;
}

/** A short list of things of which one is shown below: its names in a line, the chosen one bold on a rule. */
export function PickList({ label, items, selectedId, onSelect, onMove, children }: PickListProps) {
  return (
    <ul aria-label={label} className="flex flex-wrap items-end gap-x-6 gap-y-1 border-b border-hair">
      {items.map((item) => {
        const isSelected = item.id === selectedId;
        return (
          <li key={item.id} className="min-w-0">
            <button
              type="button"
              aria-current={isSelected ? 'true' : undefined}
              data-field={`pick.${item.id}`}
              onClick={() => onSelect(item.id)}
              onKeyDown={(event) => {
                const places = event.key === 'ArrowUp' ? -1 : event.key === 'ArrowDown' ? 1 : 0;
                if (!event.altKey || places === 0 || !onMove) return;
                event.preventDefault();
                onMove(item.id, places);
              }}
              className={`-mb-px max-w-72 truncate border-b-2 px-px py-2 text-left ${isSelected ? 'border-accent font-extrabold text-ink' : 'border-transparent text-muted hover:text-ink'} ${item.isFaint ? 'line-through decoration-1' : ''}`}
            >
              {item.name}
              {item.note !== undefined && <span className="ml-2 text-small font-normal text-muted">{item.note}</span>}
            </button>
          </li>
        );
      })}
      {children !== undefined && <li className="ml-auto">{children}</li>}
    </ul>
  );
}
