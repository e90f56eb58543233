import { afterAll, describe, expect, test } from 'vitest';
import { ROLES } from '#backend/domain/policies.ts';
import type { Route } from '#backend/http/route.ts';
import { ApiClient } from '#test/support/api-client.ts';
import {
  bodyOf,
  fingerprint,
  hasIds,
  idsOf,
  nameOf,
  pathOf,
  randomIds,
  type PathIds,
} from '#test/support/api-samples.ts';
import { startApi } from '#test/support/api-server.ts';
import {
  buildWorkspace,
  emailOf,
  removeMember,
  ROLE_NAMES,
  signedIn,
  type Workspace,
} from '#test/support/api-world.ts';

const api = await startApi('matrix');
const north = await buildWorkspace(api, 'north');
const south = await buildWorkspace(api, 'south');
const left = await buildWorkspace(api, 'left');
await removeMember(api, left.id, left.userIds.owner);

afterAll(() => api.stop());

interface Principal {
  name: string;
  email: string | null;
  role: (typeof ROLE_NAMES)[number] | null;
  /** Workspace whose ids are the principal's own, and one whose ids are foreign. */
  own: Workspace;
  foreign: Workspace;
}

const PRINCIPALS: readonly Principal[] = [
  ...ROLE_NAMES.map((role) => ({ name: role, email: emailOf(role, 'north'), role, own: north, foreign: south })),
  { name: 'anonymous', email: null, role: null, own: north, foreign: south },
  { name: 'owner of another workspace', email: emailOf('owner', 'south'), role: 'owner', own: south, foreign: north },
  { name: 'removed member', email: emailOf('owner', 'left'), role: null, own: left, foreign: north },
];

const ID_KINDS = ['own', 'foreign', 'random'] as const;

/** What the policy alone says; `null` for a success. */
function refusal(route: Route, { email, role }: Principal): number | null {
  if (route.policy === 'public') return null;
  if (email === null) return 401;
  if (route.policy === 'signed-in') return null;
  return role !== null && ROLES[route.policy].includes(role) ? null : 403;
}

function expectedStatus(route: Route, principal: Principal, kind: (typeof ID_KINDS)[number]): number {
  const refused = refusal(route, principal);
  if (refused !== null) return refused;
  if (hasIds(route)) return kind === 'own' ? route.success : 404;
  // Its token is unknown on a database that has users; somebody without workspace has none to choose.
  if (route.path === '/api/v1/setup') return 400;
  if (route.path === '/api/v1/session/workspace' && principal.name === 'removed member') return 400;
  return route.success;
}

async function clientOf({ email }: Principal): Promise<ApiClient> {
  return email === null ? new ApiClient(api).open() : signedIn(api, email);
}

const clients = new Map<string, ApiClient>();
for (const principal of PRINCIPALS) clients.set(principal.name, await clientOf(principal));

/** Routes that end or replace the session get one for themselves. */
async function clientFor(route: Route, principal: Principal): Promise<ApiClient> {
  const shared = clients.get(principal.name);
  return route.path.startsWith('/api/v1/session') || shared === undefined ? clientOf(principal) : shared;
}

function idsFor(kind: (typeof ID_KINDS)[number], { own, foreign }: Principal): PathIds {
  if (kind === 'random') return randomIds();
  return idsOf(kind === 'own' ? own : foreign);
}

async function ask(route: Route, principal: Principal, kind: (typeof ID_KINDS)[number]) {
  const client = await clientFor(route, principal);
  const ids = idsFor(kind, principal);
  const path = pathOf(route, ids);
  if (route.method === 'get') return client.get(path);
  return client.send(route.method, path, await bodyOf(api, route, ids, principal.own));
}

const isOfSession = (route: Route): boolean => route.path.startsWith('/api/v1/session');
// Last, because a change of password ends the sessions shared by the others.
const routes = [...api.routes.filter((route) => !isOfSession(route)), ...api.routes.filter(isOfSession)];
const cells = routes.flatMap((route) =>
  PRINCIPALS.map((principal) => [`${nameOf(route)} as ${principal.name}`, { route, principal }] as const),
);

describe('roles and routes', () => {
  test.each(cells)('%s: own, foreign and random ids get what the policy says', async (_, { route, principal }) => {
    const isRefusedWrite = route.method !== 'get' && refusal(route, principal) !== null;
    const before = isRefusedWrite ? await fingerprint(api) : '';
    const bodies: unknown[] = [];
    for (const kind of ID_KINDS.slice(0, hasIds(route) ? 3 : 1)) {
      const response = await ask(route, principal, kind);
      const expected = expectedStatus(route, principal, kind);
      expect({ kind, status: response.status }, response.text.slice(0, 500)).toEqual({ kind, status: expected });
      const { requestId: _id, ...rest } = response.body;
      bodies.push(rest);
    }
    expect(bodies[2]).toEqual(bodies[1]);
    if (isRefusedWrite) expect(await fingerprint(api)).toBe(before);
  });

  test('no GET route writes anything', async () => {
    const [owner] = PRINCIPALS;
    if (owner === undefined) throw new Error('The owner is the first principal.');
    const before = await fingerprint(api);
    for (const route of routes.filter(({ method }) => method === 'get')) await ask(route, owner, 'own');
    expect(await fingerprint(api)).toBe(before);
  });

  test('a role taken away acts on the next request of an open session', async () => {
    const client = await signedIn(api, emailOf('engineer', 'south'));
    expect((await client.post('/api/v1/projects', { name: 'Before' })).status).toBe(201);
    const change = 'UPDATE memberships SET role = $1 WHERE workspace_id = $2 AND user_id = $3';
    await api.sql(change, ['viewer', south.id, south.userIds.engineer]);
    expect((await client.post('/api/v1/projects', { name: 'After' })).status).toBe(403);
    await api.sql(change, ['engineer', south.id, south.userIds.engineer]);
  });

  test('a member removed is refused on the next request of an open session', async () => {
    const client = await signedIn(api, emailOf('sales', 'south'));
    expect((await client.get('/api/v1/projects')).status).toBe(200);
    await removeMember(api, south.id, south.userIds.sales);
    const response = await client.get('/api/v1/projects');
    expect([response.status, response.body.code]).toEqual([403, 'no-workspace']);
  });

  test('a copy into a project of another workspace is refused like one into no project', async () => {
    const client = await signedIn(api, emailOf('owner', 'north'));
    const path = `/api/v1/scenarios/${north.scenarioId}/duplicate`;
    for (const projectId of [south.projectId, randomIds().projectId]) {
      const response = await client.post(path, { name: 'Copy', projectId });
      expect([response.status, response.body.errors]).toEqual([
        400,
        [{ path: 'projectId', message: 'There is no project with this id.' }],
      ]);
    }
  });
});
