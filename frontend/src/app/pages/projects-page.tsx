import { useState, type ReactNode } from 'react';
import { useNavigate } from 'react-router-dom';
import { Button } from '#frontend/components/button.tsx';
import { ListControls } from '#frontend/components/list-controls.tsx';
import { PageTitle } from '#frontend/components/page-title.tsx';
import { Pagination } from '#frontend/components/pagination.tsx';
import { Empty, ErrorState, Loading } from '#frontend/components/states.tsx';
import { useProjects } from '#frontend/features/projects/api/list-projects.ts';
import { ProjectDialog } from '#frontend/features/projects/components/project-dialog.tsx';
import { ProjectList } from '#frontend/features/projects/components/project-list.tsx';
import { useSession } from '#frontend/features/session/hooks/use-session.ts';
import { useListParams, type ListParams } from '#frontend/hooks/use-list-params.ts';

export function ProjectsPage() {
  const session = useSession();
  const canEdit = session?.canEdit === true;
  const navigate = useNavigate();
  const [params, setParams] = useListParams('-updatedAt');
  const projects = useProjects(params);
  const [isCreating, setCreating] = useState(false);
  const create = canEdit && (
    <Button variant="primary" onClick={() => setCreating(true)}>
      New project
    </Button>
  );
  return (
    <div className="page pt-10">
      <PageTitle
        documentTitle="Projects"
        lead="A project is a product under design; it holds scenarios."
        actions={create}
      >
        Projects of <strong className="font-extrabold">{session?.workspace.name}</strong>
      </PageTitle>
      <div className="mt-8">
        <ListControls searchLabel="Find a project" filterLabel="Projects shown" params={params} onChange={setParams} />
      </div>
      <div className="mt-4">
        {projects.isPending && <Loading what="Fetching the projects" />}
        {projects.isError && (
          <ErrorState
            title="The projects could not be fetched."
            error={projects.error}
            onRetry={() => void projects.refetch()}
          />
        )}
        {projects.data && projects.data.total === 0 && <NoProjects params={params} canEdit={canEdit} create={create} />}
        {projects.data && projects.data.total > 0 && (
          <>
            <ProjectList
              projects={projects.data.items}
              canEdit={canEdit}
              sort={params.sort}
              onSort={(sort) => setParams({ sort })}
            />
            <Pagination {...projects.data} what="projects" onPage={(page) => setParams({ page })} />
          </>
        )}
      </div>
      {isCreating && (
        <ProjectDialog
          onClose={() => setCreating(false)}
          onSaved={(project) => void navigate(`/projects/${project.id}`)}
        />
      )}
    </div>
  );
}

function NoProjects({ params, canEdit, create }: { params: ListParams; canEdit: boolean; create: ReactNode }) {
  if (params.q !== '') return <Empty title={`No project has “${params.q}” in its name.`} />;
  if (params.archived === 'true') return <Empty title="No project is in the archive." />;
  return (
    <Empty title="No project yet." actions={create}>
      {canEdit
        ? 'Make one for the product that you are designing; scenarios of its node, supply and climate go into it.'
        : 'An engineer or the owner of this workspace can make one.'}
    </Empty>
  );
}
