import fc from 'fast-check';
import { afterAll, describe, expect, test } from 'vitest';
import { forecast } from '#common/engine/index.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { scenarioDetailSchema } from '#common/schemas/api/scenarios.ts';
import { fieldOf, objectOf, pathsOf } from '#test/support/api-answers.ts';
import type { ApiClient } from '#test/support/api-client.ts';
import { arbitraryScenario } from '#test/support/arbitrary-scenario.ts';
import { startApi } from '#test/support/api-server.ts';
import { buildScenario, buildStuckScenario } from '#test/support/api-scenario.ts';
import { buildWorkspace, emailOf, signedIn } from '#test/support/api-world.ts';

const api = await startApi('scenarios');
const north = await buildWorkspace(api, 'north');
const engineer = await signedIn(api, emailOf('engineer', 'north'));
const owner = await signedIn(api, emailOf('owner', 'north'));

afterAll(() => api.stop());

const projectPath = `/api/v1/projects/${north.projectId}`;

async function create(document: Scenario = buildScenario(), note = ''): Promise<{ id: string; path: string }> {
  const response = await engineer.post(`${projectPath}/scenarios`, { document, note });
  expect(response.status, response.text).toBe(201);
  return { id: String(response.body.id), path: `/api/v1/scenarios/${response.body.id}` };
}

async function chainOf(id: string): Promise<unknown[]> {
  const rows = await api.sql('SELECT number, note FROM revisions WHERE scenario_id = $1 ORDER BY number', [id]);
  return rows.map(({ number, note }) => `${String(number)} ${String(note)}`.trim());
}

describe('POST /projects/:projectId/scenarios', () => {
  test('makes revision 1 with the document as sent and the engine’s forecast', async () => {
    const document = buildScenario({ name: 'Frost post' });
    const response = await engineer.post(`${projectPath}/scenarios`, { document, note: 'From a template' });
    const { outcome, lifeS, endMonth, engineVersion } = forecast(document, { withLedger: false });
    expect(response.body).toMatchObject({
      projectId: north.projectId,
      projectName: 'Orchard',
      name: 'Frost post',
      version: 1,
      revision: 1,
      document,
      updatedBy: 'engineer of north',
      archivedAt: null,
      forecast: { outcome, lifeS, endMonth, engineVersion, targetLifeS: document.target.lifeS },
    });
    expect(await chainOf(String(response.body.id))).toEqual(['1 From a template']);
  });

  test('tells every problem of a document at once, each where it stands', async () => {
    const document = buildScenario();
    const body = {
      document: {
        ...document,
        climate: { ...document.climate, startMonth: 13 },
        supply: { ...document.supply, series: 0, cell: { ...document.supply.cell, capacityC: { typical: -1 } } },
        surplus: 1,
      },
    };
    const response = await engineer.post(`${projectPath}/scenarios`, body);
    expect(response.status).toBe(400);
    expect(pathsOf(response).sort()).toEqual([
      'document.climate.startMonth',
      'document.supply.cell.capacityC.typical',
      'document.supply.series',
      'document.surplus',
    ]);
  });

  test('keeps a document whose node cannot run yet, without forecast', async () => {
    const document = buildStuckScenario();
    const response = await engineer.post(`${projectPath}/scenarios`, { document });
    expect([response.status, response.body.forecast, response.body.document]).toEqual([201, null, document]);
  });
});

describe('PUT /scenarios/:scenarioId', () => {
  test('makes the next revision and bumps the version', async () => {
    const { id, path } = await create();
    const document = buildScenario({ name: 'Renamed' });
    const response = await owner.put(path, { version: 1, document, note: 'Warmer' });
    expect(response.body).toMatchObject({
      id,
      name: 'Renamed',
      version: 2,
      revision: 2,
      document,
      updatedBy: 'owner of north',
    });
    expect((await engineer.get(path)).body).toEqual(response.body);
    expect(await chainOf(id)).toEqual(['1', '2 Warmer']);
  });

  test('a stale save is a 409 with both versions, and stores nothing', async () => {
    const { id, path } = await create();
    const first = await engineer.put(path, { version: 1, document: buildScenario({ name: 'First' }), note: 'first' });
    const yours = { version: 1, document: buildScenario({ name: 'Second' }), note: 'second' };
    const response = await owner.put(path, yours);
    expect([response.status, response.body.code]).toEqual([409, 'conflict']);
    expect(response.body.current).toEqual(first.body);
    expect(response.body.yours).toEqual(yours);
    expect(await chainOf(id)).toEqual(['1', '2 first']);
  });

  test('of 16 savers at once on one version one wins and 15 are told', async () => {
    const { id, path } = await create();
    const document = buildScenario();
    const answers = await Promise.all(
      Array.from({ length: 16 }, (_, at) => engineer.put(path, { version: 1, document, note: `saver ${at}` })),
    );
    const statuses = answers.map(({ status }) => status);
    expect(statuses.filter((status) => status === 200)).toHaveLength(1);
    expect(statuses.filter((status) => status === 409)).toHaveLength(15);
    const winner = answers.findIndex(({ status }) => status === 200);
    expect(await chainOf(id)).toEqual(['1', `2 saver ${winner}`]);
  });

  test('16 savers who try again until they win form one chain without gap or loss', async () => {
    const { id, path } = await create();
    const document = buildScenario();
    const save = async (saver: number): Promise<void> => {
      for (let version = 1; ;) {
        const response = await engineer.put(path, { version, document, note: `saver ${saver}` });
        if (response.status === 200) return;
        expect(response.status).toBe(409);
        version = scenarioDetailSchema.parse(response.body.current).version;
      }
    };
    await Promise.all(Array.from({ length: 16 }, (_, saver) => save(saver)));
    const rows = await api.sql('SELECT number, note FROM revisions WHERE scenario_id = $1 ORDER BY number', [id]);
    expect(rows.map(({ number }) => number)).toEqual(Array.from({ length: 17 }, (_, at) => at + 1));
    expect(new Set(rows.map(({ note }) => note)).size).toBe(17);
    expect((await engineer.get(path)).body).toMatchObject({ version: 17, revision: 17 });
  }, 120_000);

  test('a save and an archiving at once on one version: one of them is told', async () => {
    const { path } = await create();
    const answers = await Promise.all([
      engineer.put(path, { version: 1, document: buildScenario() }),
      owner.patch(path, { version: 1, archived: true }),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  test('a document of 1,000 long names close to the limit is taken', async () => {
    const document = buildScenario();
    const part = document.node.parts[0];
    if (part === undefined) throw new Error('The scenario has a part.');
    const states = Array.from({ length: 32 }, (_, at) => ({
      id: `s${at}`,
      name: 'n'.repeat(120),
      current: { typical: 1e-6, provenance: { kind: 'assumed' as const, text: 'x'.repeat(450) } },
    }));
    const parts = Array.from({ length: 20 }, (_, at) => ({
      ...part,
      id: `p${at}`,
      states,
      restStateId: 's0',
      transitions: [],
    }));
    const large = buildScenario({ node: { parts, routines: [], leakages: [] } });
    expect(JSON.stringify(large).length).toBeGreaterThan(400_000);
    const { path } = await create(large);
    expect((await engineer.get(path)).body.document).toEqual(large);
  });
});

describe('random documents', () => {
  test('come back bit for bit, with the forecast that the engine makes of what was sent', async () => {
    for (const document of fc.sample(arbitraryScenario({ maxParts: 3, maxRoutines: 3 }), {
      numRuns: 12,
      seed: 20261201,
    })) {
      const { path } = await create(document);
      const { body } = await engineer.get(path);
      expect(body.document).toEqual(document);
      expect(body.forecast).toMatchObject({ lifeS: forecast(document, { withLedger: false }).lifeS });
    }
  });
});

describe('PATCH /scenarios/:scenarioId', () => {
  test('archiving hides a scenario from the list, and undoing brings it back', async () => {
    const { id, path } = await create();
    const listed = async (query = ''): Promise<boolean> => {
      const response = await engineer.get(`${projectPath}/scenarios?pageSize=100${query}`);
      return fieldOf(response, 'id').includes(id);
    };
    const archived = await engineer.patch(path, { version: 1, archived: true });
    expect(archived.body.archivedAt).toMatch(/Z$/);
    expect([await listed(), await listed('&archived=true'), await listed('&archived=all')]).toEqual([
      false,
      true,
      true,
    ]);
    const again = await engineer.patch(path, { version: 2, archived: true });
    expect(again.body.archivedAt).toBe(archived.body.archivedAt);
    const restored = await engineer.patch(path, { version: 3, archived: false });
    expect([restored.body.archivedAt, restored.body.revision, await listed()]).toEqual([null, 1, true]);
  });
});

describe('POST /scenarios/:scenarioId/duplicate', () => {
  test('copies the latest document under another name, into a scenario of its own', async () => {
    const { id, path } = await create();
    await engineer.put(path, { version: 1, document: buildScenario({ target: { lifeS: 1e6, confidence: 0.5 } }) });
    const response = await owner.post(`${path}/duplicate`, { name: 'Every 5 min' });
    expect(response.status).toBe(201);
    expect(response.body).toMatchObject({ name: 'Every 5 min', revision: 1, version: 1, projectId: north.projectId });
    expect(response.body.document).toMatchObject({ name: 'Every 5 min', target: { lifeS: 1e6 } });
    expect(response.body.id).not.toBe(id);
    expect(await chainOf(String(response.body.id))).toEqual(['1 Copied from “Soil sensor”, revision 2.']);
  });

  test('copies into another project of the workspace', async () => {
    const { path } = await create();
    const project = await engineer.post('/api/v1/projects', { name: 'Other' });
    const response = await engineer.post(`${path}/duplicate`, { name: 'Copy', projectId: project.body.id });
    expect(response.body.projectName).toBe('Other');
  });
});

describe('export and import', () => {
  async function exported(client: ApiClient, path: string) {
    const response = await client.get(`${path}/export`);
    expect(response.status).toBe(200);
    return response;
  }

  test('GET /scenarios/:scenarioId/export is a file named after scenario and revision', async () => {
    const { path } = await create(buildScenario({ name: 'Zwölf "Grad"\r\nminus' }));
    const response = await exported(engineer, path);
    const disposition = String(response.headers['content-disposition']);
    expect(disposition).toMatch(/^attachment; filename="[\x20-\x7e]+"; filename\*=UTF-8''/);
    const name = decodeURIComponent(disposition.split("UTF-8''")[1] ?? '');
    expect(name).toBe('Zwölf "Grad"\r\nminus r1.json');
    expect(response.body).toMatchObject({ format: 'overwinter-scenario', schemaVersion: 1, revision: 1 });
  });

  test('a file imported again is the same document', async () => {
    const document = buildScenario({ name: 'Round trip' });
    const file = objectOf(await exported(engineer, (await create(document)).path));
    const response = await owner.post(`${projectPath}/import`, file);
    expect([response.status, response.body.document]).toEqual([201, document]);
    const [note] = await chainOf(String(response.body.id));
    expect(note).toMatch(/^1 Imported from a file of revision 1, exported 20/);
  });

  test('a file of another schema version is refused by name', async () => {
    const file = objectOf(await exported(engineer, (await create()).path));
    const response = await engineer.post(`${projectPath}/import`, { ...file, schemaVersion: 2 });
    expect([response.status, response.body.errors[0].path]).toEqual([400, 'schemaVersion']);
  });
});
