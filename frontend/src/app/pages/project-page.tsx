import { useState, type ReactNode } from 'react';
import { useNavigate, useParams } from 'react-router-dom';
import type { Project } from '#common/schemas/api/projects.ts';
import { Button } from '#frontend/components/button.tsx';
import { Breadcrumb } from '#frontend/components/frame-slots.tsx';
import { ListControls } from '#frontend/components/list-controls.tsx';
import { PageTitle } from '#frontend/components/page-title.tsx';
import { Pagination } from '#frontend/components/pagination.tsx';
import { Empty, ErrorState, Loading } from '#frontend/components/states.tsx';
import { useProject } from '#frontend/features/projects/api/get-project.ts';
import { ProjectDialog } from '#frontend/features/projects/components/project-dialog.tsx';
import { useArchiveProject } from '#frontend/features/projects/hooks/use-archive-project.ts';
import { useScenarios } from '#frontend/features/scenarios/api/list-scenarios.ts';
import { CreateScenarioDialog } from '#frontend/features/scenarios/components/create-scenario-dialog.tsx';
import { ImportScenarioDialog } from '#frontend/features/scenarios/components/import-scenario-dialog.tsx';
import { ScenarioList } from '#frontend/features/scenarios/components/scenario-list.tsx';
import { useSession } from '#frontend/features/session/hooks/use-session.ts';
import { useListParams, type ListParams } from '#frontend/hooks/use-list-params.ts';
import { ApiError } from '#frontend/lib/api-client.ts';
import { NotFoundPage } from './not-found-page.tsx';

type OpenDialog = 'create' | 'import' | 'edit' | null;

export function ProjectPage() {
  const { projectId = '' } = useParams();
  const project = useProject(projectId);
  if (project.error instanceof ApiError && [400, 404].includes(project.error.status)) return <NotFoundPage />;
  return (
    <div className="page pt-10">
      {project.isPending && <Loading what="Fetching the project" />}
      {project.isError && (
        <ErrorState
          title="The project could not be fetched."
          error={project.error}
          onRetry={() => void project.refetch()}
        />
      )}
      {project.data && <LoadedProject project={project.data} />}
    </div>
  );
}

function LoadedProject({ project }: { project: Project }) {
  const canEdit = useSession()?.canEdit === true;
  const navigate = useNavigate();
  const archive = useArchiveProject();
  const [open, setOpen] = useState<OpenDialog>(null);
  const close = () => setOpen(null);
  const openScenario = ({ id }: { id: string }) => void navigate(`/scenarios/${id}`);
  const isArchived = project.archivedAt !== null;
  const acts = canEdit && !isArchived && (
    <>
      <Button onClick={() => setOpen('import')}>Import a file</Button>
      <Button variant="primary" onClick={() => setOpen('create')}>
        New scenario
      </Button>
    </>
  );
  return (
    <>
      <Breadcrumb crumbs={[{ label: 'Projects', to: '/projects' }, { label: project.name }]} />
      <PageTitle documentTitle={project.name} lead={project.description || undefined} actions={acts}>
        <strong className="font-extrabold">{project.name}</strong>
      </PageTitle>
      {canEdit && (
        <p className="mt-3 flex gap-5 text-small">
          <button type="button" className="link" onClick={() => setOpen('edit')}>
            Rename or describe
          </button>
          <button type="button" className="link" onClick={() => archive(project, !isArchived)}>
            {isArchived ? 'Take out of the archive' : 'Archive the project'}
          </button>
        </p>
      )}
      {isArchived && (
        <p className="mt-4 border-l-2 border-caution pl-4">This project is in the archive: lists leave it out.</p>
      )}
      <Scenarios projectId={project.id} canEdit={canEdit} acts={acts} />
      {open === 'create' && <CreateScenarioDialog projectId={project.id} onClose={close} onCreated={openScenario} />}
      {open === 'import' && <ImportScenarioDialog projectId={project.id} onClose={close} onImported={openScenario} />}
      {open === 'edit' && <ProjectDialog project={project} onClose={close} onSaved={close} />}
    </>
  );
}

function Scenarios({ projectId, canEdit, acts }: { projectId: string; canEdit: boolean; acts: ReactNode }) {
  const [params, setParams] = useListParams('-updatedAt');
  const scenarios = useScenarios(projectId, params);
  return (
    <section aria-label="Scenarios" className="mt-8">
      <ListControls searchLabel="Find a scenario" filterLabel="Scenarios shown" params={params} onChange={setParams} />
      <div className="mt-4">
        {scenarios.isPending && <Loading what="Fetching the scenarios" />}
        {scenarios.isError && (
          <ErrorState
            title="The scenarios could not be fetched."
            error={scenarios.error}
            onRetry={() => void scenarios.refetch()}
          />
        )}
        {scenarios.data?.total === 0 && <NoScenarios params={params} canEdit={canEdit} acts={acts} />}
        {scenarios.data && scenarios.data.total > 0 && (
          <>
            <ScenarioList
              scenarios={scenarios.data.items}
              canEdit={canEdit}
              sort={params.sort}
              onSort={(sort) => setParams({ sort })}
            />
            <Pagination {...scenarios.data} what="scenarios" onPage={(page) => setParams({ page })} />
          </>
        )}
      </div>
    </section>
  );
}

function NoScenarios({ params, canEdit, acts }: { params: ListParams; canEdit: boolean; acts: ReactNode }) {
  if (params.q !== '') return <Empty title={`No scenario has “${params.q}” in its name.`} />;
  if (params.archived === 'true') return <Empty title="No scenario is in the archive." />;
  return (
    <Empty title="No scenario yet." actions={acts}>
      {canEdit
        ? 'A scenario is one node with its supply, climate and target: everything that a forecast needs. Begin with a template, empty, or with an exported file.'
        : 'An engineer or the owner of this workspace can make one.'}
    </Empty>
  );
}
