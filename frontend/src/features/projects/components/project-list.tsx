import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { Project } from '#common/schemas/api/projects.ts';
import { DataTable, type Column } from '#frontend/components/data-table.tsx';
import { RowMenu } from '#frontend/components/row-menu.tsx';
import { When } from '#frontend/components/when.tsx';
import { counted } from '#frontend/lib/words.ts';
import { useArchiveProject } from '../hooks/use-archive-project.ts';
import { ProjectDialog } from './project-dialog.tsx';

export interface ProjectListProps {
  projects: readonly Project[];
  canEdit: boolean;
  sort: string;
  onSort: (sort: string) => void;
}

export function ProjectList({ projects, canEdit, sort, onSort }: ProjectListProps) {
  const [edited, setEdited] = useState<Project | null>(null);
  const archive = useArchiveProject();
  return (
    <>
      <DataTable
        caption="Projects"
        columns={columns(canEdit, setEdited, archive)}
        rows={projects}
        rowKey={(project) => project.id}
        sort={sort}
        onSort={onSort}
      />
      {edited && <ProjectDialog project={edited} onClose={() => setEdited(null)} onSaved={() => setEdited(null)} />}
    </>
  );
}

function columns(
  canEdit: boolean,
  onEdit: (project: Project) => void,
  onArchive: (project: Project, archived: boolean) => void,
): Column<Project>[] {
  const acts: Column<Project> = {
    key: 'acts',
    header: 'Actions',
    isHeaderHidden: true,
    className: 'w-10 text-right',
    cell: (project) => (
      <RowMenu
        name={project.name}
        items={[
          { key: 'edit', label: 'Rename or describe', onSelect: () => onEdit(project) },
          project.archivedAt === null
            ? { key: 'archive', label: 'Archive', onSelect: () => onArchive(project, true) }
            : { key: 'restore', label: 'Take out of the archive', onSelect: () => onArchive(project, false) },
        ]}
      />
    ),
  };
  return [
    { key: 'name', header: 'Project', sortBy: 'name', cell: (project) => <ProjectName project={project} /> },
    {
      key: 'scenarios',
      header: 'Scenarios',
      isNumber: true,
      from: 'sm',
      className: 'w-28',
      cell: (project) => project.scenarioCount,
    },
    {
      key: 'updated',
      header: 'Last change',
      sortBy: 'updatedAt',
      sortsDescendingFirst: true,
      from: 'sm',
      className: 'w-40 text-muted',
      cell: (project) => <When iso={project.updatedAt} />,
    },
    ...(canEdit ? [acts] : []),
  ];
}

function ProjectName({ project }: { project: Project }) {
  return (
    <>
      <Link
        to={`/projects/${project.id}`}
        className="text-lg font-semibold hover:text-accent hover:underline hover:underline-offset-4"
      >
        {project.name}
      </Link>
      {project.description !== '' && (
        <span className="mt-0.5 line-clamp-2 max-w-2xl text-muted">{project.description}</span>
      )}
      <span className="mt-1 block text-small text-muted sm:hidden">
        {counted(project.scenarioCount, 'scenario')}, <When iso={project.updatedAt} />
      </span>
    </>
  );
}
