import express, { type Express } from 'express';
import supertest from 'supertest';
import { z } from 'zod';
import { afterAll, describe, expect, test } from 'vitest';
import { isMethodRefusal, mount } from '#backend/http/mount.ts';
import type { Route } from '#backend/http/route.ts';
import { idsOf, nameOf, pathOf } from '#test/support/api-samples.ts';
import { startApi } from '#test/support/api-server.ts';
import { buildWorkspace } from '#test/support/api-world.ts';

const api = await startApi('routes');
const north = await buildWorkspace(api, 'north');
afterAll(() => api.stop());

/** Everything that the app runs besides mounted routes, in order. A new one shows here. */
const MIDDLEWARE = [
  'logRequest',
  'helmetMiddleware',
  'startWithoutSession',
  'neverStore',
  'session',
  'identify',
  'nothingHere',
  'nothingHere',
  'answerError',
];

const paths = z.record(z.string(), z.record(z.string(), z.unknown()));

interface Layer {
  name: string;
  handle: { stack?: unknown };
  route?: { path: unknown; stack: { method?: string; handle: object }[] };
}

/** Method and path of every route that Express knows, and the names of all other handlers. */
function walk(app: Express): { routes: string[]; others: string[] } {
  const layers = app.router.stack as unknown as Layer[];
  const routes: string[] = [];
  const others: string[] = [];
  for (const { route, name, handle } of layers) {
    if (route === undefined) {
      others.push(handle.stack === undefined ? name : `router ${name}`);
      continue;
    }
    const methods = route.stack
      .filter(({ handle: handler }) => !isMethodRefusal(handler))
      .map(({ method }) => method ?? 'all');
    for (const method of new Set(methods)) routes.push(`${method.toUpperCase()} ${String(route.path)}`);
  }
  return { routes: routes.sort(), others };
}

/** Routes of Express that the table does not have, and the other way round. */
function difference(app: Express, routes: readonly Route[]): { undeclared: string[]; unmounted: string[] } {
  const mounted = walk(app).routes;
  const declared = routes.map(nameOf);
  return {
    undeclared: mounted.filter((name) => !declared.includes(name)),
    unmounted: declared.filter((name) => !mounted.includes(name)),
  };
}

describe('table of routes', () => {
  test('Express has exactly the routes of the table', () => {
    expect(difference(api.app, api.routes)).toEqual({ undeclared: [], unmounted: [] });
    expect(new Set(api.routes.map(nameOf)).size).toBe(api.routes.length);
  });

  test('Express has no handler besides the named middleware', () => {
    expect(walk(api.app).others).toEqual(MIDDLEWARE);
  });

  test('the OpenAPI description has exactly the routes of the table', async () => {
    const { body } = await supertest(api.server).get('/api/v1/openapi.json');
    const described = Object.entries(paths.parse(body.paths)).flatMap(([path, methods]) =>
      Object.keys(methods).map((method) => `${method.toUpperCase()} ${path.replace(/\{(\w+)\}/g, ':$1')}`),
    );
    expect(described.sort()).toEqual(api.routes.map(nameOf).sort());
  });

  test('the OpenAPI description resolves each of its references', async () => {
    const { body } = await supertest(api.server).get('/api/v1/openapi.json');
    const references = [...JSON.stringify(body).matchAll(/"\$ref":"#\/components\/schemas\/(\w+)"/g)];
    expect(references.length).toBeGreaterThan(10);
    for (const [, name] of references) expect(body.components.schemas).toHaveProperty(name ?? '');
  });

  test.each([
    ['a route', (app: Express) => app.get('/api/v1/smuggled', (_request, response) => void response.json({}))],
    [
      'a route for all methods',
      (app: Express) => app.all('/api/v1/projects', (_request, response) => void response.end()),
    ],
  ])('%s smuggled past the table is found', (_, smuggle) => {
    const app = fixture();
    smuggle(app);
    expect(difference(app, api.routes).undeclared).not.toEqual([]);
  });

  test.each([
    ['a router', (app: Express) => app.use('/api/v1/hidden', express.Router())],
    ['a bare handler', (app: Express) => app.use('/api/v1/hidden', (_request, response) => void response.json({}))],
  ])('%s smuggled past the table is found', (_, smuggle) => {
    const app = fixture();
    expect(walk(app).others).toEqual([]);
    smuggle(app);
    expect(walk(app).others).toHaveLength(1);
  });

  test('policies are the reviewed ones', () => {
    const policies = api.routes.map((route) => `${route.policy} ${nameOf(route).replace('/api/v1', '')}`);
    expect(policies.sort()).toEqual(REVIEWED_POLICIES);
  });
});

function fixture(): Express {
  const app = express();
  mount(app, api.routes, { refuseUndeclaredAnswers: true, publicOrigin: 'http://127.0.0.1' });
  return app;
}

const REVIEWED_POLICIES = [
  'edit PATCH /library/:itemId',
  'edit PATCH /projects/:projectId',
  'edit PATCH /scenarios/:scenarioId',
  'edit POST /library',
  'edit POST /projects',
  'edit POST /projects/:projectId/import',
  'edit POST /projects/:projectId/scenarios',
  'edit POST /scenarios/:scenarioId/duplicate',
  'edit POST /scenarios/:scenarioId/revisions/:revision/restore',
  'edit PUT /scenarios/:scenarioId',
  'public DELETE /session',
  'public GET /health/live',
  'public GET /health/ready',
  'public GET /openapi.json',
  'public GET /session',
  'public POST /session',
  'public POST /setup',
  'read GET /library',
  'read GET /library/:itemId',
  'read GET /projects',
  'read GET /projects/:projectId',
  'read GET /projects/:projectId/scenarios',
  'read GET /scenarios/:scenarioId',
  'read GET /scenarios/:scenarioId/diff',
  'read GET /scenarios/:scenarioId/export',
  'read GET /scenarios/:scenarioId/revisions',
  'read GET /scenarios/:scenarioId/revisions/:revision',
  'read GET /scenarios/:scenarioId/revisions/:revision/forecast',
  'read POST /forecast',
  'signed-in POST /session/password',
  'signed-in PUT /session/workspace',
];

const METHODS = ['get', 'post', 'put', 'patch', 'delete'] as const;
const allPaths = [...new Set(api.routes.map(({ path }) => path))];

describe('every path', () => {
  test.each(allPaths)('%s answers undeclared methods with 405 and what is allowed', async (path) => {
    const ofPath = api.routes.filter((route) => route.path === path);
    const [first] = ofPath;
    if (first === undefined) throw new Error('A path has a route.');
    const declared: string[] = ofPath.map(({ method }) => method);
    const allowed = [...declared, ...(declared.includes('get') ? ['head'] : [])].map((method) => method.toUpperCase());
    for (const method of METHODS.filter((name) => !declared.includes(name))) {
      const response = await supertest(api.server)[method](pathOf(first, idsOf(north)));
      expect([method, response.status, response.body.code]).toEqual([method, 405, 'method-not-allowed']);
      expect(response.headers['allow']).toBe(allowed.sort().join(', '));
    }
  });

  test.each(api.routes.map((route) => [nameOf(route), route] as const))(
    '%s: the answer is never stored, never sniffed, and its type is told',
    async (_, route) => {
      const response = await supertest(api.server)[route.method](pathOf(route, idsOf(north)));
      expect(response.headers).toMatchObject({
        'cache-control': 'no-store',
        'x-content-type-options': 'nosniff',
        'referrer-policy': 'no-referrer',
      });
      expect(response.headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
      expect(response.headers['content-type']).toMatch(/^application\/(problem\+)?json; charset=utf-8$/);
    },
  );
});

describe('answers', () => {
  test('GET of an unknown API address is a 404 problem', async () => {
    const response = await supertest(api.server).get('/api/v1/nothing');
    expect(response.type).toBe('application/problem+json');
    expect(response.body).toEqual({
      type: 'about:blank',
      title: 'Not Found',
      status: 404,
      code: 'not-found',
      detail: 'There is nothing at this address.',
      requestId: response.headers['x-request-id'],
      errors: [],
    });
  });

  test('HEAD answers like GET, without a body', async () => {
    const response = await supertest(api.server).head('/api/v1/session');
    expect([response.status, response.text]).toEqual([200, undefined]);
  });

  test('an address that cannot be decoded is a 4xx problem', async () => {
    const response = await supertest(api.server).get('/api/v1/projects/%E0%A4%A');
    expect(response.type).toBe('application/problem+json');
    expect(response.status).toBeLessThan(500);
  });

  test('scripts may come from this origin only', async () => {
    const { headers } = await supertest(api.server).get('/health/live');
    const policy = headers['content-security-policy'] ?? '';
    expect(policy).toContain("script-src 'self';");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toContain('unsafe');
  });
});
