import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { pageSchema, type Page } from '#common/schemas/api/common.ts';
import { catalogueItems } from '#common/catalogue/catalogue.ts';
import { startApi } from '#test/support/api-server.ts';
import { buildScenario, buildStuckScenario } from '#test/support/api-scenario.ts';
import { buildWorkspace, emailOf, signedIn } from '#test/support/api-world.ts';

const api = await startApi('lists');
const north = await buildWorkspace(api, 'north');
await buildWorkspace(api, 'south');
const owner = await signedIn(api, emailOf('owner', 'north'));

afterAll(() => api.stop());

const named = z.looseObject({ id: z.string(), name: z.string() });
type Named = z.infer<typeof named>;

async function list(path: string): Promise<Page<Named>> {
  const response = await owner.get(`/api/v1/${path}`);
  expect(response.status, response.text).toBe(200);
  return pageSchema(named).parse(response.body);
}

async function names(path: string): Promise<string[]> {
  return (await list(path)).items.map(({ name }) => name);
}

describe('GET /projects', () => {
  beforeAll(async () => {
    for (const name of ['pear', 'Apple', 'äpfel', 'zebra 100%', 'Plum_tree']) {
      await owner.post('/api/v1/projects', { name });
    }
  });

  test('shows the workspace’s own projects only', async () => {
    expect((await list('projects')).total).toBe(6);
  });

  test('is sorted by name whatever its case', async () => {
    const sorted = ['Apple', 'Orchard', 'pear', 'Plum_tree', 'zebra 100%', 'äpfel'];
    expect(await names('projects?sort=name')).toEqual(sorted);
    expect(await names('projects?sort=-name')).toEqual(sorted.reverse());
  });

  test('is sorted by time of creation and of change', async () => {
    expect((await names('projects?sort=createdAt')).at(0)).toBe('Orchard');
    expect((await names('projects?sort=-createdAt')).at(0)).toBe('Plum_tree');
    await owner.patch(`/api/v1/projects/${north.projectId}`, { version: 1, description: 'Changed last' });
    expect((await names('projects')).at(0)).toBe('Orchard');
    expect((await names('projects?sort=updatedAt')).at(-1)).toBe('Orchard');
  });

  test('pages overlap nowhere and leave nothing out', async () => {
    const pages = await Promise.all([1, 2, 3, 4].map((page) => list(`projects?sort=name&pageSize=2&page=${page}`)));
    expect(pages.map(({ items }) => items.length)).toEqual([2, 2, 2, 0]);
    expect(new Set(pages.flatMap(({ items }) => items.map(({ id }) => id))).size).toBe(6);
    expect(pages[3]).toMatchObject({ page: 4, pageSize: 2, total: 6 });
  });

  test.each([
    ['APP', ['Apple']],
    ['ÄPF', ['äpfel']],
    ['100%25', ['zebra 100%']],
    ['_', ['Plum_tree']],
    ['nothing', []],
  ])('q=%s looks for exactly this text in the name, case ignored', async (text, found) => {
    expect(await names(`projects?q=${encodeURIComponent(decodeURIComponent(text))}`)).toEqual(found);
  });

  test('counts the scenarios that are not archived', async () => {
    const counted = async (): Promise<number> => {
      const { body } = await owner.get(`/api/v1/projects/${north.projectId}`);
      return Number(body.scenarioCount);
    };
    expect(await counted()).toBe(1);
    await owner.patch(`/api/v1/scenarios/${north.scenarioId}`, { version: 2, archived: true });
    expect(await counted()).toBe(0);
    await owner.patch(`/api/v1/scenarios/${north.scenarioId}`, { version: 3, archived: false });
  });
});

describe('PATCH /projects/:projectId', () => {
  test('archiving hides a project, and undoing brings it back', async () => {
    const { body } = await owner.post('/api/v1/projects', { name: 'Hidden' });
    const path = `/api/v1/projects/${body.id}`;
    expect((await owner.patch(path, { version: 1, archived: true })).body.archivedAt).toMatch(/Z$/);
    expect([await names('projects?q=Hidden'), await names('projects?q=Hidden&archived=true')]).toEqual([
      [],
      ['Hidden'],
    ]);
    expect((await owner.patch(path, { version: 2, archived: false })).body.archivedAt).toBeNull();
    expect(await names('projects?q=Hidden')).toEqual(['Hidden']);
    await owner.patch(path, { version: 3, archived: true });
  });

  test('a stale change is a 409 with both versions', async () => {
    const { body: first } = await owner.post('/api/v1/projects', { name: 'Contested' });
    const path = `/api/v1/projects/${first.id}`;
    const { body: current } = await owner.patch(path, { version: 1, name: 'Mine' });
    const yours = { version: 1, name: 'Yours' };
    const response = await owner.patch(path, yours);
    expect([response.status, response.body.current, response.body.yours]).toEqual([409, current, yours]);
    await owner.patch(path, { version: 2, archived: true });
  });
});

describe('GET /projects/:projectId/scenarios', () => {
  test('sorts by life: what outlives the horizon is longest, what has no forecast comes last', async () => {
    const { body: project } = await owner.post('/api/v1/projects', { name: 'Lives' });
    const path = `projects/${project.id}/scenarios`;
    const capacities: [string, number][] = [
      ['short', 30],
      ['long', 30_000],
      ['middle', 300],
    ];
    for (const [name, typical] of capacities) {
      const { supply } = buildScenario();
      const document = buildScenario({ name, supply: { ...supply, cell: { ...supply.cell, capacityC: { typical } } } });
      await owner.post(`/api/v1/${path}`, { document });
    }
    await owner.post(`/api/v1/${path}`, { document: buildStuckScenario() });
    expect(await names(`${path}?sort=life`)).toEqual(['short', 'middle', 'long', 'Half done']);
    expect(await names(`${path}?sort=-life`)).toEqual(['long', 'middle', 'short', 'Half done']);
    expect(await names(`${path}?sort=name`)).toEqual(['Half done', 'long', 'middle', 'short']);
    expect(await names(`${path}?q=LON`)).toEqual(['long']);
    expect(await names(path)).toEqual(['Half done', 'middle', 'long', 'short']);
    await owner.patch(`/api/v1/projects/${project.id}`, { version: 1, archived: true });
  });
});

describe('GET /library', () => {
  const path = (query: string): string => `library?pageSize=100&${query}`;
  const catalogue = catalogueItems();
  const part = buildScenario().node.parts[0];

  beforeAll(async () => {
    for (const name of ['AAA first', 'lr', 'Middle', 'zzz last', 'Ümlaut']) {
      await owner.post('/api/v1/library', { name, content: { kind: 'part', part } });
    }
  });

  test('merges the workspace’s items and the catalogue’s into one order', async () => {
    const { items, total } = await list(path('sort=name'));
    expect(total).toBe(catalogue.length + 6);
    const folded = items.map(({ name }) => name.toLowerCase());
    expect(folded).toEqual([...folded].sort());
    expect(new Set(items.map(({ id }) => id)).size).toBe(total);
  });

  test.each(['name', '-name', 'updatedAt', '-updatedAt'])(
    'in the order %s, pages of 3 make up the whole',
    async (sort) => {
      const whole = (await list(path(`sort=${sort}`))).items.map(({ id }) => id);
      const paged: string[] = [];
      for (let page = 1; paged.length < whole.length; page += 1) {
        const { items } = await list(`library?sort=${sort}&pageSize=3&page=${page}`);
        expect(items.length).toBeGreaterThan(0);
        paged.push(...items.map(({ id }) => id));
      }
      expect(paged).toEqual(whole);
      expect((await list(`library?sort=${sort}&pageSize=3&page=9999`)).items).toEqual([]);
    },
  );

  test('filters by kind, origin and text', async () => {
    const cells = await list(path('kind=cell'));
    for (const item of cells.items) expect(item).toMatchObject({ content: { kind: 'cell' } });
    expect((await list(path('origin=workspace'))).total).toBe(6);
    expect((await list(path('origin=catalogue'))).total).toBe(catalogue.length);
    expect(await names(path('q=MIDDLE'))).toEqual(['Middle']);
  });

  test('catalogue items come with their content and cannot be changed', async () => {
    const { items } = await list(path('origin=catalogue'));
    const [first] = items;
    expect(items).toEqual(expect.arrayContaining([expect.objectContaining(catalogue[0])]));
    expect(first).toMatchObject({ version: null });
    expect((await owner.patch(`/api/v1/library/${first?.id ?? ''}`, { version: 1, name: 'X' })).status).toBe(404);
  });
});

describe('library items', () => {
  const part = buildScenario().node.parts[0];
  const { cell } = buildScenario().supply;

  test('POST, GET, PATCH and archive keep content, note and version', async () => {
    const created = await owner.post('/api/v1/library', {
      name: 'Cell',
      note: 'Measured',
      content: { kind: 'cell', cell },
    });
    expect(created.body).toMatchObject({ origin: 'workspace', version: 1, content: { kind: 'cell', cell } });
    const path = `/api/v1/library/${created.body.id}`;
    expect((await owner.get(path)).body).toEqual(created.body);
    const changed = { ...cell, designation: 'other' };
    const patched = await owner.patch(path, { version: 1, note: 'Again', content: { kind: 'cell', cell: changed } });
    expect(patched.body).toMatchObject({ version: 2, name: 'Cell', note: 'Again', content: { cell: changed } });
    const archived = await owner.patch(path, { version: 2, archived: true });
    expect(archived.body.archivedAt).toMatch(/Z$/);
    expect(await names('library?origin=workspace&kind=cell')).toEqual([]);
  });

  test('PATCH to another kind is refused by name', async () => {
    const path = `/api/v1/library/${north.itemId}`;
    const response = await owner.patch(path, { version: 1, content: { kind: 'cell', cell } });
    expect([response.status, response.body.errors[0].path]).toEqual([400, 'content.kind']);
  });

  test('a stale PATCH is a 409 with both versions', async () => {
    const { body: first } = await owner.post('/api/v1/library', { name: 'P', content: { kind: 'part', part } });
    const path = `/api/v1/library/${first.id}`;
    const { body: current } = await owner.patch(path, { version: 1, name: 'Mine' });
    const response = await owner.patch(path, { version: 1, name: 'Yours' });
    expect([response.status, response.body.current]).toEqual([409, current]);
    expect(response.body.yours).toEqual({ version: 1, name: 'Yours' });
  });
});
