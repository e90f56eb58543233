import { useSyncExternalStore } from 'react';

const DARK = '(prefers-color-scheme: dark)';

function subscribe(onChange: () => void): () => void {
  const media = window.matchMedia(DARK);
  const observer = new MutationObserver(onChange);
  media.addEventListener('change', onChange);
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme'] });
  return () => {
    media.removeEventListener('change', onChange);
    observer.disconnect();
  };
}

function snapshot(): string {
  return `${document.documentElement.dataset['theme'] ?? ''} ${window.matchMedia(DARK).matches ? 'dark' : 'light'}`;
}

/** A text that changes with the theme in force, for canvases, which do not follow CSS by themselves. */
export function useThemeKey(): string {
  return useSyncExternalStore(subscribe, snapshot);
}
