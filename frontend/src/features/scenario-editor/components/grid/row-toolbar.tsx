import { useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';

interface RowToolbarProps {
  /** Name of the selected row; null when none is. */
  selected: string | null;
  /** What a row is: "step". */
  what: string;
  onMove?: (places: number) => void;
  onDuplicate?: () => void;
  onRemove?: () => void;
  onAdd?: () => void;
  addLabel: string;
  /** Why nothing more can be added. */
  fullText?: string | undefined;
}

const ACTION =
  'min-h-9 rounded-sm px-1 text-muted enabled:hover:text-ink enabled:hover:underline enabled:hover:underline-offset-4 disabled:opacity-50';

/** Actions on the selected row of a table, at one place below it. */
export function RowToolbar({
  selected,
  what,
  onMove,
  onDuplicate,
  onRemove,
  onAdd,
  addLabel,
  fullText,
}: RowToolbarProps) {
  if (useIsReadOnly()) return null;
  const none = selected === null;
  const named = selected ?? `the selected ${what}`;
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-1">
      <button
        type="button"
        onClick={onAdd}
        disabled={fullText !== undefined}
        title={fullText}
        className="min-h-9 rounded-sm font-semibold text-accent enabled:hover:underline enabled:hover:underline-offset-4 disabled:opacity-50"
      >
        + {addLabel}
      </button>
      <div role="group" aria-label={`Selected ${what}`} className="flex flex-wrap items-center gap-x-3 text-small">
        {onMove && (
          <>
            <button
              type="button"
              className={ACTION}
              disabled={none}
              title="Alt + ↑"
              onClick={() => onMove(-1)}
              aria-label={`Move ${named} up`}
            >
              ↑ up
            </button>
            <button
              type="button"
              className={ACTION}
              disabled={none}
              title="Alt + ↓"
              onClick={() => onMove(1)}
              aria-label={`Move ${named} down`}
            >
              ↓ down
            </button>
          </>
        )}
        {onDuplicate && (
          <button
            type="button"
            className={ACTION}
            disabled={none}
            onClick={onDuplicate}
            aria-label={`Duplicate ${named}`}
          >
            duplicate
          </button>
        )}
        {onRemove && (
          <button type="button" className={ACTION} disabled={none} onClick={onRemove} aria-label={`Remove ${named}`}>
            remove
          </button>
        )}
      </div>
    </div>
  );
}
