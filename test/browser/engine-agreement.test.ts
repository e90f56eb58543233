import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { demoWorkspace } from '#backend/services/demo/demo-workspace.ts';
import { projectPageSchema } from '#common/schemas/api/projects.ts';
import { scenarioDetailSchema, scenarioPageSchema } from '#common/schemas/api/scenarios.ts';
import { startDemoWorld, type World } from '#test/support/journey-world.ts';
import { getJson } from '#test/support/pages-api.ts';
import { openScenario } from '#test/support/pages-scenario.ts';

const TOLERANCE = 1e-9;

const NAMES = demoWorkspace.projects.flatMap(({ scenarios }) =>
  scenarios.map(({ revisions }) => (revisions.at(-1) ?? revisions[0]).document.name),
);

/** Every leaf of a JSON value by its path; the ledger's exact decimals are numbers too. */
function leavesOf(value: unknown, path = ''): Map<string, unknown> {
  if (typeof value === 'string' && /^-?\d+(\.\d+)?(e-?\d+)?$/.test(value)) return new Map([[path, Number(value)]]);
  if (typeof value !== 'object' || value === null) return new Map([[path, value]]);
  return new Map(Object.entries(value).flatMap(([key, inner]) => [...leavesOf(inner, `${path}/${key}`)]));
}

/** Paths at which two forecasts differ by more than the tolerance. */
function differences(here: unknown, there: unknown): string[] {
  const [mine, theirs] = [leavesOf(here), leavesOf(there)];
  return [...new Set([...mine.keys(), ...theirs.keys()])].filter((path) => {
    const [a, b] = [mine.get(path), theirs.get(path)];
    if (typeof a !== 'number' || typeof b !== 'number') return a !== b;
    return Math.abs(a - b) > TOLERANCE * Math.max(Math.abs(a), Math.abs(b));
  });
}

describe('forecast in the browser and on the server', () => {
  let world: World;
  let page: Page;
  let workerUrl: string;
  const idOf = new Map<string, string>();

  beforeAll(async () => {
    world = await startDemoWorld();
    page = await world.signedIn();
    const projects = projectPageSchema.parse(await getJson(page, '/projects?pageSize=50'));
    for (const { id } of projects.items) {
      const scenarios = scenarioPageSchema.parse(await getJson(page, `/projects/${id}/scenarios?pageSize=50`));
      for (const scenario of scenarios.items) idOf.set(scenario.name, scenario.id);
    }
    const started = page.waitForEvent('worker');
    await openScenario(page, 'Frost post', 'Two LR6, report every 15 min');
    workerUrl = (await started).url();
  });
  afterAll(async () => {
    await world?.end();
  });

  /** What the worker that the page runs answers to a document. */
  const askWorker = (document: unknown): Promise<{ forecast: unknown; problems: unknown }> =>
    page.evaluate(
      ({ url, scenario }) =>
        new Promise((resolve) => {
          const worker = new Worker(url, { type: 'module' });
          worker.addEventListener('message', ({ data }: MessageEvent<{ forecast: unknown; problems: unknown }>) => {
            worker.terminate();
            resolve(data);
          });
          worker.postMessage({ id: 1, document: scenario, withLedger: true });
        }),
      { url: workerUrl, scenario: document },
    );

  it.each(NAMES)('gives the same numbers for "%s"', async (name) => {
    const detail = scenarioDetailSchema.parse(await getJson(page, `/scenarios/${idOf.get(name)}`));
    const stored = await getJson(page, `/scenarios/${detail.id}/revisions/${detail.revision}/forecast`);
    const reply = await askWorker(detail.document);
    expect(reply.problems).toEqual([]);
    expect(leavesOf(stored).size).toBeGreaterThan(500);
    expect(differences(JSON.parse(JSON.stringify(reply.forecast)), stored)).toEqual([]);
  });

  it('gives other numbers for another document, so that equal ones mean something', async () => {
    const detail = scenarioDetailSchema.parse(await getJson(page, `/scenarios/${idOf.get(NAMES[0] ?? '')}`));
    const [before, after] = [
      await askWorker(detail.document),
      await askWorker({ ...detail.document, supply: { ...detail.document.supply, reserveFraction: 0.2 } }),
    ];
    expect(differences(before.forecast, after.forecast)).toContain('/lifeS');
  });
});
