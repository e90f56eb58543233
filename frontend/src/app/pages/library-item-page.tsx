import { useState } from 'react';
import { useNavigate, useParams } from 'react-router-dom';
import type { LibraryItem } from '#common/schemas/api/library.ts';
import { Button } from '#frontend/components/button.tsx';
import { Breadcrumb } from '#frontend/components/frame-slots.tsx';
import { PageTitle } from '#frontend/components/page-title.tsx';
import { ErrorState, Loading } from '#frontend/components/states.tsx';
import { useLibraryItem } from '#frontend/features/library/api/get-library-item.ts';
import { LibraryContentView } from '#frontend/features/library/components/library-content-view.tsx';
import { LibraryItemDialog } from '#frontend/features/library/components/library-item-dialog.tsx';
import { useArchiveLibraryItem } from '#frontend/features/library/hooks/use-archive-library-item.ts';
import { tabOf } from '#frontend/features/library/model/kinds.ts';
import { useSession } from '#frontend/features/session/hooks/use-session.ts';
import { ApiError } from '#frontend/lib/api-client.ts';
import { NotFoundPage } from './not-found-page.tsx';

export function LibraryItemPage() {
  const { itemId = '' } = useParams();
  const item = useLibraryItem(itemId);
  if (item.error instanceof ApiError && [400, 404].includes(item.error.status)) return <NotFoundPage />;
  return (
    <div className="page pt-10">
      {item.isPending && <Loading what="Fetching the item" />}
      {item.isError && (
        <ErrorState title="The item could not be fetched." error={item.error} onRetry={() => void item.refetch()} />
      )}
      {item.data && <LoadedItem item={item.data} />}
    </div>
  );
}

function LoadedItem({ item }: { item: LibraryItem }) {
  const canEdit = useSession()?.canEdit === true;
  const navigate = useNavigate();
  const archive = useArchiveLibraryItem();
  const [act, setAct] = useState<'copy' | 'edit' | null>(null);
  const tab = tabOf(item.content.kind);
  const isOwn = item.origin === 'workspace';
  const acts = canEdit && (
    <>
      {isOwn && <Button onClick={() => setAct('edit')}>Rename or note</Button>}
      {isOwn && (
        <Button onClick={() => archive(item, item.archivedAt === null)}>
          {item.archivedAt === null ? 'Archive' : 'Take out of the archive'}
        </Button>
      )}
      <Button variant={isOwn ? 'quiet' : 'primary'} onClick={() => setAct('copy')}>
        Copy into the library
      </Button>
    </>
  );
  return (
    <>
      <Breadcrumb
        crumbs={[
          { label: 'Library', to: '/library' },
          ...(tab ? [{ label: tab.label, to: `/library/${tab.tab}` }] : []),
          { label: item.name },
        ]}
      />
      <PageTitle documentTitle={item.name} actions={acts}>
        <strong className="font-extrabold">{item.name}</strong>
        <span className="text-muted">, {isOwn ? `own ${tab?.singular ?? 'item'}` : 'from the catalogue'}</span>
      </PageTitle>
      {item.archivedAt !== null && (
        <p className="mt-4 border-l-2 border-caution pl-4">This item is in the archive: lists leave it out.</p>
      )}
      {item.note !== '' && <p className="mt-4 max-w-3xl whitespace-pre-line text-muted">{item.note}</p>}
      <div className="mt-10">
        <LibraryContentView content={item.content} />
      </div>
      {act !== null && (
        <LibraryItemDialog
          item={item}
          act={act}
          onClose={() => setAct(null)}
          onSaved={(saved) => {
            setAct(null);
            if (saved.id !== item.id) void navigate(`/library/items/${saved.id}`);
          }}
        />
      )}
    </>
  );
}
