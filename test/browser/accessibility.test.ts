import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { axeViolations, SCREENS } from '#test/support/browser.ts';
import { DEMO_PROJECT, PASSWORD, startDemoWorld, type World } from '#test/support/journey-world.ts';
import { boxesOf, overflowPx, tabTo } from '#test/support/pages-boxes.ts';
import { answer, field, openProject, openScenario, savedState } from '#test/support/pages-scenario.ts';
import { IS_LONG } from '#test/support/long.ts';

const SCENARIO = 'Two LR6, report every 15 min';
const EVERY_LOOK = (['phone', 'laptop'] as const).flatMap((screen) =>
  (['light', 'dark'] as const).map((colorScheme) => ({ screen, colorScheme })),
);
/** Each width and each scheme once; a long run looks at every pair. */
const LOOKS = IS_LONG
  ? EVERY_LOOK
  : EVERY_LOOK.filter(({ screen, colorScheme }) => (screen === 'phone') === (colorScheme === 'light'));

let world: World;
beforeAll(async () => {
  world = await startDemoWorld();
});
afterAll(async () => {
  await world?.end();
});

const WIDTHS = IS_LONG ? (['phone', 'laptop', 'desk'] as const) : (['phone', 'desk'] as const);

/** The same beside every tab of a scenario, and looked at there once. */
const BESIDE_TABS = ['section[aria-labelledby="forecast-heading"]', 'section[aria-labelledby="details-heading"]'];

/** Rules whose answer depends on colours and sizes; the others say the same in every look of one width. */
const LOOK_RULES = ['color-contrast', 'link-in-text-block', 'scrollable-region-focusable', 'target-size'];

/** What is wrong with the page as it stands in each look: axe's findings and sideways scrolling. */
async function findings(page: Page, exclude: string[] = []): Promise<string[]> {
  const found: string[] = [];
  for (const { screen, colorScheme } of LOOKS) {
    await page.setViewportSize(SCREENS[screen]);
    await page.emulateMedia({ colorScheme });
    const wide = await overflowPx(page);
    const isFirst = screen === LOOKS[0]?.screen && colorScheme === LOOKS[0].colorScheme;
    const rules = isFirst || LOOKS === EVERY_LOOK ? undefined : LOOK_RULES;
    const violations = await axeViolations(page, { rules, exclude });
    if (wide > 0) violations.push(`the page scrolls sideways by ${wide} px`);
    found.push(...violations.map((text) => `${screen}, ${colorScheme}: ${text}`));
  }
  await page.setViewportSize(SCREENS.laptop);
  return found;
}

describe('a page before the sign-in has no axe violation and no sideways scrolling, narrow and wide, light and dark', () => {
  let page: Page;
  beforeAll(async () => {
    page = (await world.open()).page;
  });

  it.each([
    { path: '/sign-in', heading: 'Sign in' },
    { path: '/setup#token=wrong', heading: 'The first owner' },
  ])('$path', async ({ path, heading }) => {
    await page.goto(path);
    await page.getByRole('heading', { level: 1, name: heading }).waitFor();
    expect(await findings(page)).toEqual([]);
  });
});

describe('a page after the sign-in has no axe violation and no sideways scrolling, narrow and wide, light and dark', () => {
  let page: Page;
  let scenario: string;
  beforeAll(async () => {
    page = await world.signedIn();
    await openScenario(page, DEMO_PROJECT, SCENARIO);
    scenario = new URL(page.url()).pathname;
  });

  it.each(['', '/supply', '/climate', '/target', '/revisions'])('/scenarios/:id%s', async (tab) => {
    await page.goto(scenario + tab);
    await answer(page);
    await page.getByRole('main').getByRole('heading', { level: 2 }).first().waitFor();
    expect(await findings(page, tab === '' ? [] : BESIDE_TABS)).toEqual([]);
  });

  it.each([
    { path: '/projects', ready: 'Frost post' },
    { path: '/library/parts', ready: 'Latching valve' },
    { path: '/library/cells', ready: 'CR2032' },
    { path: '/library/climates', ready: 'Cold store' },
    { path: '/library/items/cell%3ACR2032', ready: 'Capacity' },
    { path: '/account', ready: 'Current password' },
    { path: '/no-such-page', ready: 'nothing at this address' },
  ])('$path', async ({ path, ready }) => {
    await page.goto(path);
    await page.getByText(ready, { exact: false }).first().waitFor();
    expect(await findings(page)).toEqual([]);
  });

  it('/projects/:id', async () => {
    await openProject(page, DEMO_PROJECT);
    await page.getByRole('table', { name: 'Scenarios' }).waitFor();
    expect(await findings(page)).toEqual([]);
  });

  it('the page shown when another cannot be fetched', async () => {
    const fresh = await world.signedIn();
    await fresh.context().setOffline(true);
    await fresh.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: 'Library' }).click();
    await fresh.getByText('This page could not be fetched.').waitFor();
    expect(await findings(fresh)).toEqual([]);
  });
});

describe('the keyboard alone', () => {
  it('signs in, opens a scenario, changes a current and saves it', async () => {
    const { page } = await world.open();
    await page.goto('/sign-in');
    await page.getByLabel('E-mail').waitFor();
    await tabTo(page, 'E-mail');
    await page.keyboard.type('engineer@tarnfold.example');
    await page.keyboard.press('Tab');
    await page.keyboard.type(PASSWORD);
    await page.keyboard.press('Enter');
    await page.getByRole('table', { name: 'Projects' }).waitFor();
    await tabTo(page, 'Soil probe');
    await page.keyboard.press('Enter');
    await page.getByRole('table', { name: 'Scenarios' }).waitFor();
    const name = await page.getByRole('table', { name: 'Scenarios' }).getByRole('link').first().innerText();
    await tabTo(page, name);
    await page.keyboard.press('Enter');
    const before = await answer(page);
    const label = 'Microcontroller, Deep sleep, clock and memory kept: current, maximum';
    await tabTo(page, label);
    await page.keyboard.press('Control+a');
    await page.keyboard.type('7.7u');
    await page.keyboard.press('Control+s');
    expect(await savedState(page)).toMatch(/^revision \d+, saved today/);
    await page.reload();
    expect(await answer(page)).toBe(before);
    expect(await field(page, label).inputValue()).toBe('7.7 µA');
  });
});

describe('typing into a field', () => {
  it.each(WIDTHS)('moves nothing on the page at the width of a %s', async (screen) => {
    const page = await world.signedIn(undefined, { screen });
    await openScenario(page, DEMO_PROJECT, SCENARIO);
    const input = field(page, 'Microcontroller, Core running: current, typical');
    await input.scrollIntoViewIfNeeded();
    await input.focus();
    const watched = {
      header: 'header',
      'scenario header': 'main [class*=sticky]',
      tabs: 'nav[aria-label="Parts of the scenario"]',
      states: 'table[aria-label^="States of"]',
      transitions: 'table[aria-label^="Transitions of"]',
      answer: '[data-answer]',
      forecast: 'section[aria-labelledby="forecast-heading"]',
    };
    const before = await boxesOf(page, watched);
    expect(Object.values(before)).not.toContain(null);
    await page.keyboard.press('Control+a');
    for (const key of '2.9 mx') {
      await page.keyboard.press(key === ' ' ? 'Space' : key);
      await answer(page);
      expect(await boxesOf(page, watched)).toEqual(before);
    }
  });
});
