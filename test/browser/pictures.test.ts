import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { SCREENS, takePicture } from '#test/support/browser.ts';
import { DEMO_PROJECT, startDemoWorld, type World } from '#test/support/journey-world.ts';
import { answer, openScenario } from '#test/support/pages-scenario.ts';

const SCENARIO = 'Two LR6, report every 15 min';

/** Names of what of a list does not stand within the window, at least in part. */
async function outOfSight(page: Page, wanted: Record<string, string>): Promise<string[]> {
  return page.evaluate((selectors) => {
    const isSeen = (selector: string) =>
      [...document.querySelectorAll<HTMLElement>(selector)].some((element) => {
        const { top, bottom, left, right, width, height } = element.getBoundingClientRect();
        return width * height > 0 && bottom > 0 && top < window.innerHeight && right > 0 && left < window.innerWidth;
      });
    return Object.entries(selectors).flatMap(([name, selector]) => (isSeen(selector) ? [] : [name]));
  }, wanted);
}

const SENTENCE = { sentence: '[data-answer] p' };
const ANSWER = { ...SENTENCE, ribbon: '[role="slider"]' };
const DAY = { day: '#node-day-heading', lanes: '[role="group"][aria-label="One cycle"]' };

describe('the picture of', () => {
  let world: World;
  let page: Page;
  beforeAll(async () => {
    world = await startDemoWorld();
    page = await world.signedIn();
    await openScenario(page, DEMO_PROJECT, SCENARIO);
  });
  afterAll(async () => {
    await world?.end();
  });

  it.each([
    { name: 'scenario-1280', screen: 'laptop', colorScheme: 'light', wanted: { ...ANSWER, ...DAY } },
    { name: 'scenario-1280-dark', screen: 'laptop', colorScheme: 'dark', wanted: { ...ANSWER, ...DAY } },
    { name: 'scenario-1920', screen: 'desk', colorScheme: 'light', wanted: { ...ANSWER, ...DAY } },
    { name: 'scenario-390', screen: 'phone', colorScheme: 'light', wanted: SENTENCE },
  ] as const)('$name shows the essentials without scrolling', async ({ name, screen, colorScheme, wanted }) => {
    await page.setViewportSize(SCREENS[screen]);
    await page.emulateMedia({ colorScheme });
    expect(await answer(page)).toMatch(/^Lives /);
    expect(await outOfSight(page, wanted)).toEqual([]);
    await takePicture(page, name);
  });

  it.each([
    {
      name: 'projects-1280',
      path: '/projects',
      rows: ['Frost post', 'Soil probe', 'Gate counter', 'Cold-store logger'],
    },
    { name: 'library-1280', path: '/library/cells', rows: ['CR2032', 'ER14505', 'FR6'] },
  ])('$name shows what the list holds', async ({ name, path, rows }) => {
    await page.setViewportSize(SCREENS.laptop);
    await page.emulateMedia({ colorScheme: 'light' });
    await page.goto(path);
    for (const row of rows) await page.getByRole('rowheader', { name: row }).first().waitFor();
    await takePicture(page, name);
    expect(world.errors()).toEqual([]);
  });
});
