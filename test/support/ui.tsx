import { QueryClientProvider } from '@tanstack/react-query';
import { cleanup, render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { createMemoryRouter, RouterProvider, type RouteObject } from 'react-router-dom';
import { vi } from 'vitest';
import type { Role } from '#common/schemas/api/common.ts';
import type { Session } from '#common/schemas/api/session.ts';
import type { Problem } from '#common/schemas/problem.ts';
import { ToastProvider } from '#frontend/components/toast.tsx';
import { setCsrfToken } from '#frontend/lib/api-client.ts';
import { createQueryClient } from '#frontend/lib/query-client.ts';
import { reportReachable } from '#frontend/lib/reachability.ts';

export interface SentRequest {
  method: string;
  /** Path below `/api/v1`, with its query. */
  path: string;
  body: unknown;
  token: string | null;
}

export type Answer = { status?: number; body?: unknown } | 'unreachable';

/** Answers every `fetch` by `reply` and keeps what was sent. */
export function mockApi(reply: (request: SentRequest) => Answer): SentRequest[] {
  const sent: SentRequest[] = [];
  vi.stubGlobal('fetch', async (url: string, init: RequestInit = {}) => {
    const request: SentRequest = {
      method: init.method ?? 'GET',
      path: url.replace('/api/v1', ''),
      body: typeof init.body === 'string' ? JSON.parse(init.body) : undefined,
      token: new Headers(init.headers).get('X-CSRF-Token'),
    };
    sent.push(request);
    const answer = reply(request);
    if (answer === 'unreachable') throw new TypeError('Failed to fetch');
    const { status = 200, body } = answer;
    return new Response(body === undefined ? null : JSON.stringify(body), { status });
  });
  return sent;
}

/** Takes the mocks and the page away again; for `afterEach`. */
export function resetUi(): void {
  cleanup();
  vi.unstubAllGlobals();
  setCsrfToken(null);
  reportReachable(true);
}

export function problem(status: number, code: string, more: Partial<Problem> = {}): Answer {
  const body: Problem = { type: 'about:blank', title: 'Error', status, code, requestId: 'req-1', errors: [], ...more };
  return { status, body };
}

export function buildSession(role: Role | null = 'engineer'): Session {
  if (role === null) return { csrfToken: 'token-1', user: null, workspace: null, workspaces: [] };
  const workspace = { id: uuid(2), name: 'Tarnfold Orchards', role };
  return {
    csrfToken: 'token-1',
    user: { id: uuid(1), email: 'person@tarnfold.example', name: 'Pat Person' },
    workspace: { ...workspace, isDemo: false },
    workspaces: [workspace],
  };
}

export function uuid(n: number): string {
  return `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;
}

/** Renders routes at an address with everything that pages stand in. */
export function renderRoutes(routes: RouteObject[], at: string) {
  const router = createMemoryRouter(routes, { initialEntries: [at] });
  const client = createQueryClient();
  client.setDefaultOptions({ queries: { retry: false } });
  const view = render(
    <QueryClientProvider client={client}>
      <ToastProvider>
        <RouterProvider router={router} />
      </ToastProvider>
    </QueryClientProvider>,
  );
  return { ...view, router, client };
}

/** Renders one element as the page at `/`. */
export function renderPage(element: ReactNode) {
  return renderRoutes([{ path: '*', element }], '/');
}
