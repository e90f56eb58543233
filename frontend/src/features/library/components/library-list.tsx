import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import type { LibraryItem } from '#common/schemas/api/library.ts';
import { DataTable, type Column } from '#frontend/components/data-table.tsx';
import type { MenuItem } from '#frontend/components/menu.tsx';
import { RowMenu } from '#frontend/components/row-menu.tsx';
import { When } from '#frontend/components/when.tsx';
import { useArchiveLibraryItem } from '../hooks/use-archive-library-item.ts';
import { keyFigure } from '../model/key-figure.ts';
import { LibraryItemDialog } from './library-item-dialog.tsx';

export interface LibraryListProps {
  caption: string;
  items: readonly LibraryItem[];
  canEdit: boolean;
  sort: string;
  onSort: (sort: string) => void;
}

interface Asked {
  item: LibraryItem;
  act: 'copy' | 'edit';
}

export function LibraryList({ caption, items, canEdit, sort, onSort }: LibraryListProps) {
  const [asked, setAsked] = useState<Asked | null>(null);
  const navigate = useNavigate();
  const archive = useArchiveLibraryItem();
  const menuItems = (item: LibraryItem): MenuItem[] => {
    const copy = { key: 'copy', label: 'Copy into the library', onSelect: () => setAsked({ item, act: 'copy' }) };
    if (item.origin === 'catalogue') return [copy];
    return [
      { key: 'edit', label: 'Rename or note', onSelect: () => setAsked({ item, act: 'edit' }) },
      copy,
      item.archivedAt === null
        ? { key: 'archive', label: 'Archive', onSelect: () => archive(item, true) }
        : { key: 'restore', label: 'Take out of the archive', onSelect: () => archive(item, false) },
    ];
  };
  return (
    <>
      <DataTable
        caption={caption}
        columns={columns(canEdit ? menuItems : null)}
        rows={items}
        rowKey={(item) => item.id}
        sort={sort}
        onSort={onSort}
      />
      {asked && (
        <LibraryItemDialog
          {...asked}
          onClose={() => setAsked(null)}
          onSaved={(saved) => {
            setAsked(null);
            if (asked.act === 'copy') void navigate(`/library/items/${saved.id}`);
          }}
        />
      )}
    </>
  );
}

function columns(menuItems: ((item: LibraryItem) => MenuItem[]) | null): Column<LibraryItem>[] {
  const acts: Column<LibraryItem>[] = menuItems
    ? [
        {
          key: 'acts',
          header: 'Actions',
          isHeaderHidden: true,
          className: 'w-10 text-right',
          cell: (item) => <RowMenu name={item.name} items={menuItems(item)} />,
        },
      ]
    : [];
  return [
    { key: 'name', header: 'Name', sortBy: 'name', cell: (item) => <ItemName item={item} /> },
    { key: 'figure', header: 'In short', from: 'md', className: 'w-72', cell: (item) => keyFigure(item.content) },
    {
      key: 'origin',
      header: 'Whose',
      from: 'sm',
      className: 'w-32 text-muted',
      cell: (item) => (item.origin === 'catalogue' ? 'catalogue' : 'own'),
    },
    {
      key: 'updated',
      header: 'Last change',
      sortBy: 'updatedAt',
      sortsDescendingFirst: true,
      from: 'lg',
      className: 'w-36 text-muted',
      cell: (item) => (item.updatedAt === null ? '' : <When iso={item.updatedAt} />),
    },
    ...acts,
  ];
}

function ItemName({ item }: { item: LibraryItem }) {
  return (
    <>
      <Link
        to={`/library/items/${encodeURIComponent(item.id)}`}
        className="text-lg font-semibold hover:text-accent hover:underline hover:underline-offset-4"
      >
        {item.name}
      </Link>
      <span className="mt-0.5 block md:hidden">{keyFigure(item.content)}</span>
      {item.note !== '' && <span className="mt-0.5 line-clamp-1 max-w-2xl text-small text-muted">{item.note}</span>}
      <span className="block text-small text-muted sm:hidden">{item.origin === 'catalogue' ? 'catalogue' : 'own'}</span>
    </>
  );
}
