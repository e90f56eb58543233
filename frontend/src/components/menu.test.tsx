import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { Menu } from './menu.tsx';

afterEach(cleanup);

function renderMenu() {
  const onSelect = vi.fn<(label: string) => void>();
  const items = ['Duplicate', 'Export', 'Archive'].map((label) => ({
    key: label,
    label,
    onSelect: () => onSelect(label),
  }));
  render(<Menu label="Actions" button="…" items={items} />);
  return { onSelect, button: screen.getByRole('button', { name: 'Actions' }) };
}

describe('Menu', () => {
  it('opens on its button with the first item focused', () => {
    const { button } = renderMenu();
    expect(screen.queryByRole('menu')).toBeNull();
    fireEvent.click(button);
    expect(button.getAttribute('aria-expanded')).toBe('true');
    expect(document.activeElement).toBe(screen.getByRole('menuitem', { name: 'Duplicate' }));
  });

  it('moves by arrow keys around the ends, by Home, End and first letter', () => {
    const { button } = renderMenu();
    fireEvent.click(button);
    const focusedAfter = (key: string) => {
      fireEvent.keyDown(screen.getByRole('menu'), { key });
      return document.activeElement?.textContent;
    };
    expect(['ArrowDown', 'ArrowUp', 'ArrowUp', 'Home', 'End', 'e'].map(focusedAfter)).toEqual([
      'Export',
      'Duplicate',
      'Archive',
      'Duplicate',
      'Archive',
      'Export',
    ]);
  });

  it('closes on Escape and gives the focus back', () => {
    const { button, onSelect } = renderMenu();
    fireEvent.click(button);
    fireEvent.keyDown(screen.getByRole('menu'), { key: 'Escape' });
    expect(screen.queryByRole('menu')).toBeNull();
    expect(document.activeElement).toBe(button);
    expect(onSelect).not.toHaveBeenCalled();
  });

  it('does the chosen act and closes', () => {
    const { button, onSelect } = renderMenu();
    fireEvent.click(button);
    fireEvent.click(screen.getByRole('menuitem', { name: 'Export' }));
    expect(onSelect).toHaveBeenCalledExactlyOnceWith('Export');
    expect(screen.queryByRole('menu')).toBeNull();
  });

  it('closes when something outside is pressed', () => {
    const { button } = renderMenu();
    fireEvent.click(button);
    fireEvent.pointerDown(document.body);
    expect(screen.queryByRole('menu')).toBeNull();
  });
});
