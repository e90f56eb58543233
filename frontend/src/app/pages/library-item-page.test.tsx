import { fireEvent, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { catalogueItem } from '#common/catalogue/catalogue.ts';
import type { Role } from '#common/schemas/api/common.ts';
import type { LibraryItem } from '#common/schemas/api/library.ts';
import { buildSession, mockApi, renderRoutes, resetUi, uuid } from '#test/support/ui.tsx';
import { LibraryItemPage } from './library-item-page.tsx';

afterEach(resetUi);

function cr2032(): LibraryItem {
  const item = catalogueItem('cell:CR2032');
  if (!item) throw new Error('The catalogue has no CR2032.');
  return item;
}

const own = (): LibraryItem => ({
  ...cr2032(),
  id: uuid(30),
  origin: 'workspace',
  name: 'Lot 4',
  version: 1,
  updatedAt: '2026-11-01T00:00:00.000Z',
});

function open(id: string, role: Role = 'engineer') {
  const sent = mockApi(({ method, path, body }) => {
    if (path === '/session') return { body: buildSession(role) };
    if (method === 'POST') return { status: 201, body: { ...own(), ...Object(body) } };
    if (path === `/library/${uuid(30)}`) return { body: own() };
    return { body: { items: [cr2032()], page: 1, pageSize: 100, total: 1 } };
  });
  renderRoutes([{ path: '/library/items/:itemId', element: <LibraryItemPage /> }], `/library/items/${id}`);
  return sent;
}

describe('LibraryItemPage', () => {
  it('shows figures with their origin, and those from memory as such', async () => {
    open('cell%3ACR2032');
    const capacity = (await screen.findByRole('rowheader', { name: 'Capacity' })).closest('tr');
    expect(capacity?.textContent).toMatch(/mAh.*from a source/);
    expect(screen.getAllByText('from memory', { exact: false }).length).toBeGreaterThan(0);
  });

  it('shows the tables of a cell as tables', async () => {
    open('cell%3ACR2032');
    expect(await screen.findByRole('table', { name: 'Open-circuit voltage at 20 °C' })).toBeTruthy();
  });

  it('copies an item of the catalogue into the library and shows the copy', async () => {
    const sent = open('cell%3ACR2032');
    fireEvent.click(await screen.findByRole('button', { name: 'Copy into the library' }));
    fireEvent.change(screen.getByLabelText('Name'), { target: { value: 'Lot 4' } });
    fireEvent.click(screen.getByRole('button', { name: 'Copy' }));
    expect(await screen.findByText(/own cell/)).toBeTruthy();
    expect(sent.find(({ method }) => method === 'POST')).toMatchObject({
      path: '/library',
      body: { name: 'Lot 4', content: cr2032().content },
    });
  });

  it('lets a viewer look and not act', async () => {
    open(uuid(30), 'viewer');
    await screen.findByRole('rowheader', { name: 'Capacity' });
    expect(screen.queryByRole('button', { name: /Copy|Rename|Archive/ })).toBeNull();
  });

  it('says that there is nothing under a key that the catalogue does not have', async () => {
    open('cell%3Anone');
    expect((await screen.findByRole('heading', { level: 1 })).textContent).toMatch(/nothing at this address/);
  });
});
