import { useParams } from 'react-router-dom';
import { ListControls } from '#frontend/components/list-controls.tsx';
import { Pagination } from '#frontend/components/pagination.tsx';
import { Segmented } from '#frontend/components/segmented.tsx';
import { Empty, ErrorState, Loading } from '#frontend/components/states.tsx';
import { useLibrary } from '#frontend/features/library/api/list-library.ts';
import { LibraryList } from '#frontend/features/library/components/library-list.tsx';
import { LIBRARY_TABS, type LibraryTab } from '#frontend/features/library/model/kinds.ts';
import { useSession } from '#frontend/features/session/hooks/use-session.ts';
import { useListParams, type ListParams } from '#frontend/hooks/use-list-params.ts';
import { NotFoundPage } from './not-found-page.tsx';

const ORIGINS = [
  { value: 'all', label: 'All' },
  { value: 'workspace', label: 'Own' },
  { value: 'catalogue', label: 'Catalogue' },
] as const;

export function LibraryListTab() {
  const { tab } = useParams();
  const known = LIBRARY_TABS.find((candidate) => candidate.tab === tab);
  return known ? <ItemsOfKind key={known.tab} tab={known} /> : <NotFoundPage />;
}

function ItemsOfKind({ tab }: { tab: LibraryTab }) {
  const canEdit = useSession()?.canEdit === true;
  const [params, setParams] = useListParams('name');
  const items = useLibrary({ kind: tab.kind, ...params });
  return (
    <section aria-label={tab.label} className="mt-6">
      <ListControls
        searchLabel={`Find a ${tab.singular}`}
        filterLabel={`${tab.label} shown`}
        params={params}
        onChange={setParams}
      />
      {params.archived === 'false' && (
        <div className="mt-2">
          <Segmented
            label={`Whose ${tab.plural}`}
            value={ORIGINS.find(({ value }) => value === params.origin)?.value ?? 'all'}
            options={ORIGINS}
            onChange={(origin) => setParams({ origin })}
          />
        </div>
      )}
      <div className="mt-3">
        {items.isPending && <Loading what={`Fetching the ${tab.plural}`} />}
        {items.isError && (
          <ErrorState
            title={`The ${tab.plural} could not be fetched.`}
            error={items.error}
            onRetry={() => void items.refetch()}
          />
        )}
        {items.data?.total === 0 && <NoItems tab={tab} params={params} canEdit={canEdit} />}
        {items.data && items.data.total > 0 && (
          <>
            <LibraryList
              caption={tab.label}
              items={items.data.items}
              canEdit={canEdit}
              sort={params.sort}
              onSort={(sort) => setParams({ sort })}
            />
            <Pagination {...items.data} what={tab.plural} onPage={(page) => setParams({ page })} />
          </>
        )}
      </div>
    </section>
  );
}

function NoItems({ tab, params, canEdit }: { tab: LibraryTab; params: ListParams; canEdit: boolean }) {
  if (params.q !== '') return <Empty title={`No ${tab.singular} has “${params.q}” in its name.`} />;
  if (params.archived === 'true') return <Empty title={`No ${tab.singular} is in the archive.`} />;
  return (
    <Empty title={`No ${tab.plural} of your own yet.`}>
      {canEdit
        ? `Copy one from the catalogue and overwrite its figures with those of your data sheet.`
        : `An engineer or the owner of this workspace can copy them from the catalogue.`}
    </Empty>
  );
}
