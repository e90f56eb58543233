import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import type { Role } from '#common/schemas/api/common.ts';
import type { LibraryContent } from '#common/schemas/api/library.ts';
import type { ForecastSummary } from '#common/schemas/api/scenarios.ts';

/** What the use cases speak of. Times are dates here and text only on the wire. */
export interface ProjectRecord {
  id: string;
  name: string;
  description: string;
  version: number;
  /** Scenarios that are not archived. */
  scenarioCount: number;
  archivedAt: Date | null;
  createdAt: Date;
  updatedAt: Date;
}

export interface ScenarioRecord {
  id: string;
  projectId: string;
  name: string;
  version: number;
  /** Number of the latest revision. */
  revision: number;
  forecast: ForecastSummary | null;
  archivedAt: Date | null;
  createdAt: Date;
  updatedAt: Date;
  /** Name of the person who changed it last. */
  updatedBy: string;
}

export interface ScenarioWithDocument extends ScenarioRecord {
  projectName: string;
  document: Scenario;
}

export interface RevisionRecord {
  scenarioId: string;
  revision: number;
  note: string;
  author: string;
  createdAt: Date;
  restoredFrom: number | null;
  forecast: ForecastSummary | null;
}

export interface RevisionWithDocument extends RevisionRecord {
  document: Scenario;
}

export interface LibraryRecord {
  id: string;
  origin: 'workspace' | 'catalogue';
  name: string;
  note: string;
  content: LibraryContent;
  version: number | null;
  archivedAt: Date | null;
  updatedAt: Date | null;
}

export interface ListQuery<Sort extends string> {
  page: number;
  pageSize: number;
  sort: Sort;
  q: string;
  archived: 'true' | 'false' | 'all';
}

export interface UserRecord {
  id: string;
  email: string;
  name: string;
  /** Counts up with every change of password; a session that carries an older one is over. */
  sessionEpoch: number;
}

export interface WorkspaceMembership {
  id: string;
  name: string;
  isDemo: boolean;
  role: Role;
}
