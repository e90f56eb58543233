import { mkdtemp, mkdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import supertest from 'supertest';
import { afterAll, describe, expect, test } from 'vitest';
import { forecast } from '#common/engine/index.ts';
import { ApiClient, PASSWORD } from '#test/support/api-client.ts';
import { startApi, type ApiServer } from '#test/support/api-server.ts';
import { startProxy } from '#test/support/api-proxy.ts';
import { buildScenario } from '#test/support/api-scenario.ts';
import { buildWorkspace, emailOf, signedIn } from '#test/support/api-world.ts';
import type { Ingredients } from '#backend/compose.ts';

const opened: ApiServer[] = [];
afterAll(async () => {
  for (const api of opened) await api.stop();
});

async function start(name: string, overrides: Partial<Ingredients> = {}): Promise<ApiServer> {
  const api = await startApi(name, overrides);
  opened.push(api);
  await buildWorkspace(api, 'north');
  return api;
}

describe('an error that nobody foresaw', () => {
  test('is answered with a fixed text and its request id, and logged with its cause', async () => {
    const api = await start('defect', {
      forecast: () => {
        throw new Error('SELECT secret FROM /work/engine.ts');
      },
    });
    const owner = await signedIn(api, emailOf('owner', 'north'));
    const response = await owner.post('/api/v1/forecast', { document: buildScenario() });
    expect(response.type).toBe('application/problem+json');
    expect(response.body).toEqual({
      type: 'about:blank',
      title: 'Internal Server Error',
      status: 500,
      code: 'internal',
      detail: 'Something went wrong on the server. The request id names the log entry.',
      requestId: response.headers['x-request-id'],
      errors: [],
    });
    const [entry] = api.logs.filter(({ msg }) => msg === 'unexpected error');
    expect(entry).toMatchObject({
      req: { id: response.body.requestId, path: '/api/v1/forecast' },
      err: { message: 'SELECT secret FROM /work/engine.ts' },
    });
  });

  test('of the engine does not keep a document from being saved', async () => {
    const api = await start('saves', {
      forecast: () => {
        throw new Error('defect');
      },
    });
    const owner = await signedIn(api, emailOf('owner', 'north'));
    const project = await owner.post('/api/v1/projects', { name: 'P' });
    const path = `/api/v1/projects/${project.body.id}/scenarios`;
    const response = await owner.post(path, { document: buildScenario() });
    expect([response.status, response.body.forecast]).toEqual([201, null]);
    expect(api.logs.some(({ msg }) => msg === 'forecast failed')).toBe(true);
  });

  test('an answer with a field that its schema does not have is refused', async () => {
    const leaky = (document: Parameters<typeof forecast>[0]) => ({ ...forecast(document), passwordHash: 'x' });
    const strict = await start('leaky', { forecast: leaky });
    const owner = await signedIn(strict, emailOf('owner', 'north'));
    const response = await owner.post('/api/v1/forecast', { document: buildScenario() });
    expect(response.status).toBe(500);
    expect(response.text).not.toContain('passwordHash');
  });
});

describe('a database that is away', () => {
  test('is told as 503 with Retry-After, by the API and by readiness, until it is back', async () => {
    const reference = await start('away');
    const proxy = await startProxy(reference.databaseUrl);
    const { createDataSource } = await import('#backend/persistence/data-source.ts');
    const { createSessionPool } = await import('#backend/persistence/session-pool.ts');
    const dataSource = await createDataSource(proxy.url).initialize();
    const sessionPool = createSessionPool(proxy.url, () => undefined);
    const api = await startApi('behind', { dataSource, sessionPool });
    const client = new ApiClient(api);
    await client.signIn(emailOf('owner', 'north'));
    const status = async (address: string): Promise<number> => (await client.get(address)).status;
    expect([await status('/health/ready'), await status('/api/v1/projects')]).toEqual([200, 200]);

    await proxy.cut();
    const ready = await client.get('/health/ready');
    expect([ready.status, ready.body.code, ready.headers['retry-after']]).toEqual([503, 'unavailable', '5']);
    expect(await status('/api/v1/projects')).toBe(503);
    expect((await client.post('/api/v1/session', { email: 'a@b.example', password: PASSWORD })).status).toBe(503);
    expect(await status('/health/live')).toBe(200);

    await proxy.mend();
    expect([await status('/health/ready'), await status('/api/v1/projects')]).toEqual([200, 200]);
    await sessionPool.end();
    await dataSource.destroy();
    await api.stop();
    await proxy.cut();
  });
});

describe('POST /session under load', () => {
  test('more hashes than may run and wait are refused with 503, unnoted as attempts', async () => {
    // Hashing yields every 100 ms only: the cost must be high enough for the others to arrive meanwhile.
    const api = await start('flood', { bcryptCost: 13, hashing: { maxAtOnce: 1, maxWaiting: 1 } });
    const client = await new ApiClient(api).open();
    const answers = await Promise.all(
      Array.from({ length: 16 }, (_, at) =>
        client.post('/api/v1/session', { email: `p${at}@north.example`, password: 'not the password' }),
      ),
    );
    const refused = answers.filter(({ status }) => status === 503);
    const judged = answers.filter(({ status }) => status === 401);
    expect(refused.length + judged.length).toBe(16);
    expect(judged.length).toBeGreaterThan(0);
    expect(refused[0]?.body.code).toBe('busy');
    expect(refused[0]?.headers['retry-after']).toBe('2');
    expect(await api.sql('SELECT count(*)::int AS n FROM sign_in_attempts')).toEqual([{ n: judged.length }]);
  });
});

describe('behind a proxy that ends HTTPS', () => {
  test('cookies are Secure with the __Host- prefix, and browsers are told to stay on HTTPS', async () => {
    const api = await start('https', { publicUrl: new URL('https://overwinter.example'), trustProxyHops: 1 });
    const https = { 'X-Forwarded-Proto': 'https' };
    const opened = await supertest(api.server).get('/api/v1/session').set(https);
    const visit = ApiClient.cookie(opened, '__Host-overwinter_visit');
    expect(visit).toMatch(/; Path=\/; HttpOnly; Secure; SameSite=Lax$/);
    const response = await supertest(api.server)
      .post('/api/v1/session')
      .set({ ...https, Cookie: visit?.split(';')[0] ?? '', 'X-CSRF-Token': String(opened.body.csrfToken) })
      .send({ email: emailOf('owner', 'north'), password: PASSWORD });
    expect(response.status).toBe(200);
    expect(ApiClient.cookie(response, '__Host-overwinter_session')).toMatch(
      /; Path=\/;.*HttpOnly; Secure; SameSite=Lax$/,
    );
    expect(response.headers['strict-transport-security']).toBe('max-age=31536000; includeSubDomains');
  });
});

describe('pages', () => {
  test('files with a hash stay in caches, the page does not, and what is missing is no page', async () => {
    const webRoot = await mkdtemp(path.join(tmpdir(), 'overwinter-web-'));
    await mkdir(path.join(webRoot, 'assets'));
    await writeFile(path.join(webRoot, 'index.html'), '<!doctype html><title>Page</title>');
    await writeFile(path.join(webRoot, 'assets/main-1a2b3c.js'), 'export {}');
    const api = await start('web', { webRoot });
    const get = (address: string) => supertest(api.server).get(address);
    const asset = await get('/assets/main-1a2b3c.js');
    expect(asset.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    for (const address of ['/', '/projects/1', '/index.html/../projects']) {
      const page = await get(address);
      expect([page.status, page.type, page.headers['cache-control']]).toEqual([200, 'text/html', 'no-cache']);
    }
    for (const address of ['/assets/gone.js', '/assets/', '/api/v1/gone', '/health/gone']) {
      const missing = await get(address);
      expect([address, missing.status, missing.type]).toEqual([address, 404, 'application/problem+json']);
    }
    const { status } = await supertest(api.server).post('/projects');
    expect(status).toBe(404);
    await rm(webRoot, { recursive: true });
  });
});
