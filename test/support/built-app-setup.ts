import { build } from '#scripts/build.js';
import { stopOrphans } from '#scripts/server.js';

/** Vitest global setup of the browser tests: the built web part and server, rebuilt only where sources changed. */
export async function setup(): Promise<void> {
  await build();
}

/** Ends the servers of test files that failed before they could do so. */
export async function teardown(): Promise<void> {
  await stopOrphans();
}
