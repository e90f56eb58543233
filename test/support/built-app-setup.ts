import { build } from '#scripts/build.js';

/** Vitest global setup of the browser tests: the built web part and server, rebuilt only where sources changed. */
export async function setup(): Promise<void> {
  await build();
}
