import type { Session } from '#common/schemas/api/session.ts';
import type { Project } from '#common/schemas/api/projects.ts';
import type { LibraryItem } from '#common/schemas/api/library.ts';
import type {
  ForecastSummary,
  RevisionDetail,
  RevisionSummary,
  ScenarioDetail,
  ScenarioFile,
  ScenarioSummary,
} from '#common/schemas/api/scenarios.ts';
import type { Page } from '#common/schemas/api/common.ts';
import type { Conflict } from '#backend/domain/errors.ts';
import type { Principal } from '#backend/domain/principal.ts';
import type {
  LibraryRecord,
  ProjectRecord,
  RevisionRecord,
  RevisionWithDocument,
  ScenarioRecord,
  ScenarioWithDocument,
} from '#backend/domain/records.types.ts';

/** Fields are listed by hand: a new column never goes out by itself. */
export function presentSession(principal: Principal | null, csrfToken: string): Session {
  if (principal === null) return { csrfToken, user: null, workspace: null, workspaces: [] };
  const { user, workspace, workspaces } = principal;
  return {
    csrfToken,
    user: { id: user.id, email: user.email, name: user.name },
    workspace: workspace && {
      id: workspace.id,
      name: workspace.name,
      role: workspace.role,
      isDemo: workspace.isDemo,
    },
    workspaces: workspaces.map(({ id, name, role }) => ({ id, name, role })),
  };
}

export function presentPage<From, To>(page: Page<From>, present: (item: From) => To): Page<To> {
  return { items: page.items.map(present), page: page.page, pageSize: page.pageSize, total: page.total };
}

export function presentProject(project: ProjectRecord): Project {
  return {
    id: project.id,
    name: project.name,
    description: project.description,
    version: project.version,
    scenarioCount: project.scenarioCount,
    archivedAt: timeOrNull(project.archivedAt),
    createdAt: project.createdAt.toISOString(),
    updatedAt: project.updatedAt.toISOString(),
  };
}

export function presentScenario(scenario: ScenarioRecord): ScenarioSummary {
  return {
    id: scenario.id,
    projectId: scenario.projectId,
    name: scenario.name,
    version: scenario.version,
    revision: scenario.revision,
    forecast: presentForecast(scenario.forecast),
    archivedAt: timeOrNull(scenario.archivedAt),
    createdAt: scenario.createdAt.toISOString(),
    updatedAt: scenario.updatedAt.toISOString(),
    updatedBy: scenario.updatedBy,
  };
}

export function presentScenarioDetail(scenario: ScenarioWithDocument): ScenarioDetail {
  return { ...presentScenario(scenario), projectName: scenario.projectName, document: scenario.document };
}

export function presentRevision(revision: RevisionRecord): RevisionSummary {
  return {
    scenarioId: revision.scenarioId,
    revision: revision.revision,
    note: revision.note,
    author: revision.author,
    createdAt: revision.createdAt.toISOString(),
    restoredFrom: revision.restoredFrom,
    forecast: presentForecast(revision.forecast),
  };
}

export function presentRevisionDetail(revision: RevisionWithDocument): RevisionDetail {
  return { ...presentRevision(revision), document: revision.document };
}

export function presentScenarioFile(scenario: ScenarioWithDocument, exportedAt: Date): ScenarioFile {
  return {
    format: 'overwinter-scenario',
    schemaVersion: scenario.document.schemaVersion,
    exportedAt: exportedAt.toISOString(),
    revision: scenario.revision,
    scenario: scenario.document,
  };
}

export function presentLibraryItem(item: LibraryRecord): LibraryItem {
  return {
    id: item.id,
    origin: item.origin,
    name: item.name,
    note: item.note,
    content: item.content,
    version: item.version,
    archivedAt: timeOrNull(item.archivedAt),
    updatedAt: timeOrNull(item.updatedAt),
  };
}

export function presentConflict(conflict: Conflict): unknown {
  switch (conflict.kind) {
    case 'project':
      return presentProject(conflict.current);
    case 'scenario':
      return presentScenarioDetail(conflict.current);
    case 'library-item':
      return presentLibraryItem(conflict.current);
  }
}

function presentForecast(forecast: ForecastSummary | null): ForecastSummary | null {
  if (forecast === null) return null;
  const { engineVersion, outcome, lifeS, endMonth, targetLifeS } = forecast;
  return { engineVersion, outcome, lifeS, endMonth, targetLifeS };
}

function timeOrNull(time: Date | null): string | null {
  return time === null ? null : time.toISOString();
}
