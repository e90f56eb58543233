import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { Logger } from 'pino';
import { catalogueItems } from '#common/catalogue/catalogue.ts';
import { forecast } from '#common/engine/index.ts';
import { compose, type Composition } from './compose.ts';
import { createLogger } from '#backend/logger.ts';
import { createDataSource } from '#backend/persistence/data-source.ts';
import { migrate } from '#backend/persistence/migrate.ts';
import { createSessionPool } from '#backend/persistence/session-pool.ts';
import { close, createHttpServer, listen } from '#backend/server.ts';
import { demoWorkspace } from '#backend/services/demo/demo-workspace.ts';
import { seedDemo } from '#backend/services/demo/seed-demo.ts';
import { readSettings, SettingsError, type Settings } from '#backend/settings.ts';

/** Beside the built server lies `dist/web`; from the sources it is the same folder, if it was built. */
const WEB_ROOT = fileURLToPath(new URL(import.meta.url.endsWith('.ts') ? '../../dist/web' : '../web', import.meta.url));

async function run(settings: Settings, logger: Logger): Promise<void> {
  const onPoolError = (error: unknown): void => logger.warn({ err: error }, 'idle database connection lost');
  const dataSource = await createDataSource(settings.databaseUrl, { onPoolError }).initialize();
  const migrations = await migrate(dataSource);
  logger.info({ migrations }, 'database is up to date');
  if (process.argv.includes('--migrate-only')) return dataSource.destroy();

  const sessionPool = createSessionPool(settings.databaseUrl, onPoolError);
  const composition = compose({
    dataSource,
    sessionPool,
    logger,
    forecast,
    catalogue: catalogueItems(),
    publicUrl: settings.publicUrl,
    sessionSecret: settings.sessionSecret,
    passwordPepper: settings.passwordPepper,
    trustProxyHops: settings.trustProxyHops,
    webRoot: existsSync(`${WEB_ROOT}/index.html`) ? WEB_ROOT : null,
  });
  await prepare(composition, settings, logger);
  const prune = (): void => {
    composition.database.unit.signInAttempts.prune().catch(onPoolError);
  };
  prune();
  setInterval(prune, 3_600_000).unref();
  const server = createHttpServer(composition.app);
  const port = await listen(server, settings);
  logger.info({ url: settings.publicUrl.href, host: settings.host, port }, 'listening');

  const stop = async (signal: NodeJS.Signals): Promise<void> => {
    logger.info({ signal }, 'stopping');
    await close(server);
    await sessionPool.end();
    await dataSource.destroy();
    logger.info('stopped');
    process.exit(0);
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, (name) => void stop(name));
}

/** The demo where it is wanted; otherwise a way in for the first owner where there is nobody yet. */
async function prepare(composition: Composition, settings: Settings, logger: Logger): Promise<void> {
  if (settings.seedDemo && settings.demoPassword !== null) {
    const isNew = await seedDemo(composition, demoWorkspace, settings.demoPassword);
    if (isNew) logger.info('demo workspace written');
  }
  const token = await composition.setup.issueToken();
  if (token === null) return;
  // In the fragment: it reaches neither a server log on the way nor a Referer header.
  const url = new URL('/setup', settings.publicUrl);
  url.hash = `token=${token}`;
  logger.info({ setupUrl: url.href }, 'open this address once to make the first owner');
}

try {
  const settings = readSettings(process.env);
  const logger = createLogger(settings.logLevel);
  process.on('unhandledRejection', (error) => logger.error({ err: error }, 'unhandled rejection'));
  await run(settings, logger);
} catch (error) {
  process.stderr.write(
    `${error instanceof SettingsError ? error.message : String(error instanceof Error ? error.stack : error)}\n`,
  );
  process.exit(1);
}
