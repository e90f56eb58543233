import { Outlet } from 'react-router-dom';
import { PageTitle } from '#frontend/components/page-title.tsx';
import { Tabs } from '#frontend/components/tabs.tsx';
import { LIBRARY_TABS } from '#frontend/features/library/model/kinds.ts';
import { useSession } from '#frontend/features/session/hooks/use-session.ts';

export function LibraryPage() {
  const session = useSession();
  return (
    <div className="page pt-10">
      <PageTitle
        documentTitle="Library"
        lead="Parts, cells and climates to build scenarios from. A scenario takes a copy: what changes here changes no forecast."
      >
        Library of <strong className="font-extrabold">{session?.workspace.name}</strong>
      </PageTitle>
      <div className="mt-8">
        <Tabs
          label="Kinds of library items"
          tabs={LIBRARY_TABS.map(({ tab, label }) => ({ to: `/library/${tab}`, label }))}
        />
      </div>
      <Outlet />
    </div>
  );
}
