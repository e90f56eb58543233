import { useSyncExternalStore } from 'react';
import { applyTheme, readTheme, type Theme } from '#frontend/lib/theme.ts';

function subscribe(listener: () => void): () => void {
  window.addEventListener('overwinter:theme', listener);
  window.addEventListener('storage', listener);
  return () => {
    window.removeEventListener('overwinter:theme', listener);
    window.removeEventListener('storage', listener);
  };
}

export function useTheme(): [Theme, (theme: Theme) => void] {
  return [useSyncExternalStore(subscribe, readTheme), applyTheme];
}
