import type { ClipboardEvent, FocusEvent, ReactNode } from 'react';
import { handleGridKey, type GridKeyHandlers } from './grid-keys.ts';
import { GridMessage } from './grid-message.tsx';

export interface GridColumn {
  key: string;
  header: ReactNode;
  /** Any CSS width. */
  width?: string;
  isNumber?: boolean;
}

/** A block of cells as it came from a spreadsheet, and the cell it was pasted into. */
export interface PastedBlock {
  text: string;
  rowId: string;
  column: string;
}

export interface EditGridProps extends GridKeyHandlers {
  /** Names the table and its scrolling region. */
  label: string;
  columns: readonly GridColumn[];
  /** Prefix of the field keys inside, to show what is wrong with them. */
  fieldPrefix: string;
  /** Rows: `<GridRow>`. */
  children: ReactNode;
  onSelectRow?: (rowId: string) => void;
  onPasteBlock?: (block: PastedBlock) => void;
  /** Actions on the selected row, and below the table what adds one. */
  footer?: ReactNode;
}

/** A table that is edited like a spreadsheet. On a narrow page it scrolls sideways with its first column in place. */
export function EditGrid({ label, columns, fieldPrefix, children, footer, ...handlers }: EditGridProps) {
  const { onMoveRow, onAddRow, onSelectRow, onPasteBlock } = handlers;
  const handleFocus = (event: FocusEvent<HTMLElement>): void => {
    const rowId = event.target.closest<HTMLElement>('[data-row]')?.dataset['row'];
    if (rowId !== undefined) onSelectRow?.(rowId);
  };
  const handlePaste = (event: ClipboardEvent<HTMLElement>): void => {
    const block = onPasteBlock && blockOf(event);
    if (!block) return;
    event.preventDefault();
    onPasteBlock(block);
  };
  return (
    <div>
      <div
        role="region"
        aria-label={`${label}, scrolls sideways`}
        tabIndex={0}
        className="relative overflow-x-auto focus-visible:outline-offset-[-2px]"
      >
        <table
          aria-label={label}
          className="w-full border-collapse text-left"
          onKeyDown={(event) => handleGridKey(event, { onMoveRow, onAddRow })}
          onFocus={handleFocus}
          onPaste={handlePaste}
        >
          <thead>
            <tr className="border-b border-line align-bottom">
              {columns.map((column, index) => (
                <th
                  key={column.key}
                  scope="col"
                  style={{ minWidth: index === 0 ? `min(${column.width}, 38vw)` : column.width, width: column.width }}
                  className={`px-1.5 py-1.5 text-small font-normal text-muted ${column.isNumber ? 'text-right' : ''} ${index === 0 ? PINNED : ''}`}
                >
                  {column.header}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>{children}</tbody>
        </table>
      </div>
      <GridMessage fieldPrefix={fieldPrefix} />
      {footer}
    </div>
  );
}

const PINNED = 'sticky left-0 z-10 bg-paper';

/** First cell of a row that has no name of its own. */
export const PINNED_CELL = `${PINNED} p-0 font-normal group-data-selected/row:bg-accent-soft`;

export interface GridRowProps {
  rowId: string;
  isSelected?: boolean;
  children: ReactNode;
}

export function GridRow({ rowId, isSelected = false, children }: GridRowProps) {
  return (
    <tr
      data-row={rowId}
      data-selected={isSelected || undefined}
      className="group/row border-b border-hair data-selected:bg-accent-soft"
    >
      {children}
    </tr>
  );
}

/** First cell of a row: what the row is called. It stays in place when the table scrolls. */
export function GridNameCell({ children }: { children: ReactNode }) {
  return (
    <th
      scope="row"
      data-col="name"
      className={`${PINNED} max-w-56 min-w-28 p-0 font-normal group-data-selected/row:bg-accent-soft group-data-selected/row:font-semibold`}
    >
      {children}
    </th>
  );
}

export function GridCell({ column, children }: { column: string; children: ReactNode }) {
  return (
    <td data-col={column} className="p-0 align-middle">
      {children}
    </td>
  );
}

/** The pasted text if it is more than one cell; a single cell is pasted by the browser. */
function blockOf(event: ClipboardEvent<HTMLElement>): PastedBlock | null {
  const text = event.clipboardData.getData('text/plain').replace(/(\r?\n)+$/, '');
  if (!/[\t\n]/.test(text) || !(event.target instanceof HTMLElement)) return null;
  const rowId = event.target.closest<HTMLElement>('[data-row]')?.dataset['row'];
  const column = event.target.closest<HTMLElement>('[data-col]')?.dataset['col'];
  return rowId === undefined || column === undefined ? null : { text, rowId, column };
}
