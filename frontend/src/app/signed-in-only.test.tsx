import { act, fireEvent, screen, waitFor } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { useSignOut, watchSession } from '#frontend/features/session/api/session.ts';
import { api, nothing } from '#frontend/lib/api-client.ts';
import { buildSession, mockApi, problem, renderRoutes, resetUi } from '#test/support/ui.tsx';
import { SignInPage } from './pages/sign-in-page.tsx';
import { SignedInOnly } from './signed-in-only.tsx';

afterEach(resetUi);

const ROUTES = [
  { path: '/sign-in', element: <SignInPage /> },
  {
    element: <SignedInOnly />,
    children: [
      { path: '/projects', element: <p>the projects</p> },
      { path: '/scenarios/:id', element: <p>the scenario</p> },
    ],
  },
];

function SignOut() {
  const signOut = useSignOut();
  return <button onClick={() => signOut.mutate()}>leave</button>;
}

describe('SignedInOnly', () => {
  it('shows the page to who is signed in', async () => {
    mockApi(() => ({ body: buildSession() }));
    renderRoutes(ROUTES, '/scenarios/1');
    expect(await screen.findByText('the scenario')).toBeTruthy();
  });

  it('leads through the sign-in back to the page that was asked for', async () => {
    mockApi(({ method }) => ({ body: buildSession(method === 'POST' ? 'engineer' : null) }));
    const { router } = renderRoutes(ROUTES, '/scenarios/1?from=mail');
    await screen.findByRole('heading', { name: 'Sign in' });
    fireEvent.change(screen.getByLabelText('E-mail'), { target: { value: 'person@tarnfold.example' } });
    fireEvent.change(screen.getByLabelText('Password'), { target: { value: 'a long pass phrase' } });
    fireEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    expect(await screen.findByText('the scenario')).toBeTruthy();
    expect(router.state.location.search).toBe('?from=mail');
  });

  it('leads elsewhere than to another site after the sign-in', async () => {
    mockApi(() => ({ body: buildSession() }));
    renderRoutes(ROUTES, '/sign-in?next=https://elsewhere.example/');
    expect(await screen.findByText('the projects')).toBeTruthy();
  });

  it('asks for a sign-in as soon as the server no longer knows the session', async () => {
    mockApi(({ path }) => (path === '/session' ? { body: buildSession() } : problem(401, 'unauthenticated')));
    const { client } = renderRoutes(ROUTES, '/scenarios/1');
    watchSession(client);
    await screen.findByText('the scenario');
    await act(async () => {
      await api.get('/projects', nothing).catch(() => undefined);
    });
    await waitFor(() => expect(screen.getByRole('heading', { name: 'Sign in' })).toBeTruthy());
  });

  it('does not return to the page of somebody who signed out', async () => {
    mockApi(({ method }) => ({ body: buildSession(method === 'DELETE' ? null : 'engineer') }));
    const children = [{ path: '/scenarios/:id', element: <SignOut /> }];
    const routes = [
      { path: '/sign-in', element: <SignInPage /> },
      { element: <SignedInOnly />, children },
    ];
    const { router } = renderRoutes(routes, '/scenarios/1');
    fireEvent.click(await screen.findByRole('button', { name: 'leave' }));
    await screen.findByRole('heading', { name: 'Sign in' });
    expect(router.state.location.search).toBe('');
  });

  it('offers to try again when the server does not answer', async () => {
    let isUp = false;
    mockApi(() => (isUp ? { body: buildSession() } : problem(500, 'internal')));
    renderRoutes(ROUTES, '/scenarios/1');
    const retry = await screen.findByRole('button', { name: 'Try again' });
    isUp = true;
    fireEvent.click(retry);
    expect(await screen.findByText('the scenario')).toBeTruthy();
  });
});
