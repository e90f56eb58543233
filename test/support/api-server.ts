import { Writable } from 'node:stream';
import type { Server } from 'node:http';
import type { DataSource } from 'typeorm';
import { catalogueItems } from '#common/catalogue/catalogue.ts';
import { forecast } from '#common/engine/index.ts';
import { compose, type Composition, type Ingredients } from '#backend/compose.ts';
import { createLogger } from '#backend/logger.ts';
import { createDataSource } from '#backend/persistence/data-source.ts';
import { createSessionPool } from '#backend/persistence/session-pool.ts';
import { close, createHttpServer, listen } from '#backend/server.ts';
import { createTestDatabase } from './database.ts';

export interface ApiServer extends Composition {
  server: Server;
  origin: string;
  databaseUrl: string;
  /** Log lines so far, parsed. */
  logs: readonly Record<string, unknown>[];
  /** Raw log, for looking for secrets. */
  logText: () => string;
  sql: (query: string, parameters?: unknown[]) => Promise<Record<string, unknown>[]>;
  dataSource: DataSource;
  stop: () => Promise<void>;
}

/** Refuses nothing: tests sign in more often than people. */
const GENEROUS = { perAccountAndAddress: 1_000, perAddress: 10_000, perAccount: 10_000 };

/** A server on a database of its own, with the real engine and catalogue, fast password hashes and no throttle. */
export async function startApi(name: string, overrides: Partial<Ingredients> = {}): Promise<ApiServer> {
  const database = await createTestDatabase(name);
  const dataSource = await createDataSource(database.url, { poolSize: 12 }).initialize();
  const sessionPool = createSessionPool(database.url, () => undefined);
  const { destination, lines } = memoryLog();
  const composition = compose({
    dataSource,
    sessionPool,
    logger: createLogger('debug', destination),
    forecast,
    catalogue: catalogueItems(),
    publicUrl: new URL('http://127.0.0.1:3000'),
    sessionSecret: 'a-secret-of-the-api-tests-only-0123456789',
    passwordPepper: 'test',
    trustProxyHops: 0,
    webRoot: null,
    bcryptCost: 4,
    throttle: GENEROUS,
    pruneSessionsEveryS: false,
    refuseUndeclaredAnswers: true,
    ...overrides,
  });
  const server = createHttpServer(composition.app);
  const port = await listen(server, { host: '127.0.0.1', port: 0 });
  return {
    ...composition,
    server,
    dataSource,
    origin: `http://127.0.0.1:${port}`,
    databaseUrl: database.url,
    get logs() {
      return lines().map(parseLine);
    },
    logText: () => lines().join('\n'),
    sql: (query, parameters) => dataSource.query(query, parameters),
    stop: async () => {
      await close(server);
      await sessionPool.end();
      if (dataSource.isInitialized) await dataSource.destroy();
      await database.drop();
    },
  };
}

function parseLine(line: string): Record<string, unknown> {
  const parsed: unknown = JSON.parse(line);
  return { ...(parsed as object) };
}

function memoryLog(): { destination: Writable; lines: () => string[] } {
  let text = '';
  const destination = new Writable({
    write(chunk: Buffer, _encoding, done) {
      text += chunk.toString('utf8');
      done();
    },
  });
  return { destination, lines: () => text.split('\n').filter(Boolean) };
}
