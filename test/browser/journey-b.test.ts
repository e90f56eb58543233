import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { DEMO_PROJECT, startDemoWorld, startEmptyWorld, type World } from '#test/support/journey-world.ts';
import {
  addCataloguePart,
  answer,
  chooseState,
  field,
  makeProject,
  makeScenario,
  openProject,
  openScenario,
  save,
  type,
} from '#test/support/pages-scenario.ts';
import { IS_LONG } from '#test/support/long.ts';

const PROJECT = 'Hedge node';
const RADIO = 'Transceiver 2.4 GHz, IEEE 802.15.4';
const CONTROLLER = 'Microcontroller, low power';
const SENSOR = 'Temperature and humidity sensor';

/** Adds a step at the end of the routine that is shown: its name, its duration and what its parts do. */
async function addStep(page: Page, name: string, duration: string, states: Record<string, string>): Promise<void> {
  await page.getByRole('button', { name: 'Add a step' }).click();
  const row = page
    .getByRole('table', { name: /^Steps of / })
    .getByRole('row')
    .last();
  const input = row.getByRole('textbox', { name: 'Name of the step' });
  await input.fill(name);
  await type(page, `Duration of ${name}`, duration);
  for (const [part, state] of Object.entries(states)) await chooseState(page, part, name, state);
}

/** A node of three catalogue parts with the routine "report" every 15 min: wake, sense, send, sleep. */
async function buildReportingNode(page: Page): Promise<void> {
  for (const [search, name] of [
    ['2.4', RADIO],
    ['low power', CONTROLLER],
    ['humidity', SENSOR],
  ] as const)
    await addCataloguePart(page, search, name);
  await page.getByRole('button', { name: 'Add a routine' }).click();
  await type(page, 'Name of the routine', 'report');
  await type(page, 'Period', '15 min');
  await addStep(page, 'wake', '2 ms', { [CONTROLLER]: 'Core running' });
  await addStep(page, 'sense', '14 ms', { [CONTROLLER]: 'Core stopped, bus running', [SENSOR]: 'Measuring' });
  await addStep(page, 'send', '1.3 ms', { [CONTROLLER]: 'Core stopped, bus running', [RADIO]: 'Transmit at 3 dBm' });
  await addStep(page, 'sleep', '1 s', {});
}

/** The moves of a part as its table of transitions lists them. */
async function removeTransition(page: Page, part: string, from: string, to: string): Promise<void> {
  await page
    .getByRole('list', { name: 'Parts' })
    .getByRole('button', { name: new RegExp(`^${part}`) })
    .click();
  const label = `${from} to ${to}: duration, typical`;
  await page
    .getByRole('table', { name: `Transitions of ${part}` })
    .getByLabel(label, { exact: true })
    .click();
  await page.getByRole('button', { name: `Remove ${from} to ${to}` }).click();
}

describe.each([
  { where: 'the demo workspace', start: startDemoWorld, project: DEMO_PROJECT },
  { where: 'an empty workspace', start: startEmptyWorld, project: PROJECT },
])('journey B in $where', ({ start, project }) => {
  // What the two workspaces cannot tell apart is walked in the empty one alone; a long run walks everything in both.
  const isWhole = IS_LONG || project === PROJECT;
  let world: World;
  let page: Page;

  beforeAll(async () => {
    world = await start();
    page = await world.signedIn();
    if (project === PROJECT) await makeProject(page, PROJECT);
  });
  afterAll(async () => {
    await world?.end();
  });

  if (isWhole) {
    it('takes a routine "report" every 15 min and shows its lanes in the day of the node', async () => {
      await openProject(page, project);
      await makeScenario(page, 'Report', 'Empty');
      await buildReportingNode(page);
      await page.getByRole('heading', { name: 'report, every 15 min' }).waitFor();
      await page.getByText('96 cycles a day').first().waitFor();
      const steps = page.getByRole('toolbar', { name: 'Steps' }).getByRole('button');
      expect((await steps.allInnerTexts()).map((text) => text.split('\n')[0])).toEqual([
        'wake',
        'sense',
        'send',
        'sleep',
      ]);
      const day = page.getByRole('region', { name: 'report, every 15 min' });
      for (const text of [RADIO, CONTROLLER, SENSOR, 'Transmit at 3 dBm', 'Core running', 'Measuring']) {
        await day.getByText(text, { exact: true }).locator('visible=true').first().waitFor();
      }
      await page.getByRole('group', { name: 'View of the day' }).getByText('one day', { exact: true }).click();
      await page.getByText('every 15 min: 96 cycles a day').waitFor();
      expect(await answer(page)).toMatch(/^Lives /);
      expect(await save(page)).toMatch(/^revision 2, saved/);
    });
  }

  it('names the move that a forgotten transition makes impossible, and mends it with one click', async () => {
    if (project === DEMO_PROJECT) await openScenario(page, project, 'Two LR6, report every 15 min');
    else {
      await openProject(page, project);
      await makeScenario(page, 'Forgetful', 'Reporting sensor');
    }
    const before = await answer(page);
    await removeTransition(page, RADIO, 'Sleep', 'Idle, crystal on');
    const offer = page.getByRole('region', { name: `Missing transition of ${RADIO}` }).first();
    await offer.waitFor();
    expect(await offer.innerText()).toContain(`${RADIO} cannot go from Sleep to`);
    await page
      .getByText(/^Of the last complete input\./)
      .locator('visible=true')
      .waitFor();
    expect(await answer(page)).toBe(before);
    await offer
      .getByRole('button', { name: /dd Sleep to Idle, crystal on$/ })
      .first()
      .click();
    await page
      .getByRole('region', { name: `Missing transition of ${RADIO}` })
      .first()
      .waitFor({ state: 'detached' });
    expect(await field(page, 'Sleep to Idle, crystal on: duration, typical').inputValue()).toBe('0 ms');
    expect(await answer(page)).toMatch(/^Lives /);
    expect(world.errors()).toEqual([]);
  });
});
