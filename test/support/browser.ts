import axe from 'axe-core';
import { mkdir, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { chromium, type BrowserContext, type Page } from 'playwright-core';
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

/** Debian's Chromium with an empty profile of its own; the time zone and language are fixed. */
export async function openBrowser(options: BrowserOptions): Promise<TestBrowser> {
  const profile = await mkdtemp(path.join(tmpdir(), 'overwinter-browser-'));
  const context = await chromium.launchPersistentContext(profile, {
    executablePath: ensureChromium(),
    headless: true,
    args: FLAGS,
    baseURL: options.origin,
    viewport: SCREENS[options.screen ?? 'laptop'],
    colorScheme: options.colorScheme ?? 'light',
    reducedMotion: 'reduce',
    locale: 'en-GB',
    timezoneId: 'UTC',
  });
  const errors: string[] = [];
  const listen = (page: Page): void => {
    page.on('pageerror', (error) => errors.push(error.message));
    page.on('console', (message) => {
      if (message.type() === 'error') errors.push(message.text());
    });
  };
  context.on('page', listen);
  const page = context.pages()[0] ?? (await context.newPage());
  listen(page);
  page.setDefaultTimeout(30_000);
  return {
    context,
    page,
    errors,
    close: async () => {
      await context.close();
      await rm(profile, { recursive: true, force: true, maxRetries: 5 });
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

/** What axe finds on the page as it stands, one line each: rule, element, how to mend it. Empty when all is well. */
export async function axeViolations(page: Page): Promise<string[]> {
  await page.evaluate(axe.source);
  return page.evaluate(async () => {
    const { violations } = await window.axe.run({ resultTypes: ['violations'] });
    return violations.flatMap(({ id, nodes }) =>
      nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')}: ${failureSummary ?? ''}`),
    );
  });
}

declare global {
  interface Window {
    axe: typeof axe;
  }
}
