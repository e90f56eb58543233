import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { DEMO_PROJECT, PASSWORD, startDemoWorld, startEmptyWorld, type World } from '#test/support/journey-world.ts';
import {
  addCataloguePart,
  answer,
  answerTo,
  field,
  makeProject,
  makeScenario,
  openProject,
  openTab,
  save,
  take,
  type,
} from '#test/support/pages-scenario.ts';
import { signIn } from '#test/support/pages-session.ts';
import { IS_LONG } from '#test/support/long.ts';

const PROJECT = 'Hedge node';

describe.each([
  { where: 'the demo workspace', start: startDemoWorld, reach: (page: Page) => openProject(page, DEMO_PROJECT) },
  { where: 'an empty workspace', start: startEmptyWorld, reach: (page: Page) => openProject(page, PROJECT) },
])('journey A in $where', ({ where, start, reach }) => {
  // What the two workspaces cannot tell apart is walked in the empty one alone; a long run walks everything in both.
  const isWhole = IS_LONG || where === 'an empty workspace';
  let world: World;
  let page: Page;

  beforeAll(async () => {
    world = await start();
    page = (await world.open()).page;
    await signIn(page, { email: world.email, password: PASSWORD });
    if (where === 'an empty workspace') await makeProject(page, PROJECT);
  });
  afterAll(async () => {
    await world?.end();
  });

  it('starts from a template and shows its forecast, its day and its ledger at once', async () => {
    await reach(page);
    await makeScenario(page, 'From a template', 'Reporting sensor');
    expect(await answer(page)).toMatch(/^Lives\s[\d.]+\s(months|years)\swith typical figures\. It ends in /);
    expect(await page.getByRole('heading', { name: 'Measure and report, every 15 min' }).isVisible()).toBe(true);
    await page.getByRole('region', { name: 'Where the charge goes' }).getByRole('table').waitFor();
  });

  if (isWhole) {
    it('starts empty, says what comes next, and forecasts from parts of the catalogue and typed currents', async () => {
      await reach(page);
      await makeScenario(page, 'From nothing', 'Empty');
      expect(await answer(page)).toMatch(/^Add the first part\./);
      await addCataloguePart(page, 'below 1 GHz', 'Transceiver below 1 GHz');
      const withRadio = await answer(page);
      expect(withRadio).toMatch(/^Lives /);

      await page.getByRole('button', { name: 'Add a part' }).click();
      await page.getByRole('dialog').getByRole('button', { name: 'controller', exact: true }).click();
      const asleep = 'Controller, Sleep: current';
      const heavier = await answerTo(page, () => type(page, `${asleep}, typical`, '170 µA'));
      expect(heavier).not.toBe(withRadio);
      for (const [typed, shown] of [
        ['1.7 µA', '1.7 µA'],
        ['1.7u', '1.7 µA'],
        ['350nA', '350 nA'],
      ] as const) {
        await type(page, `${asleep}, typical`, typed);
        expect(await field(page, `${asleep}, typical`).inputValue()).toBe(shown);
      }
      await type(page, `${asleep}, minimum`, '0.2u');
      await type(page, `${asleep}, maximum`, '4 µA');
      expect(await field(page, `${asleep}, minimum`).inputValue()).toBe('200 nA');
      expect(await field(page, `${asleep}, maximum`).inputValue()).toBe('4 µA');
      expect(await answer(page)).toMatch(/^Lives /);
    });
  }

  if (isWhole) {
    it('says what is wrong with a current that is none, and keeps the last good answer', async () => {
      await reach(page);
      await makeScenario(page, 'Nonsense', 'Reporting sensor');
      const before = await answer(page);
      const label = 'Microcontroller, low power, Core running: current, typical';
      await field(page, label).fill('12 mV');
      await page.getByText('"mV" is a unit of voltage.').first().waitFor();
      expect(await field(page, label).getAttribute('aria-invalid')).toBe('true');
      expect(await field(page, label).inputValue()).toBe('12 mV');
      expect(await answer(page)).toBe(before);
    });
  }

  if (isWhole) {
    it('answers at each change of climate, cell, cells in series and regulator', async () => {
      await reach(page);
      await makeScenario(page, 'Choosing', 'Reporting sensor');
      await openTab(page, 'Climate');
      await page.getByRole('button', { name: 'Take a typical climate' }).click();
      const colder = await answerTo(page, () =>
        take(page, 'Find a climate by name', 'continental', 'Continental orchard'),
      );
      await openTab(page, 'Supply');
      await page.getByRole('button', { name: 'Take another cell' }).click();
      const otherCell = await answerTo(page, () => take(page, 'Find a cell by designation', '14505', 'ER14505'));
      const inSeries = await answerTo(page, () => type(page, 'In series', '1'));
      await answerTo(page, () => field(page, 'Kind').selectOption({ label: 'linear' }));
      const regulated = await answerTo(page, () => type(page, 'Own current', '40u'));
      expect(new Set([colder, otherCell, inSeries, regulated]).size).toBe(4);
      for (const text of [colder, otherCell, inSeries, regulated]) expect(text).toMatch(/^Lives /);
    });
  }

  it('keeps what was saved over a reload, and shows it in a second session', async () => {
    await reach(page);
    const address = await makeScenario(page, 'Kept', 'Reporting sensor');
    const label = 'Microcontroller, low power, Core running: current, typical';
    await type(page, label.replace('typical', 'maximum'), '');
    const changed = await answerTo(page, () => type(page, label, '341 mA'));
    expect(await save(page)).toMatch(/^revision 2, saved today/);
    await page.reload();
    expect(await answer(page)).toBe(changed);
    expect(await field(page, label).inputValue()).toBe('341 mA');

    const second = await world.signedIn();
    await second.goto(address);
    expect(await answer(second)).toBe(changed);
    expect(await field(second, label).inputValue()).toBe('341 mA');
    expect(world.errors()).toEqual([]);
  });
});
