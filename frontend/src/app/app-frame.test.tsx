import { act, fireEvent, screen, waitFor } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { Breadcrumb, HeaderStatus } from '#frontend/components/frame-slots.tsx';
import { reportReachable } from '#frontend/lib/reachability.ts';
import { applyTheme } from '#frontend/lib/theme.ts';
import { buildSession, mockApi, renderRoutes, resetUi } from '#test/support/ui.tsx';
import { AppFrame } from './app-frame.tsx';
import { RouteError } from './route-error.tsx';

afterEach(() => {
  resetUi();
  applyTheme('system');
});

function Page() {
  return (
    <>
      <Breadcrumb crumbs={[{ label: 'Projects', to: '/projects' }, { label: 'Frost post' }]} />
      <HeaderStatus>revision 7</HeaderStatus>
      <h1>Frost post</h1>
    </>
  );
}

function Broken(): never {
  throw new Error('secret detail');
}

function open({ isDemo = false, at = '/' } = {}) {
  const session = buildSession();
  if (session.workspace) session.workspace.isDemo = isDemo;
  const sent = mockApi(({ method }) => ({ body: method === 'DELETE' ? buildSession(null) : session }));
  const children = [
    { path: '/', element: <Page /> },
    { path: '/sign-in', element: <p>the sign-in</p> },
    { path: '/broken', element: <Broken />, errorElement: <RouteError /> },
  ];
  return { sent, ...renderRoutes([{ element: <AppFrame />, children }], at) };
}

describe('AppFrame', () => {
  it('takes breadcrumb and status of the page into its head', async () => {
    open();
    const head = (await screen.findByText('revision 7')).closest('header');
    expect(head?.textContent).toContain('Projects/Frost post');
    expect(screen.getByText('Frost post', { selector: '[aria-current]' })).toBeTruthy();
  });

  it('signs out from the account menu', async () => {
    const { sent } = open();
    fireEvent.click(await screen.findByRole('button', { name: /Account of Pat Person/ }));
    fireEvent.click(screen.getByRole('menuitem', { name: 'Sign out' }));
    expect(await screen.findByText('the sign-in')).toBeTruthy();
    expect(sent.at(-1)).toMatchObject({ method: 'DELETE', path: '/session' });
  });

  it('changes to dark from the account menu', async () => {
    open();
    fireEvent.click(await screen.findByRole('button', { name: /Account of/ }));
    fireEvent.click(screen.getByRole('menuitemradio', { name: 'Dark' }));
    expect(document.documentElement.dataset['theme']).toBe('dark');
  });

  it('says while the server cannot be reached, and stops when it can', async () => {
    open();
    await screen.findByText('revision 7');
    act(() => reportReachable(false));
    expect(screen.getByText(/What you type is kept in this browser/)).toBeTruthy();
    act(() => reportReachable(true));
    expect(screen.queryByText(/What you type is kept/)).toBeNull();
  });

  it.each([true, false])('with a demo workspace %s: says so or not', async (isDemo) => {
    open({ isDemo });
    await screen.findByText('Tarnfold Orchards');
    expect(screen.queryByText(/all figures in it are invented/) !== null).toBe(isDemo);
  });

  it('keeps its head around a page that broke, and shows no detail', async () => {
    open({ at: '/broken' });
    await waitFor(() => expect(screen.getByText('This page broke.')).toBeTruthy());
    expect(screen.getByText('Overwinter')).toBeTruthy();
    expect(document.body.textContent).not.toContain('secret');
  });
});
