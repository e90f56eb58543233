import type { KeyboardEvent } from 'react';

export interface GridKeyHandlers {
  /** Alt+Up and Alt+Down. */
  onMoveRow?: ((rowId: string, places: number) => void) | undefined;
  /** Enter in the last row. */
  onAddRow?: (() => void) | undefined;
}

type Editable = HTMLInputElement | HTMLSelectElement | HTMLButtonElement;

/**
 * Keys of an editable table: arrows move between cells, Enter goes down, F2 edits, Alt with up or down moves the row.
 * Left and right stay in a text as long as the caret is inside it.
 */
export function handleGridKey(event: KeyboardEvent<HTMLElement>, handlers: GridKeyHandlers): void {
  const target = editableOf(event.target);
  const row = target?.closest<HTMLElement>('[data-row]');
  if (!target || !row || event.ctrlKey || event.metaKey) return;
  const isHandled = event.altKey ? moveRow(event, row, handlers) : act(event, target, row, handlers);
  if (isHandled) event.preventDefault();
}

function editableOf(target: EventTarget): Editable | null {
  const isEditable =
    target instanceof HTMLInputElement || target instanceof HTMLSelectElement || target instanceof HTMLButtonElement;
  return isEditable ? target : null;
}

function moveRow(event: KeyboardEvent, row: HTMLElement, { onMoveRow }: GridKeyHandlers): boolean {
  const places = event.key === 'ArrowUp' ? -1 : event.key === 'ArrowDown' ? 1 : 0;
  const rowId = row.dataset['row'];
  if (places === 0 || !onMoveRow || rowId === undefined) return false;
  onMoveRow(rowId, places);
  return true;
}

function act(event: KeyboardEvent, target: Editable, row: HTMLElement, handlers: GridKeyHandlers): boolean {
  switch (event.key) {
    case 'ArrowUp':
      return goVertically(target, row, -1);
    case 'ArrowDown':
      return goVertically(target, row, 1);
    case 'ArrowLeft':
      return isAtEdge(target, 'start') && goSideways(target, row, -1);
    case 'ArrowRight':
      return isAtEdge(target, 'end') && goSideways(target, row, 1);
    case 'Enter':
      if (target instanceof HTMLButtonElement) return false;
      if (!goVertically(target, row, event.shiftKey ? -1 : 1) && !event.shiftKey) handlers.onAddRow?.();
      return true;
    case 'F2':
    case ' ':
      return edit(target, event.key);
    default:
      return false;
  }
}

function edit(target: Editable, key: string): boolean {
  if (target instanceof HTMLSelectElement) {
    if ('showPicker' in target) target.showPicker();
    return true;
  }
  if (key !== 'F2' || !(target instanceof HTMLInputElement) || target.type !== 'text') return false;
  target.setSelectionRange(target.value.length, target.value.length);
  return true;
}

/** Whether an arrow leaves the cell: a whole text that is selected counts as not being edited. */
function isAtEdge(target: Editable, edge: 'start' | 'end'): boolean {
  if (!(target instanceof HTMLInputElement) || target.type !== 'text') return true;
  const { selectionStart, selectionEnd, value } = target;
  if (selectionStart === 0 && selectionEnd === value.length) return true;
  return selectionStart === selectionEnd && selectionStart === (edge === 'start' ? 0 : value.length);
}

function goVertically(target: Editable, row: HTMLElement, places: number): boolean {
  const rows = [...(row.parentElement?.querySelectorAll<HTMLElement>(':scope > [data-row]') ?? [])];
  const next = rows[rows.indexOf(row) + places];
  const column = target.closest<HTMLElement>('[data-col]')?.dataset['col'];
  if (!next || column === undefined) return false;
  return focusCell(next.querySelector(`[data-col="${column}"]`));
}

function goSideways(target: Editable, row: HTMLElement, places: number): boolean {
  const cells = [...row.querySelectorAll<HTMLElement>('[data-col]')];
  const own = target.closest<HTMLElement>('[data-col]');
  const inCell = [...(own?.querySelectorAll<HTMLElement>('input, select, button') ?? [])];
  const beside = inCell[inCell.indexOf(target) + places];
  if (beside) {
    beside.focus();
    return true;
  }
  return focusCell(cells[cells.findIndex((cell) => cell === own) + places] ?? null);
}

/** Puts the focus on what a cell edits, with its text selected so that typing replaces it. */
export function focusCell(cell: Element | null): boolean {
  const target = cell?.querySelector<HTMLElement>('input, select, button');
  if (!target) return false;
  target.focus();
  if (target instanceof HTMLInputElement && target.type === 'text') target.select();
  return true;
}

/** Field to focus after a row was moved: the cell that the focus is in, else the row's name. */
export function focusOfRow(prefix: string, rowId: string): string {
  const current = document.activeElement instanceof HTMLElement ? document.activeElement.dataset['field'] : undefined;
  return current?.startsWith(`${prefix}.${rowId}.`) ? current : `${prefix}.${rowId}.name`;
}
