export const THEMES = ['system', 'light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];

/** The same key stands in `public/theme.js`, which runs before the first paint. */
const KEY = 'overwinter.theme';

export function readTheme(): Theme {
  try {
    const stored = localStorage.getItem(KEY);
    return THEMES.find((theme) => theme === stored) ?? 'system';
  } catch {
    return 'system';
  }
}

/** Applies the theme at once and remembers it where the browser allows. */
export function applyTheme(theme: Theme): void {
  if (theme === 'system') delete document.documentElement.dataset['theme'];
  else document.documentElement.dataset['theme'] = theme;
  try {
    if (theme === 'system') localStorage.removeItem(KEY);
    else localStorage.setItem(KEY, theme);
  } catch {
    // Storage is blocked: the choice holds until the page is closed.
  }
  window.dispatchEvent(new Event('overwinter:theme'));
}
