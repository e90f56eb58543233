import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { takePicture } from '#test/support/browser.ts';
import { DEMO_PROJECT, startDemoWorld, type World } from '#test/support/journey-world.ts';
import { answer, field, makeScenario, openProject, save, type } from '#test/support/pages-scenario.ts';

/** Journey B from a template: no duration is typed by hand. */
describe('journey B from the template of an acknowledged report', () => {
  let world: World;
  let page: Page;
  beforeAll(async () => {
    world = await startDemoWorld();
    page = await world.signedIn();
  });
  afterAll(async () => {
    await world?.end();
  });

  it('derives the send step from the link, octet by octet and phase by phase', async () => {
    await openProject(page, DEMO_PROJECT);
    await makeScenario(page, 'Every 15 min', 'Acknowledged report');
    expect(await answer(page)).toMatch(/^Lives /);
    await page.getByTitle('Derived; see below the table.').first().click();
    expect(await field(page, 'Payload').inputValue()).toBe('24 octets');
    await page.getByText(/35 octets of them PSDU: 1\.312\sms/).waitFor();
    await page.getByRole('table', { name: 'Phases of the exchange' }).waitFor();
    await takePicture(page, 'link-builder-1280', { fullPage: true });
  });

  it('duplicates it for 5 and 30 min, and tells their mean currents apart', async () => {
    const current = async (): Promise<string> =>
      (
        await page
          .locator('dl, ul, div')
          .filter({ hasText: /^Mean current from the cell/ })
          .last()
          .innerText()
      ).replace(/\s+/g, ' ');
    const currents = [await current()];
    for (const period of ['5 min', '30 min']) {
      await openProject(page, DEMO_PROJECT);
      await page.getByRole('button', { name: 'Actions for Every 15 min', exact: true }).click();
      await page.getByRole('menuitem', { name: 'Duplicate' }).click();
      await page.getByRole('heading', { level: 1, name: 'Every 15 min, copy' }).waitFor();
      await answer(page);
      await type(page, 'Period', period);
      await expect.poll(current).not.toBe(currents[0]);
      currents.push(await current());
      expect(await save(page)).toMatch(/saved/);
    }
    expect(new Set(currents).size).toBe(3);
    expect(await field(page, 'Period').inputValue()).toBe('30 min');
    expect(world.errors()).toEqual([]);
  });
});
