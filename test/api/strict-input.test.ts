import { afterAll, describe, expect, test } from 'vitest';
import type { Route } from '#backend/http/route.ts';
import type { ApiClient } from '#test/support/api-client.ts';
import { bodyOf, fingerprint, idsOf, nameOf, pathOf } from '#test/support/api-samples.ts';
import { startApi } from '#test/support/api-server.ts';
import { buildWorkspace, emailOf, signedIn } from '#test/support/api-world.ts';

const api = await startApi('strict');
const north = await buildWorkspace(api, 'north');
const ids = idsOf(north);
const owner = await signedIn(api, emailOf('owner', 'north'));
const other = await signedIn(api, emailOf('viewer', 'north'));
const before = await fingerprint(api);

afterAll(() => api.stop());

const withInput = api.routes.filter((route) => route.input !== null).map((route) => [nameOf(route), route] as const);
const unsafe = api.routes.filter(({ method }) => method !== 'get').map((route) => [nameOf(route), route] as const);

function send(route: Route, client: ApiClient = owner) {
  if (route.method === 'get') throw new Error('Only unsafe routes have a body.');
  return client.send(route.method, pathOf(route, ids));
}

/** Sends a text as it stands, as JSON. */
async function raw(route: Route, text: string) {
  return send(route).set('Content-Type', 'application/json').send(text);
}

async function validBody(route: Route): Promise<Record<string, unknown>> {
  return (await bodyOf(api, route, ids, north)) ?? {};
}

/** Paths that an answer names, after it has proved to be a 400 problem. */
function namedPaths(response: { status: number; body: { code: string; errors: { path: string }[] }; text: string }) {
  expect({ status: response.status, code: response.body.code }, response.text.slice(0, 300)).toEqual({
    status: 400,
    code: 'invalid-input',
  });
  return response.body.errors.map(({ path }) => path);
}

/** Text of the body with one more key, written by hand. */
function textWith(body: Record<string, unknown>, extra: string): string {
  return JSON.stringify(body).replace(/\}$/, `${Object.keys(body).length > 0 ? ',' : ''}${extra}}`);
}

const nested = (depth: number): string => `${'['.repeat(depth)}${']'.repeat(depth)}`;

describe.each(withInput)('%s', (_, route) => {
  test('a key that is not known is refused by name', async () => {
    expect(namedPaths(await raw(route, textWith(await validBody(route), '"surplus":1')))).toContain('surplus');
  });

  test('a number too large for JSON is refused where it stands', async () => {
    expect(namedPaths(await raw(route, textWith(await validBody(route), '"big":{"a":[0,1e400]}')))).toEqual([
      'big.a[1]',
    ]);
  });

  test('NaN is no JSON', async () => {
    expect(namedPaths(await raw(route, textWith(await validBody(route), '"a":NaN')))).toEqual(['']);
  });

  test.each(['__proto__', 'constructor', 'prototype'])('the key %s is refused at any depth', async (key) => {
    const text = textWith(
      await validBody(route),
      `"a":{"b":[{"${key}":{"polluted":true}}]},"${key}":{"polluted":true}`,
    );
    expect(namedPaths(await raw(route, text)).sort()).toEqual([key, `a.b[0].${key}`].sort());
    expect(Reflect.get({}, 'polluted')).toBeUndefined();
  });

  test('nesting deeper than 32 levels is refused where it gets too deep', async () => {
    const body = await validBody(route);
    const path = `deep${'[0]'.repeat(31)}`;
    expect(namedPaths(await raw(route, textWith(body, `"deep":${nested(32)}`)))).toEqual([path]);
    expect(namedPaths(await raw(route, textWith(body, `"deep":${nested(31)}`)))).toEqual(['deep']);
    if (route.limits.bodyBytes > 100_000) {
      expect(namedPaths(await raw(route, textWith({}, `"deep":${nested(50_000)}`)))).toEqual([path]);
    }
  });

  test('text that cannot be stored is refused where it stands', async () => {
    const text = textWith(await validBody(route), String.raw`"a":"x\u0000","b":"\ud800"`);
    expect(namedPaths(await raw(route, text))).toEqual(['a', 'b']);
  });

  test('each field of a wrong type is refused by name, all at once', async () => {
    const body = await validBody(route);
    const wrong = Object.fromEntries(
      Object.keys(body).map((key) => [key, typeof body[key] === 'boolean' ? 'yes' : true]),
    );
    const named = namedPaths(await raw(route, JSON.stringify(wrong)));
    expect([...new Set(named)].sort()).toEqual(Object.keys(body).sort());
  });

  test.each(['null', '[]', '"text"', '1', ''])('the body %j is refused', async (text) => {
    expect(namedPaths(await raw(route, text))).toEqual(['']);
  });

  test('a body of another type or coding is refused with 415', async () => {
    const text = JSON.stringify(await validBody(route));
    const answers = [
      await send(route).set('Content-Type', 'text/plain').send(text),
      await send(route).set('Content-Type', 'application/x-www-form-urlencoded').send('name=x'),
      await send(route).set('Content-Type', 'application/json; charset=utf-16').send(text),
      await send(route).set({ 'Content-Type': 'application/json', 'Content-Encoding': 'gzip' }).send(text),
    ];
    expect(answers.map(({ status }) => status)).toEqual([415, 415, 415, 415]);
  });

  test('a body over the limit is refused with 413', async () => {
    const text = textWith(await validBody(route), `"a":"${'x'.repeat(route.limits.bodyBytes)}"`);
    const response = await raw(route, text);
    expect([response.status, response.body.code]).toEqual([413, 'body-too-large']);
  });
});

describe.each(unsafe)('%s', (_, route) => {
  test.each([
    ['another site', { 'Sec-Fetch-Site': 'cross-site' }],
    ['a sibling site', { 'Sec-Fetch-Site': 'same-site' }],
    ['a typed address', { 'Sec-Fetch-Site': 'none' }],
    ['another origin', { Origin: 'https://evil.example' }],
    ['an opaque origin', { Origin: 'null' }],
    ['a page without the token', { 'X-CSRF-Token': '' }],
    ['a page with the token of another session', { 'X-CSRF-Token': other.csrfToken }],
  ])('a request caused by %s is refused', async (_cause, headers) => {
    const body = await bodyOf(api, route, ids, north);
    const request = send(route).set(headers);
    const response = await (body === undefined ? request : request.send(body));
    expect([response.status, response.body.code]).toEqual([403, 'cross-site']);
  });

  test('a body where none is taken is refused', async () => {
    if (route.input !== null) return expect(route.limits.bodyBytes).toBeGreaterThan(0);
    expect(namedPaths(await send(route).send({ a: 1 }))).toEqual(['']);
  });
});

describe.each(api.routes.filter(({ method }) => method === 'get').map((route) => [nameOf(route), route] as const))(
  '%s',
  (_, route) => {
    test('a query key that is not known, or given twice, is refused by name', async () => {
      const path = pathOf(route, ids);
      const query = (text: string): string => `${path}${path.includes('?') ? '&' : '?'}${text}`;
      expect(namedPaths(await owner.get(query('surplus=1')))).toEqual(['surplus']);
      expect(namedPaths(await owner.get(query('__proto__=1')))).toEqual(['__proto__']);
      expect(namedPaths(await owner.get(query('q=%00')))).toContain('q');
    });
  },
);

const lists = api.routes
  .filter(
    ({ query }) => query.safeParse({ page: '1', sort: '-updatedAt' }).success || query.safeParse({ page: '1' }).success,
  )
  .map((route) => [nameOf(route), route] as const)
  .filter(([, route]) => !route.query.safeParse({ page: 'x' }).success);

describe.each(lists)('%s', (_, route) => {
  test.each([
    ['page=0', 'page'],
    ['page=-1', 'page'],
    ['page=1e400', 'page'],
    ['page=NaN', 'page'],
    ['page=1&page=2', 'page'],
    ['pageSize=0', 'pageSize'],
    ['pageSize=101', 'pageSize'],
    ['sort=id', 'sort'],
    ["sort=name'--", 'sort'],
    ['archived=maybe', 'archived'],
    [`q=${'x'.repeat(201)}`, 'q'],
  ])('?%s is refused by name', async (query, name) => {
    expect(namedPaths(await owner.get(`${pathOf(route, ids)}?${query}`))).toEqual([name]);
  });

  test('text looked for is never read as SQL or as a pattern', async () => {
    for (const text of ["' OR 1=1 --", '%', '_', '\\', '%%%', "'; DROP TABLE users; --"]) {
      const response = await owner.get(`${pathOf(route, ids)}?q=${encodeURIComponent(text)}`);
      expect([response.status, response.body.total]).toEqual([200, 0]);
    }
  });
});

test('ids in a path that are not well-formed lead nowhere', async () => {
  for (const path of ['projects/1', `projects/${'0'.repeat(36)}`, "scenarios/'", 'library/cell:CR2032']) {
    expect((await owner.get(`/api/v1/${path}`)).status).toBe(404);
  }
  for (const revision of ['0', '-1', '1.5', '1e3', '99', '9999999999']) {
    expect((await owner.get(`/api/v1/scenarios/${north.scenarioId}/revisions/${revision}`)).status).toBe(404);
  }
});

test('nothing was written by anything refused above', async () => {
  expect(await fingerprint(api)).toBe(before);
});
