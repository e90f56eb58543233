import express, { type Express, type RequestHandler } from 'express';
import type { Logger } from 'pino';
import type { AccountsService } from '#backend/services/accounts.service.ts';
import { errorHandler, sendProblem } from './error-handler.ts';
import { requestLog } from './middleware/request-log.ts';
import { securityHeaders } from './middleware/security-headers.ts';
import { sessions, type SessionSettings } from './middleware/sessions.ts';
import { mount } from './mount.ts';
import type { Route } from './route.ts';
import { noSession } from './no-session.ts';
import { mountWeb } from './web.ts';

export interface AppSettings {
  logger: Logger;
  publicUrl: URL;
  /** Proxies in front of the server, each of which adds to `X-Forwarded-For`. */
  trustProxyHops: number;
  session: Omit<SessionSettings, 'isSecure'>;
  /** Folder of the built pages; null serves the API alone. */
  webRoot: string | null;
  refuseUndeclaredAnswers: boolean;
  isDatabaseAway: (error: unknown) => boolean;
}

/** Cookies are `Secure` whenever the pages come over HTTPS; settings allow plain HTTP on loopback only. */
export function createApp(routes: readonly Route[], accounts: AccountsService, settings: AppSettings): Express {
  const isHttps = settings.publicUrl.protocol === 'https:';
  const app = express();
  app.set('trust proxy', settings.trustProxyHops);
  app.set('etag', false);
  app.set('query parser', 'simple');
  app.set('case sensitive routing', true);
  app.set('strict routing', true);
  app.disable('x-powered-by');
  app.use(requestLog(settings.logger), securityHeaders(isHttps), startWithoutSession);
  app.use(['/api', '/health'], neverStore);
  app.use('/api', ...sessions({ ...settings.session, isSecure: isHttps }, accounts));
  mount(app, routes, {
    refuseUndeclaredAnswers: settings.refuseUndeclaredAnswers,
    publicOrigin: settings.publicUrl.origin,
  });
  app.use(['/api', '/health'], nothingHere);
  if (settings.webRoot !== null) mountWeb(app, settings.webRoot);
  app.use(nothingHere, errorHandler(settings.isDatabaseAway));
  return app;
}

const startWithoutSession: RequestHandler = function startWithoutSession(request, _response, next) {
  request.principal = null;
  request.control = noSession;
  next();
};

const neverStore: RequestHandler = function neverStore(_request, response, next) {
  response.set('Cache-Control', 'no-store');
  next();
};

const nothingHere: RequestHandler = function nothingHere(_request, response) {
  sendProblem(response, 'not-found', { detail: 'There is nothing at this address.' });
};
