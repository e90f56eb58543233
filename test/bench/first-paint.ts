import pg from 'pg';
import type { Page } from 'playwright-core';
import { build } from '#scripts/build.js';
import { startThrowAwayPostgres } from '#scripts/postgres.js';
import { openBrowser } from '#test/support/browser.ts';
import { startBuiltServer } from '#test/support/built-server.ts';
import { answer, field, openScenario, type } from '#test/support/pages-scenario.ts';
import { signIn } from '#test/support/pages-session.ts';

/**
 * First paint of a change: from a keystroke in a field of the demo to the frame that shows the new sentence, ms. Run with
 * `npx tsx test/bench/first-paint.ts`; the goal is a median under 50 ms on an idle machine.
 */
const KEYSTROKES = 30;
const PASSWORD = 'orchards under snow';
const FIELD = 'Board leakage: current';

async function makeDatabase(baseUrl: string): Promise<string> {
  const client = new pg.Client({ connectionString: baseUrl });
  await client.connect();
  await client.query('CREATE DATABASE first_paint');
  await client.end();
  const url = new URL(baseUrl);
  url.pathname = '/first_paint';
  return url.href;
}

/** Replaces the first digit of the field by another and waits for the frame after the sentence changed, ms. */
async function timeKeystroke(page: Page, digit: string): Promise<number> {
  const painted = page.evaluate(() => {
    const slot = [...document.querySelectorAll<HTMLElement>('[data-answer]')].find((one) => one.offsetParent !== null);
    if (!slot) throw new Error('The page has no answer.');
    return new Promise<number>((resolve) => {
      let startMs = 0;
      addEventListener('keydown', (event) => (startMs = event.timeStamp), { once: true, capture: true });
      const observer = new MutationObserver(() => {
        observer.disconnect();
        requestAnimationFrame(() => {
          // The first task after the frame: by then it has been painted.
          const { port1, port2 } = new MessageChannel();
          port1.onmessage = () => resolve(performance.now() - startMs);
          port2.postMessage(null);
        });
      });
      observer.observe(slot, { subtree: true, childList: true, characterData: true });
    });
  });
  await field(page, `${FIELD}, typical`).evaluate((input) => {
    if (input instanceof HTMLInputElement) input.setSelectionRange(0, 1);
  });
  await page.keyboard.press(digit);
  return painted;
}

async function measure(page: Page): Promise<number[]> {
  await signIn(page, { email: 'engineer@tarnfold.example', password: PASSWORD });
  await openScenario(page, 'Frost post', 'Two LR6, report every 15 min');
  await type(page, `${FIELD}, maximum`, '');
  await field(page, `${FIELD}, typical`).fill('1 mA');
  await answer(page);
  const times: number[] = [];
  for (let index = 0; index < KEYSTROKES; index += 1) {
    times.push(await timeKeystroke(page, String((index % 8) + 2)));
    await answer(page);
    // Past the pause after which the ledger is computed.
    await page.waitForTimeout(250);
  }
  return times.sort((a, b) => a - b);
}

await build();
const cluster = await startThrowAwayPostgres();
const server = await startBuiltServer({ databaseUrl: await makeDatabase(cluster.baseUrl), demoPassword: PASSWORD });
const browser = await openBrowser({ origin: server.origin });
try {
  const times = await measure(browser.page);
  const show = (index: number): string => `${(times[index] ?? Number.NaN).toFixed(1)} ms`;
  const [least, median, most] = [show(0), show(Math.floor(times.length / 2)), show(times.length - 1)];
  console.log(`First paint of a change, ${times.length} keystrokes: min ${least}, median ${median}, max ${most}`);
} finally {
  await browser.close();
  await server.stop();
  cluster.stop();
}
