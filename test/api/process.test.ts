import { spawn, type ChildProcess } from 'node:child_process';
import { setTimeout as pause } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { demoWorkspace } from '#backend/services/demo/demo-workspace.ts';
import { DEMO_ACCOUNTS, demoEmail, seedDemo } from '#backend/services/demo/seed-demo.ts';
import { ApiClient, PASSWORD } from '#test/support/api-client.ts';
import { startApi } from '#test/support/api-server.ts';
import { emailOf, signedIn } from '#test/support/api-world.ts';
import { createTestDatabase, type TestDatabase } from '#test/support/database.ts';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const SECRET = 'a-secret-of-the-api-tests-only-0123456789';

interface Running {
  child: ChildProcess;
  output: () => string;
  exited: Promise<number | null>;
}

/** Starts the server from its sources, as a process of its own. */
function run(env: Record<string, string>, ...options: string[]): Running {
  const child = spawn(process.execPath, ['--import', 'tsx', 'backend/src/main.ts', ...options], {
    cwd: ROOT,
    env: { PATH: process.env['PATH'], TSX_TSCONFIG_PATH: 'backend/tsconfig.json', ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let text = '';
  for (const stream of [child.stdout, child.stderr]) stream?.on('data', (chunk: Buffer) => (text += chunk.toString()));
  const exited = new Promise<number | null>((resolve) => child.once('exit', resolve));
  return { child, output: () => text, exited };
}

/** Waits until the log has a line that matches, and gives its first group. */
async function logged({ output, child }: Running, pattern: RegExp): Promise<string> {
  while (child.exitCode === null) {
    const found = pattern.exec(output());
    if (found) return found[1] ?? '';
    await pause(20);
  }
  throw new Error(`The process ended before it logged ${String(pattern)}:\n${output()}`);
}

describe('main.ts', () => {
  let database: TestDatabase;
  let server: Running;
  let origin = '';

  beforeAll(async () => {
    database = await createTestDatabase('process');
    server = run({ DATABASE_URL: database.url, PORT: '0', OVERWINTER_SESSION_SECRET: SECRET });
    origin = `http://127.0.0.1:${await logged(server, /"port":(\d+),"msg":"listening"/)}`;
  });
  afterAll(async () => {
    server.child.kill('SIGKILL');
    await database.drop();
  });

  test('on a database without users prints a link whose token makes the first owner, once', async () => {
    const token = await logged(server, /"setupUrl":"http:[^"]+\/setup#token=([\w-]{43})"/);
    const opened = await fetch(`${origin}/api/v1/session`);
    const { csrfToken } = (await opened.json()) as { csrfToken: string };
    const cookie = opened.headers.getSetCookie()[0]?.split(';')[0] ?? '';
    const redeem = (): Promise<Response> =>
      fetch(`${origin}/api/v1/setup`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json', 'X-CSRF-Token': csrfToken, Cookie: cookie },
        body: JSON.stringify({
          token,
          workspaceName: 'Orchards',
          name: 'First Owner',
          email: 'First@owner.example',
          password: PASSWORD,
        }),
      });
    const first = await redeem();
    expect([first.status, await first.json()]).toEqual([
      201,
      expect.objectContaining({
        user: expect.objectContaining({ email: 'first@owner.example' }),
        workspace: expect.objectContaining({ name: 'Orchards', role: 'owner', isDemo: false }),
      }),
    ]);
    const second = await redeem();
    expect([second.status, await second.json()]).toMatchObject([400, { errors: [{ path: 'token' }] }]);
  });

  test('after SIGTERM finishes the request under way, takes no other, and ends with 0', async () => {
    const opened = await fetch(`${origin}/api/v1/session`);
    const { csrfToken } = (await opened.json()) as { csrfToken: string };
    const cookie = opened.headers.getSetCookie()[0]?.split(';')[0] ?? '';
    const underWay = fetch(`${origin}/api/v1/session`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json', 'X-CSRF-Token': csrfToken, Cookie: cookie },
      body: JSON.stringify({ email: 'first@owner.example', password: 'not the password' }),
    });
    await pause(50);
    server.child.kill('SIGTERM');
    expect((await underWay).status).toBe(401);
    expect(await server.exited).toBe(0);
    await expect(fetch(`${origin}/health/live`)).rejects.toThrow();
    expect(server.output()).toContain('"msg":"stopped"');
  });
});

test('main.ts --migrate-only brings the schema up and ends with 0', async () => {
  const database = await createTestDatabase('migrateonly');
  const process = run({ DATABASE_URL: database.url, OVERWINTER_SESSION_SECRET: SECRET }, '--migrate-only');
  expect(await process.exited, process.output()).toBe(0);
  expect(process.output()).not.toContain('listening');
  await database.drop();
});

test('main.ts tells all that is wrong with its settings and ends with 1', async () => {
  const process = run({ PORT: 'many', OVERWINTER_SESSION_SECRET: 'short', OVERWINTER_SEED_DEMO: '1' });
  expect(await process.exited).toBe(1);
  const names = ['DATABASE_URL', 'PORT', 'OVERWINTER_SESSION_SECRET'];
  for (const name of names) expect(process.output()).toContain(`${name}: `);
});

describe('seedDemo', () => {
  test('writes workspace, accounts and revisions once, and every account signs in with its role', async () => {
    const api = await startApi('demo');
    expect(await seedDemo(api, demoWorkspace, PASSWORD)).toBe(true);
    expect(await seedDemo(api, demoWorkspace, PASSWORD)).toBe(false);
    for (const { account } of DEMO_ACCOUNTS) {
      const client = await signedIn(api, demoEmail(account));
      const { body } = await client.get('/api/v1/session');
      expect(body.workspace).toMatchObject({ name: demoWorkspace.name, role: account, isDemo: true });
    }
    const client = await signedIn(api, demoEmail('viewer'));
    const { body } = await client.get('/api/v1/projects');
    expect(body.items).toMatchObject(demoWorkspace.projects.map(({ name }) => ({ name })));
    const [row] = await api.sql('SELECT count(*)::int AS n FROM revisions');
    const scenarios = demoWorkspace.projects.flatMap((project) => project.scenarios);
    expect(row?.['n']).toBe(scenarios.flatMap(({ revisions }) => revisions).length);
    await api.stop();
  });

  test('on a database with users issues no token for a first owner', async () => {
    const api = await startApi('token');
    expect(await api.setup.issueToken()).toMatch(/^[\w-]{43}$/);
    await api.database.unit.accounts.createUser({ email: emailOf('a', 'b'), name: 'A', passwordHash: 'x' });
    expect(await api.setup.issueToken()).toBeNull();
    await api.stop();
  });

  test('of tokens for a first owner only the newest is good, and none in plain in the database', async () => {
    const api = await startApi('tokens');
    const [older, newer] = [String(await api.setup.issueToken()), String(await api.setup.issueToken())];
    const setup = { workspaceName: 'W', name: 'N', email: 'n@w.example', password: PASSWORD };
    const client = await new ApiClient(api).open();
    expect((await client.post('/api/v1/setup', { ...setup, token: older })).status).toBe(400);
    expect(JSON.stringify(await api.sql('SELECT * FROM setup_tokens'))).not.toContain(newer);
    const answers = await Promise.all(
      [1, 2, 3].map(async (at) => {
        const other = await new ApiClient(api).open();
        return other.post('/api/v1/setup', { ...setup, email: `n${at}@w.example`, token: newer });
      }),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 400, 400]);
    await api.stop();
  });
});
