import axe from 'axe-core';
import { mkdir } from 'node:fs/promises';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { ensureChromium } from '#scripts/debian.js';

const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--disable-dev-shm-usage',
];

/** Widths in CSS pixels at which every page must work, with a usual height. */
export const SCREENS = {
  phone: { width: 390, height: 844 },
  laptop: { width: 1280, height: 800 },
  desk: { width: 1920, height: 1080 },
} as const;

export interface TestBrowser {
  context: BrowserContext;
  page: Page;
  /** Errors of scripts and of the console since the start, for `expect(errors).toEqual([])`. */
  errors: string[];
  close: () => Promise<void>;
}

export interface BrowserOptions {
  /** For example `http://127.0.0.1:3100`: `page.goto('/')` then works. */
  origin: string;
  /** `laptop` when left out. */
  screen?: keyof typeof SCREENS;
  /** `light` when left out. */
  colorScheme?: 'light' | 'dark';
}

/** One Chromium for the test file that runs in this process; it ends with its last window. */
let shared: { browser: Promise<Browser>; windows: number } | null = null;

function takeShared(): Promise<Browser> {
  shared ??= {
    browser: chromium.launch({ executablePath: ensureChromium(), headless: true, args: FLAGS }),
    windows: 0,
  };
  shared.windows += 1;
  return shared.browser;
}

async function giveBack(): Promise<void> {
  if (!shared || --shared.windows > 0) return;
  const { browser } = shared;
  shared = null;
  await (await browser).close();
}

/** A window of Debian's Chromium with cookies and storage of its own; the time zone and language are fixed. */
export async function openBrowser(options: BrowserOptions): Promise<TestBrowser> {
  const browser = await takeShared();
  const context = await browser.newContext({
    baseURL: options.origin,
    viewport: SCREENS[options.screen ?? 'laptop'],
    colorScheme: options.colorScheme ?? 'light',
    reducedMotion: 'reduce',
    locale: 'en-GB',
    timezoneId: 'UTC',
  });
  const errors: string[] = [];
  context.on('page', (page) => {
    page.on('pageerror', (error) => errors.push(error.message));
    page.on('console', (message) => {
      if (message.type() === 'error') errors.push(message.text());
    });
  });
  const page = await context.newPage();
  page.setDefaultTimeout(30_000);
  let isOpen = true;
  return {
    context,
    page,
    errors,
    close: async () => {
      if (!isOpen) return;
      isOpen = false;
      await context.close();
      await giveBack();
    },
  };
}

/** Saves what the page shows as test/pictures/<name>.png. */
export async function takePicture(page: Page, name: string, options: { fullPage?: boolean } = {}): Promise<void> {
  const folder = fileURLToPath(new URL('../pictures/', import.meta.url));
  await mkdir(folder, { recursive: true });
  // Fonts that arrive later would move the text.
  await page.evaluate(() => document.fonts.ready.then(() => undefined));
  await page.screenshot({
    path: path.join(folder, `${name}.png`),
    fullPage: options.fullPage ?? false,
    animations: 'disabled',
  });
}

/**
 * What axe finds on the page as it stands, one line each: rule, element, how to mend it. Empty when all is well.
 *
 * @param options only these rules (all that axe recommends when left out), and selectors of what is left out
 */
export async function axeViolations(
  page: Page,
  { rules, exclude = [] }: { rules?: string[] | undefined; exclude?: string[] } = {},
): Promise<string[]> {
  if (!(await page.evaluate(() => 'axe' in window))) await page.evaluate(axe.source);
  return page.evaluate(
    async ({ only, leftOut }) => {
      const { violations } = await window.axe.run(
        { exclude: leftOut.filter((selector) => document.querySelector(selector) !== null) },
        { resultTypes: ['violations'], ...(only === undefined ? {} : { runOnly: only }) },
      );
      return violations.flatMap(({ id, nodes }) =>
        nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')}: ${failureSummary ?? ''}`),
      );
    },
    { only: rules, leftOut: exclude },
  );
}

declare global {
  interface Window {
    axe: typeof axe;
  }
}
