import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { freePort } from '#scripts/project.js';
import { setupUrl, startServer } from '#scripts/server.js';

export interface BuiltServer {
  /** For example `http://127.0.0.1:3100`. */
  origin: string;
  /** The one-time link for the first owner that it printed; undefined where there is somebody already. */
  setupUrl: string | undefined;
  stop: () => Promise<void>;
}

export interface BuiltServerOptions {
  databaseUrl: string;
  /** Password of the demo accounts; without it the demo workspace is not seeded. */
  demoPassword?: string;
  /** Further environment variables. */
  env?: Record<string, string>;
}

/** Starts `dist/server/main.js`, as `npm start` does, on a free port; it serves the pages and the API. */
export async function startBuiltServer({ databaseUrl, demoPassword, env }: BuiltServerOptions): Promise<BuiltServer> {
  const port = await freePort(3100 + Math.floor(Math.random() * 400));
  const logFolder = await mkdtemp(path.join(tmpdir(), 'overwinter-server-'));
  const demo = demoPassword === undefined ? {} : { OVERWINTER_SEED_DEMO: '1', OVERWINTER_DEMO_PASSWORD: demoPassword };
  const logFile = path.join(logFolder, 'server.log');
  const server = startServer(
    {
      ...process.env,
      HOST: '127.0.0.1',
      PORT: String(port),
      DATABASE_URL: databaseUrl,
      OVERWINTER_SESSION_SECRET: 'a-secret-of-the-browser-tests-only-0123456789',
      ...demo,
      ...env,
    },
    logFile,
  );
  const stop = async (): Promise<void> => {
    await server.stop();
    await rm(logFolder, { recursive: true, force: true });
  };
  try {
    await server.ready;
  } catch (error) {
    await stop();
    throw error;
  }
  return { origin: server.origin, setupUrl: setupUrl(logFile), stop };
}
