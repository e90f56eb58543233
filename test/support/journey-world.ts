import type { Page } from 'playwright-core';
import { openBrowser, type BrowserOptions, type TestBrowser } from './browser.ts';
import { startBuiltServer } from './built-server.ts';
import { createTestDatabase } from './database.ts';
import { makeFirstOwner, signInQuietly } from './pages-session.ts';

/** Password of every account that these tests use. */
export const PASSWORD = 'orchards under snow';

/** A server of its own with a database of its own, and the browsers that look at it. */
export interface World {
  origin: string;
  /** One-time link for the first owner; undefined in the demo. */
  setupUrl: string | undefined;
  /** An account with the right to edit. */
  email: string;
  /** A browser of its own, at no page yet. */
  open: (options?: Omit<BrowserOptions, 'origin'>) => Promise<TestBrowser>;
  /** A browser of its own, signed in, at the projects. */
  signedIn: (email?: string, options?: Omit<BrowserOptions, 'origin'>) => Promise<Page>;
  /** Errors of scripts and of the console in all browsers so far. */
  errors: () => string[];
  /** Ends browsers and server, removes the database. */
  end: () => Promise<void>;
}

export const DEMO_PROJECT = 'Frost post';

/** The demo workspace, as `npm start` shows it. */
export function startDemoWorld(): Promise<World> {
  return startWorld({ demoPassword: PASSWORD, email: 'engineer@tarnfold.example' });
}

/** An empty workspace, whose owner was made through the link that the server printed. */
export async function startEmptyWorld(): Promise<World> {
  const world = await startWorld({ email: 'ada@hollow.example' });
  try {
    const { page, close } = await world.open();
    if (world.setupUrl === undefined) throw new Error('The server printed no link for the first owner.');
    await makeFirstOwner(page, world.setupUrl, {
      workspace: 'Hollow Lane',
      name: 'Ada Hollow',
      email: world.email,
      password: PASSWORD,
    });
    await close();
    return world;
  } catch (error) {
    await world.end();
    throw error;
  }
}

async function startWorld({ demoPassword, email }: { demoPassword?: string; email: string }): Promise<World> {
  const database = await createTestDatabase('browser');
  const server = await startBuiltServer({
    databaseUrl: database.url,
    ...(demoPassword === undefined ? {} : { demoPassword }),
  }).catch(async (error: unknown) => {
    await database.drop();
    throw error;
  });
  const browsers: TestBrowser[] = [];
  const open: World['open'] = async (options = {}) => {
    const browser = await openBrowser({ origin: server.origin, ...options });
    browsers.push(browser);
    return browser;
  };
  return {
    origin: server.origin,
    setupUrl: server.setupUrl,
    email,
    open,
    signedIn: async (as = email, options = {}) => {
      const { page } = await open(options);
      await signInQuietly(page, { email: as, password: PASSWORD });
      return page;
    },
    errors: () => browsers.flatMap(({ errors }) => errors),
    end: async () => {
      await Promise.all(browsers.map((browser) => browser.close()));
      await server.stop();
      await database.drop();
    },
  };
}
