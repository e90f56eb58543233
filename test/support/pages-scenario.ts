import type { Locator, Page } from 'playwright-core';

export type ScenarioTab = 'Node' | 'Supply' | 'Climate' | 'Target' | 'Revisions';

/** Makes a project on the page of projects and stays on its page. */
export async function makeProject(page: Page, name: string): Promise<void> {
  await page.goto('/projects');
  await page.getByRole('button', { name: 'New project' }).first().click();
  await page.getByRole('dialog').getByLabel('Name').fill(name);
  await page.getByRole('button', { name: 'Make the project' }).click();
  await page.getByRole('heading', { level: 1, name }).waitFor();
}

/** Opens a project from the list of projects. */
export async function openProject(page: Page, name: string): Promise<void> {
  await page.goto('/projects');
  await page.getByRole('table', { name: 'Projects' }).getByRole('link', { name, exact: true }).click();
  await page.getByRole('heading', { level: 1, name }).waitFor();
}

/** Makes a scenario on the page of a project; gives its address. */
export async function makeScenario(page: Page, name: string, template: string): Promise<string> {
  await page.getByRole('button', { name: 'New scenario' }).first().click();
  const dialog = page.getByRole('dialog', { name: 'New scenario' });
  await dialog.getByLabel('Name').fill(name);
  await dialog.getByRole('radio', { name: new RegExp(`^${template}`) }).check();
  await dialog.getByRole('button', { name: 'Make the scenario' }).click();
  await page.getByRole('heading', { level: 1, name }).waitFor();
  return new URL(page.url()).pathname;
}

/** Opens a scenario of a project and waits for its forecast. */
export async function openScenario(page: Page, project: string, scenario: string): Promise<void> {
  await openProject(page, project);
  await page.getByRole('table', { name: 'Scenarios' }).getByRole('link', { name: scenario, exact: true }).click();
  await page.getByRole('heading', { level: 1, name: scenario }).waitFor();
  await answer(page);
}

export async function openTab(page: Page, tab: ScenarioTab): Promise<void> {
  await page.getByRole('navigation', { name: 'Parts of the scenario' }).getByRole('link', { name: tab }).click();
}

/**
 * The sentence, or what stands in its place, once nothing is being computed any more.
 *
 * @param unlike waits until it says something else than this
 */
export async function answer(page: Page, unlike = ''): Promise<string> {
  const handle = await page.waitForFunction((before) => {
    const panel = document.querySelector('section[aria-labelledby="forecast-heading"]');
    const slots = [...document.querySelectorAll<HTMLElement>('[data-answer]')];
    const text = slots.find((slot) => slot.offsetParent !== null)?.innerText ?? '';
    return panel?.getAttribute('aria-busy') === 'false' && !text.startsWith('Computing') && text !== before ? text : '';
  }, unlike);
  return handle.jsonValue();
}

/** What the sentence says after something was done that must change it. */
export async function answerTo(page: Page, act: () => Promise<unknown>): Promise<string> {
  const before = await answer(page);
  await act();
  return answer(page, before);
}

/** A field of the editor by its whole label. */
export function field(page: Page, label: string): Locator {
  return page.getByLabel(label, { exact: true });
}

/** Types a text into a field key by key, as a person does, and leaves the field. */
export async function type(page: Page, label: string, text: string): Promise<void> {
  const input = field(page, label);
  await input.fill('');
  await input.pressSequentially(text);
  await input.blur();
}

/** Adds a part that the catalogue has and that a search finds. */
export async function addCataloguePart(page: Page, search: string, name: string): Promise<void> {
  await page.getByRole('button', { name: 'Add a part' }).click();
  await take(page, 'Find a part by name', search, name);
  await page.getByRole('region', { name: `States of ${name}, scrolls sideways` }).waitFor();
}

/** Chooses from the open library dialog. */
export async function take(page: Page, label: string, search: string, name: string): Promise<void> {
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('searchbox', { name: label }).fill(search);
  await dialog.getByRole('button', { name: new RegExp(`^${name}`) }).click();
  await dialog.waitFor({ state: 'detached' });
}

/** Saves and waits until the page says so; gives what it says. */
export async function save(page: Page): Promise<string> {
  await page.getByRole('button', { name: 'Save', exact: true }).click();
  return savedState(page);
}

/** Waits for a state without unsaved changes. */
export async function savedState(page: Page): Promise<string> {
  const state = page.getByRole('status').filter({ hasText: /^revision \d+, saved/ });
  await state.waitFor();
  return state.innerText();
}

/** Says what a part does in a step of the routine that is shown. */
export async function chooseState(page: Page, part: string, step: string, state: string): Promise<void> {
  await field(page, `${part} in ${step}`).selectOption({ label: state });
}

/** Label of the field that has the focus. */
export async function focusedLabel(page: Page): Promise<string> {
  return page.evaluate(() => {
    const focused = document.activeElement;
    return focused instanceof HTMLInputElement ? (focused.labels?.[0]?.textContent ?? '') : '';
  });
}

/** Pastes a text into a field through the clipboard. */
export async function pasteInto(page: Page, label: string, text: string): Promise<void> {
  await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
  await page.evaluate((copied) => navigator.clipboard.writeText(copied), text);
  await field(page, label).focus();
  await page.keyboard.press('Control+v');
}
