import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { DataTable, type Column } from './data-table.tsx';

afterEach(cleanup);

interface Row {
  name: string;
  life: number;
}
const COLUMNS: Column<Row>[] = [
  { key: 'name', header: 'Name', sortBy: 'name', cell: (row) => row.name },
  { key: 'life', header: 'Life', sortBy: 'life', sortsDescendingFirst: true, isNumber: true, cell: (row) => row.life },
];

function renderTable(sort: string) {
  const onSort = vi.fn();
  const rows = [{ name: 'Frost post', life: 6 }];
  render(
    <DataTable caption="Things" columns={COLUMNS} rows={rows} rowKey={(row) => row.name} sort={sort} onSort={onSort} />,
  );
  return onSort;
}

describe('DataTable', () => {
  it('names each row by its first cell', () => {
    renderTable('name');
    expect(screen.getByRole('table', { name: 'Things' })).toBeTruthy();
    expect(screen.getByRole('rowheader', { name: 'Frost post' })).toBeTruthy();
  });

  it('tells the order of the sorted column only', () => {
    renderTable('-life');
    expect(screen.getByRole('columnheader', { name: /Life/ }).getAttribute('aria-sort')).toBe('descending');
    expect(screen.getByRole('columnheader', { name: /Name/ }).getAttribute('aria-sort')).toBe('none');
  });

  it.each([
    ['name', 'Name', '-name'],
    ['-name', 'Name', 'name'],
    ['name', 'Life', '-life'],
    ['-life', 'Life', 'life'],
  ])('sorted by %s, a click on %s asks for %s', (sort, header, asked) => {
    const onSort = renderTable(sort);
    fireEvent.click(screen.getByRole('button', { name: header }));
    expect(onSort).toHaveBeenCalledExactlyOnceWith(asked);
  });
});
