import { afterEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { buildSession, mockApi, problem, resetUi } from '#test/support/ui.tsx';
import { api, ApiError, nothing, onSignedOut, setCsrfToken } from './api-client.ts';
import { isServerReachable } from './reachability.ts';

afterEach(resetUi);

async function failureOf(promise: Promise<unknown>): Promise<ApiError> {
  const error = await promise.catch((caught: unknown) => caught);
  if (!(error instanceof ApiError)) throw new Error('The call did not fail with an ApiError.');
  return error;
}

describe('api', () => {
  it('get: returns the parsed body and sends no token', async () => {
    setCsrfToken('token-1');
    const sent = mockApi(() => ({ body: { n: 1 } }));
    expect(await api.get('/things', z.object({ n: z.number() }))).toEqual({ n: 1 });
    expect(sent[0]).toMatchObject({ method: 'GET', path: '/things', token: null });
  });

  it('post: fetches the token first when there is none', async () => {
    const sent = mockApi(({ path }) => (path === '/session' ? { body: buildSession() } : { status: 204 }));
    await api.post('/things', { n: 1 }, nothing);
    expect(sent.map(({ method, path, token }) => [method, path, token])).toEqual([
      ['GET', '/session', null],
      ['POST', '/things', 'token-1'],
    ]);
  });

  it('post: fetches a new token once when the old one is refused', async () => {
    setCsrfToken('stale');
    const sent = mockApi(({ path, token }) => {
      if (path === '/session') return { body: buildSession() };
      return token === 'stale' ? problem(403, 'cross-site') : { status: 204 };
    });
    await api.post('/things', {}, nothing);
    expect(sent.map(({ token }) => token)).toEqual(['stale', null, 'token-1']);
  });

  it('post: gives up when a new token is refused as well', async () => {
    setCsrfToken('stale');
    const sent = mockApi(({ path }) => (path === '/session' ? { body: buildSession() } : problem(403, 'cross-site')));
    expect((await failureOf(api.post('/things', {}, nothing))).status).toBe(403);
    expect(sent).toHaveLength(3);
  });

  it('get: throws the problem of the answer', async () => {
    mockApi(() => problem(400, 'invalid-input', { errors: [{ path: 'name', message: 'Give it a name.' }] }));
    const error = await failureOf(api.get('/things', nothing));
    expect(error.status).toBe(400);
    expect(error.problem?.errors).toEqual([{ path: 'name', message: 'Give it a name.' }]);
  });

  it('get: throws status 0 and marks the server unreachable when the network fails', async () => {
    mockApi(() => 'unreachable');
    expect((await failureOf(api.get('/things', nothing))).isOffline).toBe(true);
    expect(isServerReachable()).toBe(false);
  });

  it('get: marks the server reachable again with the next answer', async () => {
    mockApi(() => 'unreachable');
    await failureOf(api.get('/things', nothing));
    mockApi(() => ({ status: 204 }));
    await api.get('/things', nothing);
    expect(isServerReachable()).toBe(true);
  });

  it('get: refuses an answer of another shape', async () => {
    mockApi(() => ({ body: { n: 'one' } }));
    expect((await failureOf(api.get('/things', z.object({ n: z.number() })))).status).toBe(502);
  });

  it.each([
    ['unauthenticated', 1],
    ['wrong-credentials', 0],
  ])('401 with code %s: tells %i time(s) that the session has ended', async (code, times) => {
    const listener = vi.fn();
    onSignedOut(listener);
    mockApi(() => problem(401, code));
    await failureOf(api.get('/things', nothing));
    expect(listener).toHaveBeenCalledTimes(times);
  });
});
