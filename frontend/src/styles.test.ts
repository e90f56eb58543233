import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

// Vitest empties imported style sheets, so this one is read as a file.
const css = readFileSync('frontend/src/styles.css', 'utf8');

function colours(selector: string): Record<string, string> {
  const block = css.slice(css.indexOf(selector)).match(/\{([^{}]*)\}/)?.[1] ?? '';
  const found: Record<string, string> = {};
  for (const [, name = '', value = ''] of block.matchAll(/--([\w-]+): (#[0-9a-f]{6});/g)) found[name] = value;
  return found;
}

const LIGHT = colours(':root {');
const DARK = colours(":root[data-theme='dark'] {");

/** Relative luminance and contrast ratio. Source: WCAG 2.2, definitions of both. */
function luminance(hex: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5]
    .map((at) => parseInt(hex.slice(at, at + 2), 16) / 255)
    .map((c) => (c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4));
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a = '#000000', b = '#000000'): number {
  const [light = 1, dark = 0] = [luminance(a), luminance(b)].sort((x, y) => y - x);
  return (light + 0.05) / (dark + 0.05);
}

describe.each([
  ['light', LIGHT],
  ['dark', DARK],
])('styles.css, %s', (_theme, colour) => {
  it.each(['ink', 'muted', 'accent', 'rust', 'frost', 'caution'])('%s reads as text on every ground', (name) => {
    for (const ground of ['paper', 'raised', 'accent-soft']) {
      expect(contrast(colour[name], colour[ground])).toBeGreaterThanOrEqual(4.5);
    }
  });

  it('lines that mean something are told from every ground', () => {
    for (const ground of ['paper', 'raised', 'accent-soft']) {
      expect(contrast(colour['line'], colour[ground])).toBeGreaterThanOrEqual(3);
    }
  });

  it('the words on the accent and on each tint are read', () => {
    expect(contrast(colour['on-accent'], colour['accent'])).toBeGreaterThanOrEqual(4.5);
    for (const tint of [1, 2, 3]) expect(contrast(colour['ink'], colour[`tint-${tint}`])).toBeGreaterThanOrEqual(4.5);
    for (const tint of [4, 5]) expect(contrast(colour['paper'], colour[`tint-${tint}`])).toBeGreaterThanOrEqual(4.5);
  });
});

describe('styles.css', () => {
  it('has the same dark colours by choice and by the system', () => {
    expect(Object.keys(DARK).length).toBeGreaterThan(20);
    expect(colours(":root:not([data-theme='light']) {")).toEqual(DARK);
  });

  it('sets every colour in both themes', () => {
    expect(Object.keys(DARK)).toEqual(Object.keys(LIGHT));
  });

  it.each([
    ['ink', [14.63, 15.29, 12.66, 14.52, 12.94, 11.03]],
    ['muted', [5.9, 6.17, 5.1, 7.86, 7.0, 5.97]],
    ['frost', [5.46, 5.7, 4.72, 8.39, 7.47, 6.37]],
    ['line', [3.54, 3.7, 3.06, 4.08, 3.63, 3.1]],
  ])('says the contrast of %s as it is', (name, written) => {
    const computed = [LIGHT, DARK].flatMap((colour) =>
      ['paper', 'raised', 'accent-soft'].map((ground) => Number(contrast(colour[name], colour[ground]).toFixed(2))),
    );
    expect(computed).toEqual(written);
  });
});
