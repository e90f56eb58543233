import type { Page } from 'playwright-core';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { scenarioTemplate } from '#common/catalogue/templates.ts';
import { startDemoWorld, type World } from '#test/support/journey-world.ts';
import { storeScenario } from '#test/support/pages-api.ts';
import {
  answer,
  field,
  focusedLabel,
  openTab,
  pasteInto,
  save,
  savedState,
  type,
} from '#test/support/pages-scenario.ts';

const PART = 'Microcontroller, low power';
const RUNNING = `${PART}, Core running: current`;
const STOPPED = `${PART}, Core stopped, bus running: current`;

let world: World;
let page: Page;
let address: string;

beforeAll(async () => {
  world = await startDemoWorld();
  page = await world.signedIn();
});
afterAll(async () => {
  await world?.end();
});
beforeEach(async () => {
  address = await storeScenario(page, { ...scenarioTemplate('reporting-sensor').document, name: 'Edited' });
  await page.goto(address);
  await answer(page);
});

const rowNames = (table: string): Promise<string[]> =>
  page
    .getByRole('table', { name: table })
    .getByRole('textbox', { name: /^Name of the/ })
    .evaluateAll((inputs) => inputs.map((input) => (input instanceof HTMLInputElement ? input.value : '')));

describe('undo and redo by keys', () => {
  it('take back and repeat changes of the whole scenario, over its tabs', async () => {
    await type(page, `${RUNNING}, typical`, '3.3 mA');
    await page.getByRole('button', { name: 'Add a step' }).click();
    await openTab(page, 'Supply');
    await type(page, 'In series', '3');
    for (let times = 0; times < 3; times += 1) await page.keyboard.press('Control+z');
    expect(await field(page, `${RUNNING}, typical`).inputValue()).toBe('2.8 mA');
    expect(await rowNames('Steps of Measure and report')).toHaveLength(4);
    await savedState(page);
    await page.keyboard.press('Control+y');
    await page.keyboard.press('Control+Shift+z');
    await page.keyboard.press('Control+y');
    expect(await field(page, 'In series').inputValue()).toBe('3');
    await openTab(page, 'Node');
    expect(await field(page, `${RUNNING}, typical`).inputValue()).toBe('3.3 mA');
    expect(await rowNames('Steps of Measure and report')).toHaveLength(5);
  });
});

describe('keys in a table', () => {
  it('go down, sideways and to the next cell, and never change a figure', async () => {
    await field(page, `${STOPPED}, typical`).focus();
    await page.keyboard.press('ArrowDown');
    expect(await focusedLabel(page)).toBe(`${RUNNING}, typical`);
    await page.keyboard.press('ArrowUp');
    expect(await focusedLabel(page)).toBe(`${STOPPED}, typical`);
    await page.keyboard.press('ArrowRight');
    expect(await focusedLabel(page)).toBe(`${STOPPED}, maximum`);
    await page.keyboard.press('ArrowLeft');
    await page.keyboard.press('Tab');
    expect(await focusedLabel(page)).toBe(`${STOPPED}, maximum`);
    expect(await field(page, `${STOPPED}, typical`).inputValue()).toBe('800 µA');
    await savedState(page);
  });

  it('add a row below the last one with Enter', async () => {
    await field(page, `${RUNNING}, typical`).focus();
    await page.keyboard.press('Enter');
    await field(page, `${PART}, New state: current, typical`).waitFor();
    expect(await focusedLabel(page)).toBe('Name of the state');
  });
});

describe('rows of a table', () => {
  it('are duplicated and moved by buttons and keys', async () => {
    const table = 'Steps of Measure and report';
    await field(page, 'Duration of Measure').focus();
    await page.getByRole('button', { name: 'Duplicate Measure', exact: true }).click();
    const doubled = await rowNames(table);
    expect(doubled).toHaveLength(5);
    expect(doubled.slice(2)).toEqual(['Prepare the frame', 'Send the frame', 'Wait for the acknowledgement']);
    await field(page, 'Duration of Prepare the frame').focus();
    await page.keyboard.press('Alt+ArrowDown');
    expect((await rowNames(table)).slice(2)).toEqual([
      'Send the frame',
      'Prepare the frame',
      'Wait for the acknowledgement',
    ]);
    await page.getByRole('button', { name: 'Move Prepare the frame up' }).click();
    expect(await rowNames(table)).toEqual(doubled);
  });
});

describe('pasting a table from a spreadsheet', () => {
  it('fills states, adds new ones and reads every unit', async () => {
    await pasteInto(page, `${STOPPED}, typical`, '0.9 mA\t1.4 mA\n3100u\t4 mA\n250nA\t');
    const preview = page.getByRole('dialog', { name: 'Paste a table' });
    await preview.getByText('3 rows, 1 of them new.').waitFor();
    await preview.getByRole('button', { name: /^Paste/ }).click();
    expect(await field(page, `${STOPPED}, maximum`).inputValue()).toBe('1.4 mA');
    expect(await field(page, `${RUNNING}, typical`).inputValue()).toBe('3.1 mA');
    const added = page
      .getByRole('table', { name: `States of ${PART}` })
      .getByRole('row')
      .last();
    expect(await added.getByRole('textbox', { name: /: current, typical$/ }).inputValue()).toBe('250 nA');
    expect(await rowNames(`States of ${PART}`)).toHaveLength(4);
  });

  it('fills steps and names the cell that cannot be taken', async () => {
    await pasteInto(page, 'Duration of Measure', '21 ms\tCore running\n4 ms\tdancing');
    const preview = page.getByRole('dialog', { name: 'Paste a table' });
    await preview.getByText(`${PART} has no state “dancing”.`, { exact: false }).waitFor();
    await preview.getByRole('button', { name: 'Paste the 3 that can be taken' }).click();
    expect(await field(page, 'Duration of Measure').inputValue()).toBe('21 ms');
    expect(await field(page, 'Duration of Prepare the frame').inputValue()).toBe('4 ms');
    expect(await field(page, `${PART} in Measure`).locator('option:checked').innerText()).toBe('Core running');
  });
});

describe('unsaved work', () => {
  it('is kept over a reload, offered, and can be let go', async () => {
    await type(page, `${RUNNING}, typical`, '3.3 mA');
    await page.reload();
    await page.getByText('Unsaved changes from', { exact: false }).waitFor();
    expect(await field(page, `${RUNNING}, typical`).inputValue()).toBe('3.3 mA');
    await page.getByRole('button', { name: 'Discard them' }).click();
    expect(await field(page, `${RUNNING}, typical`).inputValue()).toBe('2.8 mA');
    await page.reload();
    await answer(page);
    expect(await page.getByText('Unsaved changes from', { exact: false }).count()).toBe(0);
  });

  it('is said to be kept while the network is lost, and saved by itself when it is back', async () => {
    await page.context().setOffline(true);
    await type(page, `${RUNNING}, typical`, '3.3 mA');
    await page.getByRole('button', { name: 'Save', exact: true }).click();
    await page.getByText('The server cannot be reached.').waitFor();
    await page.getByText('Not reached: kept here, saved as soon as the server answers').waitFor();
    await page.context().setOffline(false);
    expect(await savedState(page)).toMatch(/^revision 2/);
    await page.getByText('The server cannot be reached.').waitFor({ state: 'detached' });
    await page.reload();
    await answer(page);
    expect(await field(page, `${RUNNING}, typical`).inputValue()).toBe('3.3 mA');
  });
});

describe('a tab that cannot be fetched', () => {
  it('says so and leaves the scenario with its unsaved work on the page', async () => {
    await type(page, `${RUNNING}, typical`, '3.3 mA');
    await page.context().setOffline(true);
    await openTab(page, 'Target');
    await page.getByText('This page could not be fetched.').waitFor();
    await page.getByText('Unsaved changes to revision 1').waitFor();
    await openTab(page, 'Node');
    expect(await field(page, `${RUNNING}, typical`).inputValue()).toBe('3.3 mA');
    await page.context().setOffline(false);
  });
});

describe('two people in one scenario', () => {
  /** Has somebody else save first; then tries to save here. Gives the dialog that shows both sides. */
  async function collide(): Promise<ReturnType<Page['getByRole']>> {
    const other = await world.signedIn('owner@tarnfold.example');
    await other.goto(address);
    await answer(other);
    await type(other, `${STOPPED}, typical`, '0.9 mA');
    await save(other);
    await other.context().close();
    await type(page, `${RUNNING}, typical`, '3.3 mA');
    await page.keyboard.press('Control+s');
    const dialog = page.getByRole('dialog', { name: 'Odile Marsh saved revision 2 meanwhile' });
    await dialog.waitFor();
    expect(await dialog.getByRole('list', { name: 'Their changes' }).innerText()).toMatch(/800 µA → 900 µA/);
    expect(await dialog.getByRole('list', { name: 'Your changes' }).innerText()).toMatch(/2.8 mA → 3.3 mA/);
    return dialog;
  }

  it('shows the second what the first changed, and keeps theirs on choice', async () => {
    const dialog = await collide();
    await dialog.getByRole('button', { name: 'Take revision 2' }).click();
    expect(await savedState(page)).toMatch(/^revision 2/);
    expect(await field(page, `${STOPPED}, typical`).inputValue()).toBe('900 µA');
    expect(await field(page, `${RUNNING}, typical`).inputValue()).toBe('2.8 mA');
    await page.keyboard.press('Control+z');
    expect(await field(page, `${RUNNING}, typical`).inputValue()).toBe('3.3 mA');
  });

  it('keeps mine as a new revision on top on choice', async () => {
    const dialog = await collide();
    await dialog.getByRole('button', { name: 'Keep mine as a new revision on top' }).click();
    expect(await savedState(page)).toMatch(/^revision 3/);
    expect(await field(page, `${RUNNING}, typical`).inputValue()).toBe('3.3 mA');
    expect(await field(page, `${STOPPED}, typical`).inputValue()).toBe('800 µA');
  });
});

describe('figures without a maximum', () => {
  it('get an assumed one by one click, for one and for all, and stay marked', async () => {
    await openTab(page, 'Supply');
    const section = page.getByRole('region', { name: 'Figures without a maximum' });
    const single = section.getByRole('button', { name: /^max = .* assumed for / });
    const all = section.getByRole('button', { name: /^Assume it for all/ });
    const missing = Number((await all.innerText()).replace(/\D/g, ''));
    expect(missing).toBeGreaterThan(2);
    await single.first().click();
    await section.getByRole('button', { name: `Assume it for all ${missing - 1}` }).click();
    await section.getByText('Every figure that could turn out worse says how much.').waitFor();
    await openTab(page, 'Node');
    const label = 'Deep sleep, clock and memory kept to Core running: current';
    expect(await field(page, `${label}, maximum`).inputValue()).toBe('2.25 mA');
    const mark = page.getByRole('button', { name: new RegExp(`^${label}: assumed`) });
    expect(await mark.isVisible()).toBe(true);
  });
});
