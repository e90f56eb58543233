import { readFileSync } from 'node:fs';
import { runInThisContext } from 'node:vm';
import { afterEach, describe, expect, it } from 'vitest';
import { applyTheme, readTheme } from './theme.ts';

afterEach(() => applyTheme('system'));

describe('theme', () => {
  it('applyTheme: marks the page and is read back', () => {
    applyTheme('dark');
    expect(document.documentElement.dataset['theme']).toBe('dark');
    expect(readTheme()).toBe('dark');
  });

  it('applyTheme: leaves no mark for the choice of the system', () => {
    applyTheme('dark');
    applyTheme('system');
    expect(document.documentElement.dataset['theme']).toBeUndefined();
    expect(readTheme()).toBe('system');
  });

  it('readTheme: takes a value that is none for the choice of the system', () => {
    localStorage.setItem('overwinter.theme', 'sepia');
    expect(readTheme()).toBe('system');
  });

  it('theme.js: applies what was stored before the application runs', () => {
    applyTheme('dark');
    delete document.documentElement.dataset['theme'];
    runInThisContext(readFileSync('frontend/public/theme.js', 'utf8'));
    expect(document.documentElement.dataset['theme']).toBe('dark');
  });
});
