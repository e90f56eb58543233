import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import type { Role } from '#common/schemas/api/common.ts';
import type { Project } from '#common/schemas/api/projects.ts';
import { buildSession, mockApi, problem, renderRoutes, resetUi, uuid, type SentRequest } from '#test/support/ui.tsx';
import { ProjectsPage } from './projects-page.tsx';

afterEach(resetUi);

const frostPost: Project = {
  id: uuid(10),
  name: 'Frost post',
  description: 'Among the apple trees',
  version: 4,
  scenarioCount: 3,
  archivedAt: null,
  createdAt: '2026-01-01T00:00:00.000Z',
  updatedAt: '2026-11-01T00:00:00.000Z',
};

interface World {
  role?: Role;
  projects?: Project[];
  total?: number;
  isFailing?: boolean;
  at?: string;
}

function open({ role = 'engineer', projects = [frostPost], total, isFailing, at = '/projects' }: World = {}) {
  const world = { isFailing };
  const sent = mockApi((request) => {
    if (request.path === '/session') return { body: buildSession(role) };
    if (world.isFailing) return problem(500, 'internal');
    if (request.method === 'PATCH') return { body: { ...frostPost, version: 5, archivedAt: frostPost.updatedAt } };
    return { body: { items: projects, page: 1, pageSize: 25, total: total ?? projects.length } };
  });
  renderRoutes([{ path: '/projects', element: <ProjectsPage /> }], at);
  return { sent, world };
}

const patches = (sent: SentRequest[]) => sent.filter(({ method }) => method === 'PATCH').map(({ body }) => body);

describe('ProjectsPage', () => {
  it('lists the projects with what they hold', async () => {
    open();
    const row = (await screen.findByRole('link', { name: 'Frost post' })).closest('tr');
    if (!row) throw new Error('The link stands in no row.');
    expect(within(row).getByRole('cell', { name: '3' })).toBeTruthy();
  });

  it('asks the server for the page, order and text of the address', async () => {
    const { sent } = open({ at: '/projects?page=2&sort=name&q=frost&archived=true' });
    await screen.findByRole('link', { name: 'Frost post' });
    expect(sent.map(({ path }) => path)).toContain('/projects?page=2&sort=name&q=frost&archived=true');
  });

  it('archives with the version that was read, and undoes it with the version that came back', async () => {
    const { sent } = open();
    fireEvent.click(await screen.findByRole('button', { name: 'Actions for Frost post' }));
    fireEvent.click(screen.getByRole('menuitem', { name: 'Archive' }));
    fireEvent.click(await screen.findByRole('button', { name: 'Undo' }));
    await waitFor(() =>
      expect(patches(sent)).toEqual([
        { version: 4, archived: true },
        { version: 5, archived: false },
      ]),
    );
  });

  it.each(['viewer', 'sales'] as const)('shows a %s no act that changes anything', async (role) => {
    open({ role });
    await screen.findByRole('link', { name: 'Frost post' });
    expect(screen.queryByRole('button', { name: 'New project' })).toBeNull();
    expect(screen.queryByRole('button', { name: /Actions/ })).toBeNull();
  });

  it('says what to do when there is none yet', async () => {
    open({ projects: [] });
    expect(await screen.findByText('No project yet.')).toBeTruthy();
    expect(screen.getAllByRole('button', { name: 'New project' }).length).toBeGreaterThan(0);
  });

  it('says that nothing was found under a text', async () => {
    open({ projects: [], at: '/projects?q=tractor' });
    expect(await screen.findByText(/No project has “tractor”/)).toBeTruthy();
  });

  it('shows a failure with its request and tries again', async () => {
    const { world } = open({ isFailing: true });
    expect((await screen.findByRole('alert')).textContent).toContain('req-1');
    world.isFailing = false;
    fireEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(await screen.findByRole('link', { name: 'Frost post' })).toBeTruthy();
  });

  it('leads through many projects by pages', async () => {
    const { sent } = open({ total: 61 });
    fireEvent.click(await screen.findByRole('button', { name: 'Next page' }));
    await waitFor(() => expect(sent.at(-1)?.path).toContain('page=2'));
  });
});
