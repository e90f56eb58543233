import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startDemoWorld, type World } from '#test/support/journey-world.ts';
import { answer, field, openScenario, save } from '#test/support/pages-scenario.ts';
import { truthValue } from '#test/support/truth.ts';

const STEP = 'Send the report';

let world: World;
let page: Page;
beforeAll(async () => {
  world = await startDemoWorld();
  page = await world.signedIn();
  await openScenario(page, 'Soil probe', 'CR2477 behind a buck-boost regulator');
  await page.locator('[data-field="pick.report"]').click();
  await page.getByTitle('Derived; see below the table.').first().click();
  await page.getByRole('heading', { level: 3, name: STEP }).waitFor();
});
afterAll(async () => {
  await world?.end();
});

/** Opens a section of link settings; the first that begins with the title. */
async function openSection(title: string): Promise<void> {
  await page.locator('summary', { hasText: title }).first().click();
}

/** Types into a field and leaves it. */
async function enter(label: string, text: string): Promise<void> {
  await field(page, label).first().fill(text);
  await field(page, label).first().blur();
}

/** Every line of the table of phases: its name and the times it shows, s. */
async function phases(): Promise<Map<string, { meanS: number; worstS: number }>> {
  const rows = await page.getByRole('table', { name: 'Phases of the exchange' }).locator('tbody tr:has(th)').all();
  const read = async (index: number): Promise<[string, { meanS: number; worstS: number }]> => {
    const row = rows[index];
    const name = (await row?.getByRole('rowheader').innerText())?.replace(/^\d+\s*/, '') ?? '';
    const cells = (await row?.getByRole('cell').allInnerTexts()) ?? [];
    return [name.trim(), { meanS: seconds(cells[1]), worstS: seconds(cells[2]) }];
  };
  return new Map(await Promise.all(rows.map((_, index) => read(index))));
}

function seconds(text = ''): number {
  const [number = '', unit = ''] = text.trim().split(/\s/);
  return Number(number) * ({ s: 1, ms: 1e-3, µs: 1e-6 }[unit] ?? Number.NaN);
}

/** A figure of "What follows". */
async function figure(name: string): Promise<number> {
  const text = await page.locator('summary', { hasText: name }).locator('strong').innerText();
  return Number(text.replace('%', '').trim()) / (text.includes('%') ? 100 : 1);
}

const MICROS = 1e-6;
/** Four digits are shown, of small probabilities three. */
const SHOWN = 5e-4;
const SHOWN_SMALL = 5e-3;

function expectShown(shown: number | undefined, truth: number, tolerance = SHOWN): void {
  expect(Math.abs((shown ?? Number.NaN) / truth - 1)).toBeLessThanOrEqual(tolerance);
}

describe('the step that sends, derived from the link', () => {
  it('shows which octets a payload of 24 octets travels in, and which microseconds, on average and at worst', async () => {
    expect(await field(page, 'Payload').inputValue()).toBe('24 octets');
    await page.getByText('41 octets on air, 35 octets of them PSDU: 1.312 ms.').waitFor();
    const shown = await phases();
    expect([...shown.keys()]).toEqual([
      'backoff',
      'assessment of the channel',
      'turnaround before the frame',
      'frame',
      'wait for the acknowledgement',
      'acknowledgement',
      'In all',
    ]);
    for (const { meanS, worstS } of shown.values()) expect(worstS).toBeGreaterThanOrEqual(meanS);
  });

  it('waits as long as published backoffs at 10 % busy, when nothing is lost', async () => {
    await openSection('Channel');
    await enter('Channel busy', '10 %');
    await enter('Frame lost', '0 %');
    await enter('Acknowledgement lost', '0 %');
    const shown = await phases();
    const turnaroundS = truthValue('mac-turnaround-oqpsk-2450-250k') * MICROS;
    // A backoff unit lasts 20 symbols, a turnaround 12.
    expectShown(shown.get('backoff')?.meanS, truthValue('csma-units-def-a010') * (20 / 12) * turnaroundS);
    expectShown(shown.get('turnaround before the frame')?.meanS, turnaroundS);
  });

  it('shows the times, transmissions and probabilities of a busy and lossy link as test/truth has them', async () => {
    await enter('or whole frame (PSDU)', '100');
    await enter('Channel busy', '30 %');
    await enter('Frame lost', '20 %');
    await enter('Acknowledgement lost', '5 %');
    const shown = await phases();
    const truth = (part: string): number => truthValue(`exch-busy30loss20-${part}`);
    expectShown(shown.get('backoff')?.meanS, truth('backoff') * MICROS);
    expectShown(shown.get('assessment of the channel')?.meanS, truth('ccaTime') * MICROS);
    expectShown(shown.get('turnaround before the frame')?.meanS, truth('turn') * MICROS);
    expectShown(shown.get('frame')?.meanS, truth('txTime') * MICROS);
    const listenS =
      (shown.get('wait for the acknowledgement')?.meanS ?? Number.NaN) +
      (shown.get('acknowledgement')?.meanS ?? Number.NaN);
    expectShown(listenS, truth('ackListen') * MICROS);
    expectShown(await figure('Transmissions'), truth('tx'));
    expectShown(await figure('Probability that the receiver has the frame'), truth('deliv'));
    expectShown(await figure('Probability that an access is given up'), truth('pcaf'), SHOWN_SMALL);
    expectShown(await figure('Probability that all retries stay unanswered'), truth('pnoack'), SHOWN_SMALL);
  });

  it('shows the published airtime of the longest frame', async () => {
    await enter('or whole frame (PSDU)', '127');
    await page.getByText(/: 4\.256\sms\./).waitFor();
    expect(truthValue('air-oqpsk-2450-250k-127')).toBe(4256);
  });

  it('moves the picture, the step, the lane and the ledger with one input, and keeps what was saved', async () => {
    const step = page.getByTitle('Derived; see below the table.').first();
    const lane = page.getByRole('toolbar', { name: 'Steps' }).getByRole('button', { name: new RegExp(`^${STEP}`) });
    const ledger = page.getByRole('region', { name: 'Where the charge goes' });
    await ledger.getByRole('button', { name: 'Report four times a day' }).click();
    const entries = ledger.getByRole('row', { name: new RegExp(STEP) });
    const seen = async (): Promise<string[]> => [
      [...(await phases()).values()].map(({ meanS }) => meanS).join(' '),
      await step.innerText(),
      await lane.innerText(),
      (await entries.allInnerTexts()).join(' '),
    ];
    await answer(page);
    await entries.first().waitFor();
    const before = await seen();
    await enter('Frame lost', '90 %');
    await answer(page);
    await expect
      .poll(async () => (await seen()).map((text, index) => text === before[index]))
      .toEqual([false, false, false, false]);
    const changed = await phases();
    expect(await save(page)).toMatch(/^revision \d+, saved today/);
    await page.reload();
    await answer(page);
    await page.locator('[data-field="pick.report"]').click();
    await page.getByTitle('Derived; see below the table.').first().click();
    expect(await phases()).toEqual(changed);
    expect(world.errors()).toEqual([]);
  });

  it('tells how a time comes about, with formula and source', async () => {
    await page.getByRole('button', { name: 'backoff' }).last().click();
    await page
      .getByText(/IEEE 802\.15\.4/)
      .first()
      .waitFor();
  });

  it('names the largest payload that fits when the frame is too long, at its field, and keeps the picture', async () => {
    await enter('Payload', '117');
    await page
      .getByText(/at most 116 octets/)
      .first()
      .waitFor();
    expect(await field(page, 'Payload').getAttribute('aria-invalid')).toBe('true');
    expect((await phases()).size).toBe(7);
  });
});
