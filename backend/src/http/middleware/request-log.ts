import { randomUUID } from 'node:crypto';
import type { RequestHandler } from 'express';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';

/** Gives each request an id, in the answer and in each of its log lines, and logs it when it is answered. */
export function requestLog(logger: Logger): RequestHandler {
  const log = pinoHttp({
    logger,
    genReqId: (_request, response) => {
      const id = randomUUID();
      response.setHeader('X-Request-Id', id);
      return id;
    },
    customLogLevel: (_request, response, error) => {
      if (error || response.statusCode >= 500) return 'error';
      return response.statusCode >= 400 ? 'info' : 'debug';
    },
    serializers: {
      // No headers and no query values: what is not logged cannot leak from a log.
      req: ({ id, method, url, remoteAddress }: Record<string, unknown>) => ({
        id,
        method,
        path: String(url).split('?')[0],
        remoteAddress,
      }),
      res: ({ statusCode }: Record<string, unknown>) => ({ statusCode }),
    },
  });
  return function logRequest(request, response, next) {
    log(request, response);
    next();
  };
}
