import supertest from 'supertest';
import { afterAll, describe, expect, test } from 'vitest';
import { ApiClient, PASSWORD } from '#test/support/api-client.ts';
import { startApi } from '#test/support/api-server.ts';
import { buildWorkspace, emailOf, signedIn } from '#test/support/api-world.ts';

let nowMs = Date.now();
const api = await startApi('session', { now: () => nowMs });
const north = await buildWorkspace(api, 'north');
const south = await buildWorkspace(api, 'south');
const owner = emailOf('owner', 'north');
await api.sql('INSERT INTO memberships (workspace_id, user_id, role) VALUES ($1, $2, $3)', [
  south.id,
  north.userIds.owner,
  'viewer',
]);

afterAll(() => api.stop());

const DAY_MS = 86_400_000;
const SESSION = 'overwinter_session';

async function statusOf(client: ApiClient): Promise<number> {
  return (await client.get('/api/v1/projects')).status;
}

/** A new account with a password of its own, member of north. */
async function makeUser(name: string, password: string): Promise<string> {
  const email = `${name}@people.example`;
  const passwordHash = await api.passwords.hash(password);
  const userId = await api.database.unit.accounts.createUser({ email, name, passwordHash });
  await api.database.unit.accounts.addMember(north.id, userId, 'viewer');
  return email;
}

describe('GET /session', () => {
  test('nobody is signed in without a session, and nothing is stored', async () => {
    const response = await supertest(api.server).get('/api/v1/session');
    expect(response.body).toEqual({
      csrfToken: expect.stringMatching(/^[\w-]{43}$/),
      user: null,
      workspace: null,
      workspaces: [],
    });
    expect(ApiClient.cookie(response, SESSION)).toBeUndefined();
    expect(await api.sql('SELECT count(*)::int AS n FROM sessions')).toEqual([{ n: 0 }]);
  });

  test('a signed-in person sees who they are, without hash or epoch', async () => {
    const client = await signedIn(api, owner);
    const { body } = await client.get('/api/v1/session');
    expect(body).toMatchObject({
      user: { id: north.userIds.owner, email: owner, name: 'owner of north' },
      workspace: { id: north.id, name: 'north', role: 'owner', isDemo: false },
    });
    expect(body.user).toEqual({ id: north.userIds.owner, email: owner, name: 'owner of north' });
  });
});

describe('POST /session', () => {
  test('signing in makes a new session id and voids the token of before', async () => {
    const client = await new ApiClient(api).open();
    const before = client.csrfToken;
    const response = await client.post('/api/v1/session', { email: owner, password: PASSWORD });
    expect(response.status).toBe(200);
    expect(response.body.csrfToken).not.toBe(before);
    client.csrfToken = before;
    expect((await client.post('/api/v1/projects', { name: 'X' })).status).toBe(403);
  });

  test('signing in again changes the id of the session, and the old id is worth nothing', async () => {
    const client = new ApiClient(api);
    const first = ApiClient.cookie(await client.signIn(owner), SESSION);
    const second = ApiClient.cookie(await client.signIn(owner), SESSION);
    expect(second).not.toBe(first);
    const planted = await supertest(api.server)
      .get('/api/v1/projects')
      .set('Cookie', String(first).split(';')[0] ?? '');
    expect(planted.status).toBe(401);
  });

  test('a session id that the server did not make is not taken over', async () => {
    const visitor = await new ApiClient(api).open();
    const planted = `${SESSION}=s%3Aplanted-by-somebody-else.signature`;
    visitor.agent.jar.setCookie(planted);
    const response = await visitor.post('/api/v1/session', { email: owner, password: PASSWORD });
    expect(response.status).toBe(200);
    expect(ApiClient.cookie(response, SESSION)).not.toContain('planted');
    expect(await api.sql("SELECT sid FROM sessions WHERE sid LIKE 'planted%'")).toEqual([]);
  });

  test('the cookie is HttpOnly and SameSite=Lax, and not Secure over plain HTTP on loopback', async () => {
    const cookie = ApiClient.cookie(await new ApiClient(api).signIn(owner), SESSION);
    expect(cookie).toMatch(/; Path=\/; Expires=[^;]+; HttpOnly; SameSite=Lax$/);
  });

  test('an e-mail address is told in any case', async () => {
    expect((await new ApiClient(api).signIn(owner.toUpperCase())).status).toBe(200);
  });

  test('an unknown address and a wrong password get the same answer', async () => {
    const client = await new ApiClient(api).open();
    const answers = [
      await client.post('/api/v1/session', { email: owner, password: 'not the password' }),
      await client.post('/api/v1/session', { email: 'nobody@north.example', password: 'not the password' }),
    ].map(({ status, body, headers }) => {
      const { requestId: _id, ...rest } = body;
      const { date: _date, 'x-request-id': _header, ...others } = headers;
      return { status, rest, others };
    });
    expect(answers[0]).toMatchObject({ status: 401, rest: { code: 'wrong-credentials' } });
    expect(answers[1]).toEqual(answers[0]);
  });

  test.each([
    ['the last of 128 characters', `${'a'.repeat(127)}b`, `${'a'.repeat(127)}c`],
    ['the last of 64 characters of four bytes', `${'🌲'.repeat(63)}🌳`, '🌲'.repeat(64)],
    ['the case of one letter', 'An orchard asleep', 'an orchard asleep'],
    ['a space at the end', 'an orchard asleep ', 'an orchard asleep'],
  ])('%s counts', async (what, right, wrong) => {
    const email = await makeUser(what.replaceAll(' ', '-'), right);
    expect((await new ApiClient(api).signIn(email, wrong)).status).toBe(401);
    expect((await new ApiClient(api).signIn(email, right)).status).toBe(200);
  });

  test('passwords are stored as bcrypt hashes of the asked cost', async () => {
    const rows = await api.sql('SELECT password_hash AS hash FROM users');
    for (const { hash } of rows) expect(hash).toMatch(/^\$2[ab]\$04\$/);
  });
});

describe('a session', () => {
  test('ends 30 days after sign-in, however busy', async () => {
    const client = await signedIn(api, owner);
    nowMs += 30 * DAY_MS - 1_000;
    expect(await statusOf(client)).toBe(200);
    nowMs += 2_000;
    expect(await statusOf(client)).toBe(401);
  });

  test('ends a day after its last request, which each request puts off', async () => {
    const client = await signedIn(api, owner);
    const left = `SELECT extract(epoch FROM expire - now())::float8 AS s FROM sessions ORDER BY expire DESC LIMIT 1`;
    await api.sql("UPDATE sessions SET expire = now() + interval '1 hour'");
    expect(await statusOf(client)).toBe(200);
    const [row] = await api.sql(left);
    expect(Number(row?.['s'])).toBeGreaterThan(86_000);
    await api.sql("UPDATE sessions SET expire = now() - interval '1 second'");
    expect(await statusOf(client)).toBe(401);
  });
});

describe('DELETE /session', () => {
  test('signing out ends the session on the server', async () => {
    const client = await signedIn(api, owner);
    const cookies = client.agent.jar.getCookies({ path: '/', domain: '127.0.0.1', secure: false, script: false });
    const response = await client.delete('/api/v1/session');
    expect(response.body).toMatchObject({ user: null, workspace: null });
    const copied = await supertest(api.server).get('/api/v1/projects').set('Cookie', cookies.toValueString());
    expect([copied.status, await statusOf(client)]).toEqual([401, 401]);
  });

  test('the answer carries a token with which to sign in again', async () => {
    const client = await signedIn(api, owner);
    client.csrfToken = String((await client.delete('/api/v1/session')).body.csrfToken);
    expect((await client.post('/api/v1/session', { email: owner, password: PASSWORD })).status).toBe(200);
  });
});

describe('PUT /session/workspace', () => {
  test('the chosen workspace and its role count from then on', async () => {
    const client = await signedIn(api, owner);
    const response = await client.put('/api/v1/session/workspace', { workspaceId: south.id });
    expect(response.body.workspace).toMatchObject({ id: south.id, role: 'viewer' });
    expect((await client.get(`/api/v1/projects/${south.projectId}`)).status).toBe(200);
    expect((await client.get(`/api/v1/projects/${north.projectId}`)).status).toBe(404);
    expect((await client.post('/api/v1/projects', { name: 'X' })).status).toBe(403);
  });

  test('a workspace of others is refused', async () => {
    const client = await signedIn(api, emailOf('engineer', 'north'));
    const response = await client.put('/api/v1/session/workspace', { workspaceId: south.id });
    expect([response.status, response.body.errors[0].path]).toEqual([400, 'workspaceId']);
  });
});

describe('POST /session/password', () => {
  const path = '/api/v1/session/password';

  test('a change ends the other sessions and keeps this one, under a new id', async () => {
    const email = await makeUser('changer', PASSWORD);
    const [here, elsewhere] = [await signedIn(api, email), await signedIn(api, email)];
    const newPassword = 'a much better one';
    const response = await here.post(path, { currentPassword: PASSWORD, newPassword });
    expect(response.status).toBe(200);
    expect(ApiClient.cookie(response, SESSION)).toBeDefined();
    expect([await statusOf(here), await statusOf(elsewhere)]).toEqual([200, 401]);
    expect((await new ApiClient(api).signIn(email, PASSWORD)).status).toBe(401);
    expect((await new ApiClient(api).signIn(email, newPassword)).status).toBe(200);
  });

  test('a wrong current password changes nothing', async () => {
    const email = await makeUser('forgetful', PASSWORD);
    const client = await signedIn(api, email);
    const response = await client.post(path, { currentPassword: 'not the password', newPassword: 'a much better one' });
    expect([response.status, response.body.errors[0].path]).toEqual([400, 'currentPassword']);
    expect((await new ApiClient(api).signIn(email, PASSWORD)).status).toBe(200);
  });

  test.each([
    ['11 characters', 'x'.repeat(11), 400],
    ['12 characters', 'x'.repeat(12), 200],
    ['128 characters', 'x'.repeat(128), 200],
    ['129 characters', 'x'.repeat(129), 400],
  ])('a new password of %s is judged by its length', async (what, newPassword, status) => {
    const client = await signedIn(api, await makeUser(what.replace(' ', '-'), PASSWORD));
    expect((await client.post(path, { currentPassword: PASSWORD, newPassword })).status).toBe(status);
  });

  test('of parallel changes with the same current password one wins', async () => {
    const email = await makeUser('hasty', PASSWORD);
    const clients = await Promise.all([1, 2, 3, 4].map(() => signedIn(api, email)));
    const answers = await Promise.all(
      clients.map((client, at) => client.post(path, { currentPassword: PASSWORD, newPassword: `better one no ${at}` })),
    );
    expect(answers.map(({ status }) => status).filter((status) => status === 200)).toHaveLength(1);
  });
});

test('no password, cookie or token is in the log', async () => {
  const client = new ApiClient(api);
  const response = await client.signIn(owner);
  await client.post('/api/v1/session/password', {
    currentPassword: 'not the password',
    newPassword: 'a much better one',
  });
  const cookie = /=s%3A([\w-]+)/.exec(String(ApiClient.cookie(response, SESSION)))?.[1];
  const text = api.logText();
  expect(text.length).toBeGreaterThan(1_000);
  for (const secret of [PASSWORD, 'not the password', 'a much better one', client.csrfToken, String(cookie)]) {
    expect(text).not.toContain(secret);
  }
});
