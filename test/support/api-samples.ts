import { randomUUID } from 'node:crypto';
import type { Route } from '#backend/http/route.ts';
import { PASSWORD } from './api-client.ts';
import type { ApiServer } from './api-server.ts';
import { buildScenario } from './api-scenario.ts';
import { emailOf, type Workspace } from './api-world.ts';

export type PathIds = Record<'projectId' | 'scenarioId' | 'itemId' | 'revision', string>;

/** `PUT /api/v1/scenarios/:scenarioId`, as tests name a route. */
export function nameOf(route: Pick<Route, 'method' | 'path'>): string {
  return `${route.method.toUpperCase()} ${route.path}`;
}

export function idsOf(workspace: Workspace): PathIds {
  const { projectId, scenarioId, itemId } = workspace;
  return { projectId, scenarioId, itemId, revision: '1' };
}

export function randomIds(): PathIds {
  return { projectId: randomUUID(), scenarioId: randomUUID(), itemId: randomUUID(), revision: '1' };
}

/** Path of a route with its parameters filled in, and the query that it cannot do without. */
export function pathOf(route: Route, ids: PathIds): string {
  const path = route.path.replace(/:(\w+)/g, (_, name: string) => {
    const id = Object.entries(ids).find(([key]) => key === name)?.[1];
    if (id === undefined) throw new Error(`No sample for the parameter ${name}.`);
    return id;
  });
  return route.path.endsWith('/diff') ? `${path}?from=1&to=2` : path;
}

export function hasIds(route: Route): boolean {
  return route.path.includes(':');
}

async function versionOf(api: ApiServer, table: 'projects' | 'scenarios' | 'library_items', id: string) {
  const [row] = await api.sql(`SELECT version FROM ${table} WHERE id = $1`, [id]);
  return Number(row?.['version'] ?? 1);
}

type Body = Record<string, unknown>;

/** A body that each route with input accepts from somebody who may use it. A new route fails here until it has one. */
const BODIES: Readonly<Record<string, (api: ApiServer, ids: PathIds, workspace: Workspace) => Body | Promise<Body>>> = {
  'POST /api/v1/session': () => ({ email: emailOf('owner', 'north'), password: PASSWORD }),
  'PUT /api/v1/session/workspace': (_api, _ids, { id }) => ({ workspaceId: id }),
  'POST /api/v1/session/password': () => ({ currentPassword: PASSWORD, newPassword: PASSWORD }),
  'POST /api/v1/setup': () => ({
    token: 'unknown',
    workspaceName: 'New',
    name: 'Somebody',
    email: 'somebody@new.example',
    password: PASSWORD,
  }),
  'POST /api/v1/projects': () => ({ name: 'Another', description: 'Made by a test' }),
  'PATCH /api/v1/projects/:projectId': async (api, { projectId }) => ({
    version: await versionOf(api, 'projects', projectId),
    name: 'Renamed',
  }),
  'POST /api/v1/projects/:projectId/scenarios': () => ({ document: buildScenario(), note: 'First' }),
  'POST /api/v1/projects/:projectId/import': () => ({
    format: 'overwinter-scenario',
    schemaVersion: 1,
    exportedAt: '2026-01-02T03:04:05.000Z',
    revision: 7,
    scenario: buildScenario(),
  }),
  'PUT /api/v1/scenarios/:scenarioId': async (api, { scenarioId }) => ({
    version: await versionOf(api, 'scenarios', scenarioId),
    document: buildScenario(),
    note: 'Saved',
  }),
  'PATCH /api/v1/scenarios/:scenarioId': async (api, { scenarioId }) => ({
    version: await versionOf(api, 'scenarios', scenarioId),
    archived: false,
  }),
  'POST /api/v1/scenarios/:scenarioId/duplicate': () => ({ name: 'Copy' }),
  'POST /api/v1/scenarios/:scenarioId/revisions/:revision/restore': async (api, { scenarioId }) => ({
    version: await versionOf(api, 'scenarios', scenarioId),
    note: 'Restored',
  }),
  'POST /api/v1/forecast': () => ({ document: buildScenario() }),
  'POST /api/v1/library': () => ({ name: 'Part', note: '', content: { kind: 'part', part: samplePart() } }),
  'PATCH /api/v1/library/:itemId': async (api, { itemId }) => ({
    version: await versionOf(api, 'library_items', itemId),
    name: 'Renamed',
  }),
};

function samplePart(): unknown {
  return buildScenario().node.parts[0];
}

/** A valid body for the route as of now; undefined for a route without input. */
export async function bodyOf(
  api: ApiServer,
  route: Route,
  ids: PathIds,
  workspace: Workspace,
): Promise<Body | undefined> {
  if (route.input === null) return undefined;
  const make = BODIES[nameOf(route)];
  if (make === undefined) throw new Error(`${nameOf(route)} has no sample body in test/support/api-samples.ts.`);
  return make(api, ids, workspace);
}

const TABLES = ['users', 'workspaces', 'memberships', 'projects', 'scenarios', 'revisions', 'library_items'];

/** A hash of every row that people have made; sessions and sign-in attempts left out. */
export async function fingerprint(api: ApiServer): Promise<string> {
  const hashes: unknown[] = [];
  for (const table of TABLES) {
    const rows = await api.sql(`SELECT md5(string_agg(t::text, '|' ORDER BY t::text)) AS hash FROM ${table} t`);
    hashes.push(rows[0]?.['hash']);
  }
  return hashes.join(' ');
}
