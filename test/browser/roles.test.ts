import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { DEMO_PROJECT, startDemoWorld, type World } from '#test/support/journey-world.ts';
import { answer, openProject, openScenario, openTab } from '#test/support/pages-scenario.ts';

const SCENARIO = 'Two LR6, report every 15 min';

/** Words of every button that would change something stored. */
const EDITS =
  /^(New|Import a file|Rename|Archive|Take |Save|with a note|Undo|Redo|\+ |Add |Remove|Duplicate|Move|Actions on|Assume|Copy into)/;

let world: World;
beforeAll(async () => {
  world = await startDemoWorld();
});
afterAll(async () => {
  await world?.end();
});

/** Buttons on the page that edit, by their names. */
async function editingButtons(page: Page): Promise<string[]> {
  const names = await page
    .getByRole('main')
    .getByRole('button')
    .evaluateAll((buttons) => buttons.map((button) => button.getAttribute('aria-label') ?? button.textContent ?? ''));
  return names.filter((name) => EDITS.test(name.trim()));
}

describe.each(['viewer', 'sales'])('the role %s', (role) => {
  let page: Page;
  beforeAll(async () => {
    page = await world.signedIn(`${role}@tarnfold.example`);
  });

  it('reads projects, scenarios and library without any edit action', async () => {
    expect(await editingButtons(page)).toEqual([]);
    await openProject(page, DEMO_PROJECT);
    await page.getByRole('table', { name: 'Scenarios' }).waitFor();
    expect(await editingButtons(page)).toEqual([]);
    await page.goto('/library/cells');
    await page.getByRole('table', { name: 'Cells' }).waitFor();
    expect(await editingButtons(page)).toEqual([]);
  });

  it('reads every tab of a scenario with its live forecast, and finds no field to type into', async () => {
    await openScenario(page, DEMO_PROJECT, SCENARIO);
    expect(await answer(page)).toMatch(/^Lives /);
    expect(await page.getByRole('status').filter({ hasText: ', for reading' }).isVisible()).toBe(true);
    for (const tab of ['Node', 'Supply', 'Climate', 'Target', 'Revisions'] as const) {
      await openTab(page, tab);
      await page.getByRole('main').getByRole('heading', { level: 2 }).first().waitFor();
      expect(await editingButtons(page)).toEqual([]);
      expect(await page.getByRole('main').getByRole('textbox').count()).toBe(0);
    }
  });
});

describe('signing out', () => {
  it('ends the session, and Back shows nothing of it', async () => {
    const page = await world.signedIn();
    await openScenario(page, DEMO_PROJECT, SCENARIO);
    await page.getByRole('button', { name: /^Account of/ }).click();
    await page.getByRole('menuitem', { name: 'Sign out' }).click();
    await page.getByRole('heading', { level: 1, name: 'Sign in' }).waitFor();
    await page.goBack();
    await page.getByRole('heading', { level: 1, name: 'Sign in' }).waitFor();
    expect(await page.getByText(SCENARIO).count()).toBe(0);
    expect(await page.evaluate(() => fetch('/api/v1/projects').then(({ status }) => status))).toBe(401);
  });
});
