import connectPgSimple from 'connect-pg-simple';
import type { Express } from 'express';
import expressSession from 'express-session';
import type { Logger } from 'pino';
import type pg from 'pg';
import type { DataSource } from 'typeorm';
import { createApp } from '#backend/http/app.ts';
import { comparisonRoutes, forecastRoutes, revisionRoutes } from '#backend/http/revisions.routes.ts';
import { healthRoutes } from '#backend/http/health.routes.ts';
import { libraryRoutes } from '#backend/http/library.routes.ts';
import { derivedKey } from '#backend/http/middleware/sessions.ts';
import { openApiRoute } from '#backend/http/openapi.ts';
import { projectRoutes } from '#backend/http/projects.routes.ts';
import type { Route } from '#backend/http/route.ts';
import { projectScenarioRoutes, scenarioCopyRoutes, scenarioRoutes } from '#backend/http/scenarios.routes.ts';
import { accountRoutes, sessionRoutes } from '#backend/http/session.routes.ts';
import { Database, isDatabaseAway } from '#backend/persistence/database.ts';
import { AccountsService } from '#backend/services/accounts.service.ts';
import { ForecastService, type ForecastFunction } from '#backend/services/forecast.service.ts';
import { HealthService } from '#backend/services/health.service.ts';
import { LibraryService, type CatalogueItem } from '#backend/services/library.service.ts';
import { Passwords } from '#backend/services/passwords.ts';
import { ProjectsService } from '#backend/services/projects.service.ts';
import { RevisionsService } from '#backend/services/revisions.service.ts';
import { ScenariosService } from '#backend/services/scenarios.service.ts';
import { SetupService } from '#backend/services/setup.service.ts';
import { SignInThrottle, THROTTLE_LIMITS, type ThrottleLimits } from '#backend/services/sign-in-throttle.ts';

/** What the server is built from; everything with an effect comes in here. */
export interface Ingredients {
  dataSource: DataSource;
  sessionPool: pg.Pool;
  logger: Logger;
  forecast: ForecastFunction;
  catalogue: readonly CatalogueItem[];
  publicUrl: URL;
  sessionSecret: string;
  passwordPepper: string;
  trustProxyHops: number;
  webRoot: string | null;
  /** Time now, ms. Default: the clock. */
  now?: () => number;
  /** Default 12. */
  bcryptCost?: number;
  throttle?: Partial<ThrottleLimits>;
  /** How many password hashes run and wait at once. */
  hashing?: { maxAtOnce: number; maxWaiting: number };
  /** Seconds between removals of ended sessions; false for none. Default 900. */
  pruneSessionsEveryS?: number | false;
  /** In tests an answer that its schema does not describe is a failure. */
  refuseUndeclaredAnswers?: boolean;
}

export interface Composition {
  app: Express;
  routes: readonly Route[];
  database: Database;
  passwords: Passwords;
  forecasts: ForecastService;
  setup: SetupService;
}

/** Builds the graph of objects; the only place that does. */
export function compose(parts: Ingredients): Composition {
  const { logger, now = Date.now, throttle, sessionSecret } = parts;
  const database = new Database(parts.dataSource);
  const passwords = new Passwords({ cost: parts.bcryptCost ?? 12, pepper: parts.passwordPepper, ...parts.hashing });
  const limits = { ...THROTTLE_LIMITS, ...throttle };
  const throttling = new SignInThrottle(database, derivedKey(sessionSecret, 'account key'), limits);
  const accounts = new AccountsService(database, passwords, throttling);
  const forecasts = new ForecastService(parts.forecast, (error) => logger.error({ err: error }, 'forecast failed'));
  const scenarios = new ScenariosService(database, forecasts);
  const setup = new SetupService(database, passwords);
  const revisions = new RevisionsService(database, scenarios, forecasts);
  const described = [
    ...sessionRoutes(),
    ...accountRoutes(accounts, setup),
    ...projectRoutes(new ProjectsService(database)),
    ...projectScenarioRoutes(scenarios),
    ...scenarioRoutes(scenarios),
    ...scenarioCopyRoutes(scenarios, now),
    ...revisionRoutes(revisions),
    ...comparisonRoutes(revisions),
    ...forecastRoutes(forecasts),
    ...libraryRoutes(new LibraryService(database, parts.catalogue)),
    ...healthRoutes(new HealthService(database)),
  ];
  const routes = [...described, openApiRoute(described)];
  const app = createApp(routes, accounts, {
    logger,
    publicUrl: parts.publicUrl,
    trustProxyHops: parts.trustProxyHops,
    session: { store: sessionStore(parts), secret: sessionSecret, now },
    webRoot: parts.webRoot,
    refuseUndeclaredAnswers: parts.refuseUndeclaredAnswers ?? false,
    isDatabaseAway,
  });
  return { app, routes, database, passwords, forecasts, setup };
}

function sessionStore({ sessionPool, logger, pruneSessionsEveryS = 900 }: Ingredients): expressSession.Store {
  const Store = connectPgSimple(expressSession);
  return new Store({
    pool: sessionPool,
    tableName: 'sessions',
    pruneSessionInterval: pruneSessionsEveryS,
    errorLog: (...details: unknown[]) => logger.warn({ details }, 'session store'),
  });
}
