import { fireEvent, screen, waitFor } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { scenarioTemplate, scenarioTemplates } from '#common/catalogue/templates.ts';
import type { Role } from '#common/schemas/api/common.ts';
import type { ScenarioDetail, ScenarioSummary } from '#common/schemas/api/scenarios.ts';
import { YEAR_S } from '#common/units/si.ts';
import { buildSession, mockApi, problem, renderRoutes, resetUi, uuid } from '#test/support/ui.tsx';
import { ProjectPage } from './project-page.tsx';

afterEach(resetUi);

const MOMENT = '2026-11-01T00:00:00.000Z';
const project = {
  id: uuid(10),
  name: 'Frost post',
  description: '',
  version: 1,
  scenarioCount: 1,
  archivedAt: null,
  createdAt: MOMENT,
  updatedAt: MOMENT,
};
const scenario: ScenarioSummary = {
  id: uuid(20),
  projectId: uuid(10),
  name: 'Two LR6',
  version: 7,
  revision: 7,
  forecast: { engineVersion: '1', outcome: 'undervoltage', lifeS: 4 * YEAR_S, endMonth: 2, targetLifeS: 5 * YEAR_S },
  archivedAt: null,
  createdAt: MOMENT,
  updatedAt: MOMENT,
  updatedBy: 'Pat Person',
};
const detail: ScenarioDetail = {
  ...scenario,
  id: uuid(21),
  projectName: project.name,
  document: scenarioTemplate('empty').document,
};

interface World {
  role?: Role;
  scenarios?: ScenarioSummary[];
  isMissing?: boolean;
}

function open({ role = 'engineer', scenarios = [scenario], isMissing = false }: World = {}) {
  const sent = mockApi(({ method, path }) => {
    if (path === '/session') return { body: buildSession(role) };
    if (isMissing) return problem(404, 'not-found');
    if (method === 'POST') return { status: 201, body: detail };
    if (path.includes('/scenarios'))
      return { body: { items: scenarios, page: 1, pageSize: 25, total: scenarios.length } };
    return { body: project };
  });
  const routes = [
    { path: '/projects/:projectId', element: <ProjectPage /> },
    { path: '/scenarios/:scenarioId', element: <p>the scenario</p> },
  ];
  return { sent, ...renderRoutes(routes, `/projects/${project.id}`) };
}

const posts = (sent: ReturnType<typeof mockApi>) => sent.filter(({ method }) => method === 'POST');

describe('ProjectPage', () => {
  it('tells each forecast in a short sentence and what became of the target', async () => {
    open();
    const row = (await screen.findByRole('link', { name: 'Two LR6' })).closest('tr');
    expect(row?.textContent.replaceAll('\u00a0', ' ')).toContain('Lives 4.0 years, ends in February');
    expect(row?.textContent.replaceAll('\u00a0', ' ')).toContain('misses the target of 5 years');
    expect(row?.textContent).toContain('revision 7, Pat Person');
  });

  it('makes a scenario from the chosen template under the typed name and opens it', async () => {
    const { sent } = open({ scenarios: [] });
    fireEvent.click((await screen.findAllByRole('button', { name: 'New scenario' }))[0] ?? document.body);
    fireEvent.change(screen.getByLabelText('Name'), { target: { value: 'Three LR6' } });
    const template = scenarioTemplates().at(-1);
    fireEvent.click(screen.getByRole('radio', { name: new RegExp(template?.name ?? 'none') }));
    fireEvent.click(screen.getByRole('button', { name: 'Make the scenario' }));
    expect(await screen.findByText('the scenario')).toBeTruthy();
    expect(posts(sent)[0]).toMatchObject({
      path: `/projects/${project.id}/scenarios`,
      body: { document: { name: 'Three LR6', node: template?.document.node } },
    });
  });

  it('duplicates under a name that says so and opens the copy', async () => {
    const { sent } = open();
    fireEvent.click(await screen.findByRole('button', { name: 'Actions for Two LR6' }));
    fireEvent.click(screen.getByRole('menuitem', { name: 'Duplicate' }));
    expect(await screen.findByText('the scenario')).toBeTruthy();
    expect(posts(sent)[0]).toMatchObject({ path: `/scenarios/${uuid(20)}/duplicate`, body: { name: 'Two LR6, copy' } });
  });

  it('imports an exported file', async () => {
    const { sent } = open();
    fireEvent.click(await screen.findByRole('button', { name: 'Import a file' }));
    const content = JSON.stringify({
      format: 'overwinter-scenario',
      schemaVersion: 1,
      exportedAt: MOMENT,
      revision: 3,
      scenario: detail.document,
    });
    fireEvent.change(screen.getByLabelText(/File exported/), {
      target: { files: [new File([content], 'scenario.json')] },
    });
    await screen.findByText(/Revision 3/);
    fireEvent.click(screen.getByRole('button', { name: 'Import' }));
    expect(await screen.findByText('the scenario')).toBeTruthy();
    expect(posts(sent)[0]).toMatchObject({ path: `/projects/${project.id}/import`, body: { revision: 3 } });
  });

  it('tells what is wrong with a file and sends nothing', async () => {
    const { sent } = open();
    fireEvent.click(await screen.findByRole('button', { name: 'Import a file' }));
    fireEvent.change(screen.getByLabelText(/File exported/), { target: { files: [new File(['{}'], 'other.json')] } });
    expect(await screen.findByText(/not a scenario of this version/)).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Import' }).hasAttribute('disabled')).toBe(true);
    expect(posts(sent)).toEqual([]);
  });

  it('lets a viewer export and nothing else', async () => {
    open({ role: 'viewer' });
    fireEvent.click(await screen.findByRole('button', { name: 'Actions for Two LR6' }));
    expect(screen.getAllByRole('menuitem').map((item) => item.textContent)).toEqual(['Export as a file']);
    expect(screen.queryByRole('button', { name: 'New scenario' })).toBeNull();
    expect(screen.queryByRole('button', { name: 'Archive the project' })).toBeNull();
  });

  it('says that there is nothing here when the project does not exist', async () => {
    open({ isMissing: true });
    await waitFor(() =>
      expect(screen.getByRole('heading', { level: 1 }).textContent).toMatch(/nothing at this address/),
    );
  });
});
