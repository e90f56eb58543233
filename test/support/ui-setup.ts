import { cleanup } from '@testing-library/react';
import { afterEach, vi } from 'vitest';

/** Page tests share one document: each leaves it as it was. */
afterEach(() => {
  cleanup();
  document.body.replaceChildren();
  vi.useRealTimers();
  vi.unstubAllGlobals();
});
