import { afterAll, describe, expect, test } from 'vitest';
import { forecast } from '#common/engine/index.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { fieldOf, pageOf, pathsOf } from '#test/support/api-answers.ts';
import { startApi } from '#test/support/api-server.ts';
import { buildScenario, buildStuckScenario } from '#test/support/api-scenario.ts';
import { buildWorkspace, emailOf, signedIn } from '#test/support/api-world.ts';

const api = await startApi('revisions');
const north = await buildWorkspace(api, 'north');
const engineer = await signedIn(api, emailOf('engineer', 'north'));

afterAll(() => api.stop());

const FIRST = buildScenario({ name: 'First' });
const SECOND = buildScenario({ name: 'Second', target: { lifeS: 5e7, confidence: 0.9 } });

/** A scenario whose revisions have these documents. */
async function create(...documents: Scenario[]): Promise<{ id: string; path: string }> {
  const [first, ...later] = documents;
  const created = await engineer.post(`/api/v1/projects/${north.projectId}/scenarios`, { document: first });
  const path = `/api/v1/scenarios/${created.body.id}`;
  for (const [index, document] of later.entries()) {
    const response = await engineer.put(path, { version: index + 1, document, note: `save ${index + 1}` });
    expect(response.status).toBe(200);
  }
  return { id: String(created.body.id), path };
}

describe('GET /scenarios/:scenarioId/revisions', () => {
  test('lists the latest first, with author, note and forecast', async () => {
    const { id, path } = await create(FIRST, SECOND, buildStuckScenario());
    const { items, total, page } = pageOf(await engineer.get(`${path}/revisions`));
    expect([total, page]).toEqual([3, 1]);
    expect(items).toMatchObject([
      { revision: 3, note: 'save 2', scenarioId: id, author: 'engineer of north', forecast: null },
      { revision: 2, note: 'save 1', forecast: { targetLifeS: 5e7 } },
      { revision: 1, note: '' },
    ]);
  });

  test('is paged, sorted and searched by note', async () => {
    const { path } = await create(FIRST, SECOND, FIRST, SECOND);
    const numbers = async (query: string): Promise<unknown[]> =>
      fieldOf(await engineer.get(`${path}/revisions?${query}`), 'revision');
    expect(await numbers('sort=revision&pageSize=3')).toEqual([1, 2, 3]);
    expect(await numbers('sort=revision&pageSize=3&page=2')).toEqual([4]);
    expect(await numbers('q=SAVE%202')).toEqual([3]);
  });

  test('keeps the author of a member who has left', async () => {
    const { path } = await create(FIRST);
    await api.sql('UPDATE memberships SET removed_at = now() WHERE user_id = $1', [north.userIds.engineer]);
    const owner = await signedIn(api, emailOf('owner', 'north'));
    expect((await owner.get(`${path}/revisions`)).body.items[0].author).toBe('engineer of north');
    await api.sql('UPDATE memberships SET removed_at = NULL WHERE user_id = $1', [north.userIds.engineer]);
  });
});

describe('GET /scenarios/:scenarioId/revisions/:revision', () => {
  test('is the document as it was saved then', async () => {
    const { path } = await create(FIRST, SECOND);
    expect((await engineer.get(`${path}/revisions/1`)).body.document).toEqual(FIRST);
    expect((await engineer.get(`${path}/revisions/2`)).body.document).toEqual(SECOND);
  });
});

describe('POST /scenarios/:scenarioId/revisions/:revision/restore', () => {
  test('makes a new revision and leaves the others', async () => {
    const { path } = await create(FIRST, SECOND);
    const response = await engineer.post(`${path}/revisions/1/restore`, { version: 2, note: 'Back' });
    expect(response.body).toMatchObject({ version: 3, revision: 3, name: 'First', document: FIRST });
    expect((await engineer.get(`${path}/revisions/3`)).body).toMatchObject({ restoredFrom: 1, note: 'Back' });
    expect((await engineer.get(`${path}/revisions/2`)).body.document).toEqual(SECOND);
  });

  test('a stale restore is a 409 and stores nothing', async () => {
    const { path } = await create(FIRST, SECOND);
    const response = await engineer.post(`${path}/revisions/1/restore`, { version: 1, note: '' });
    expect([response.status, response.body.current.revision]).toEqual([409, 2]);
    expect((await engineer.get(`${path}/revisions`)).body.total).toBe(2);
  });
});

describe('GET /scenarios/:scenarioId/diff', () => {
  test('tells what changed between two revisions, in either direction', async () => {
    const { path } = await create(FIRST, SECOND);
    const { body } = await engineer.get(`${path}/diff?from=1&to=2`);
    expect(body).toEqual({
      from: 1,
      to: 2,
      changes: [
        { kind: 'changed', path: 'name', label: 'Name', before: 'First', after: 'Second' },
        {
          kind: 'changed',
          path: 'target.lifeS',
          label: 'Target, wanted life',
          before: FIRST.target.lifeS,
          after: 5e7,
        },
      ],
    });
    const back = await engineer.get(`${path}/diff?from=2&to=1`);
    expect(back.body.changes[0]).toMatchObject({ before: 'Second', after: 'First' });
  });

  test('tells each revision that does not exist', async () => {
    const { path } = await create(FIRST);
    const response = await engineer.get(`${path}/diff?from=7&to=8`);
    expect([response.status, pathsOf(response)]).toEqual([400, ['from', 'to']]);
  });
});

describe('forecasts', () => {
  test('GET of a stored revision is what the engine says of its document', async () => {
    const { path } = await create(FIRST, SECOND);
    const response = await engineer.get(`${path}/revisions/2/forecast`);
    expect(response.status).toBe(200);
    expect(response.body).toEqual(JSON.parse(JSON.stringify(forecast(SECOND))));
    expect(response.body.ledger.entries.length).toBeGreaterThan(0);
  });

  test('POST /forecast of a document is the same, and stores nothing', async () => {
    const before = await api.sql('SELECT count(*) FROM revisions');
    const viewer = await signedIn(api, emailOf('viewer', 'north'));
    const response = await viewer.post('/api/v1/forecast', { document: SECOND });
    expect(response.body).toEqual(JSON.parse(JSON.stringify(forecast(SECOND))));
    expect(await api.sql('SELECT count(*) FROM revisions')).toEqual(before);
  });

  test('POST /forecast of a node that cannot run tells where, below `document`', async () => {
    const response = await engineer.post('/api/v1/forecast', { document: buildStuckScenario() });
    expect([response.status, response.body.code]).toEqual([400, 'invalid-input']);
    expect(response.body.errors.length).toBeGreaterThan(0);
    for (const { path } of response.body.errors) expect(path).toMatch(/^document\.node\.routines\[1\]/);
  });

  test('GET of a stored revision that cannot run tells where in the document', async () => {
    const { path } = await create(FIRST, buildStuckScenario());
    const response = await engineer.get(`${path}/revisions/2/forecast`);
    expect(response.status).toBe(400);
    for (const error of response.body.errors) expect(error.path).toMatch(/^node\.routines\[1\]/);
  });
});

describe('revisions in the database', () => {
  test.each([
    ['UPDATE', "UPDATE revisions SET note = 'changed'"],
    ['an UPDATE of the document', "UPDATE revisions SET document = '{}'"],
    ['DELETE', 'DELETE FROM revisions'],
    ['TRUNCATE', 'TRUNCATE revisions CASCADE'],
  ])('%s is refused', async (_, statement) => {
    await create(FIRST);
    await expect(api.sql(statement)).rejects.toThrow('Rows of revisions are never changed.');
  });

  test('a number cannot be given twice', async () => {
    const { id } = await create(FIRST);
    const copy = `INSERT INTO revisions (scenario_id, number, workspace_id, document, author_id)
      SELECT scenario_id, number, workspace_id, document, author_id FROM revisions WHERE scenario_id = $1`;
    await expect(api.sql(copy, [id])).rejects.toThrow('revisions_pkey');
  });
});
