import type { Page } from 'playwright-core';

export type Boxes = Record<string, { x: number; y: number; width: number; height: number } | null>;

/** Where elements stand on the page, by name; null where there is none. */
export async function boxesOf(page: Page, selectors: Record<string, string>): Promise<Boxes> {
  return page.evaluate((wanted) => {
    const boxOf = (selector: string) => {
      const shown = [...document.querySelectorAll<HTMLElement>(selector)].find(
        (element) => element.offsetParent !== null,
      );
      if (!shown) return null;
      const { x, y, width, height } = shown.getBoundingClientRect();
      return { x, y: y + window.scrollY, width, height };
    };
    return Object.fromEntries(Object.entries(wanted).map(([name, selector]) => [name, boxOf(selector)]));
  }, selectors);
}

const overflowNow = (page: Page): Promise<number> =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

/** By how many pixels the page stays wider than its window; charts take a moment to follow a new width. */
export async function overflowPx(page: Page): Promise<number> {
  for (let tries = 0; tries < 20 && (await overflowNow(page)) > 0; tries += 1) await page.waitForTimeout(100);
  return overflowNow(page);
}

/** Presses Tab until the focused element has this text, label or name; throws when it never has. */
export async function tabTo(page: Page, name: string): Promise<void> {
  for (let presses = 0; presses < 250; presses += 1) {
    await page.keyboard.press('Tab');
    const focused = await page.evaluate(() => {
      const element = document.activeElement;
      const label = element instanceof HTMLInputElement ? element.labels?.[0]?.textContent : null;
      return (label ?? element?.getAttribute('aria-label') ?? element?.textContent ?? '').trim();
    });
    if (focused === name) return;
  }
  throw new Error(`Tab never reaches “${name}”.`);
}
