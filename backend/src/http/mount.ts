import express, { type Express, type Request, type RequestHandler, type Response } from 'express';
import type { Logger } from 'pino';
import { problemsOfZod } from '#common/schemas/problem.ts';
import { InvalidInputError } from '#backend/domain/errors.ts';
import { sendProblem } from './error-handler.ts';
import { problemsOfJson } from './json-guard.ts';
import { requireSameSite } from './middleware/same-site.ts';
import type { Method, Route } from './route.ts';

export interface MountOptions {
  /** Whether an answer that its schema does not describe is refused (tests) or only logged. */
  refuseUndeclaredAnswers: boolean;
  /** Origin of the pages, for the check against cross-site requests. */
  publicOrigin: string;
}

const refusals = new WeakSet<object>();

/** Mounts the table of routes. No other place adds a route to Express. */
export function mount(app: Express, routes: readonly Route[], options: MountOptions): void {
  for (const path of new Set(routes.map((route) => route.path))) {
    const ofPath = routes.filter((route) => route.path === path);
    const address = app.route(path);
    for (const route of ofPath) {
      address[route.method](...guards(route, options.publicOrigin), handle(route, options));
    }
    address.all(refuseMethod(ofPath.map(({ method }) => method)));
  }
}

/** Whether a handler is the one that answers 405 at the end of a mounted path. */
export function isMethodRefusal(handler: object): boolean {
  return refusals.has(handler);
}

function guards(route: Route, publicOrigin: string): RequestHandler[] {
  const admit: RequestHandler = (request, _response, next) => {
    route.admit(request.principal ?? null);
    next();
  };
  if (route.method === 'get') return [admit];
  return [requireSameSite(publicOrigin), admit, ...readBody(route)];
}

/** Reads the body of an unsafe request: JSON, uncompressed, not larger than the route takes. */
function readBody(route: Route): RequestHandler[] {
  const expectBody: RequestHandler = (request, response, next) => {
    const hasBody = Number(request.headers['content-length'] ?? 0) > 0 || 'transfer-encoding' in request.headers;
    if (route.input === null) {
      if (hasBody) throw new InvalidInputError([{ path: '', message: 'This address takes no body.' }]);
      return next();
    }
    if (!hasBody) throw new InvalidInputError([{ path: '', message: 'Send a JSON body.' }]);
    if (request.is('application/json') === false || !isUtf8(request.headers['content-type'])) {
      return sendProblem(response, 'unsupported-media-type', { detail: 'Send JSON in UTF-8, as application/json.' });
    }
    next();
  };
  if (route.input === null) return [expectBody];
  const parse = express.json({
    limit: route.limits.bodyBytes,
    inflate: false,
    strict: false,
    type: 'application/json',
  });
  return [expectBody, parse, guardBody];
}

function isUtf8(contentType = ''): boolean {
  const charset = /;\s*charset\s*=\s*"?([^";\s]+)/i.exec(contentType)?.[1];
  return charset === undefined || charset.toLowerCase() === 'utf-8';
}

const guardBody: RequestHandler = (request, _response, next) => {
  const problems = problemsOfJson(request.body);
  if (problems.length > 0) throw new InvalidInputError(problems);
  next();
};

function handle(route: Route, options: MountOptions): RequestHandler {
  return async (request, response) => {
    const problems = problemsOfJson({ ...request.query });
    if (problems.length > 0) throw new InvalidInputError(problems);
    const body: unknown = request.body;
    response.locals['input'] = body;
    const answer = await route.run({
      principal: request.principal ?? null,
      params: { ...request.params },
      query: { ...request.query },
      body,
      session: request.control,
    });
    checkAnswer(route, answer.body, options, request.log);
    send(response, route, answer);
  };
}

function send(response: Response, route: Route, answer: { body: unknown; fileName: string | null }): void {
  if (answer.fileName !== null) response.attachment(answer.fileName);
  response.status(route.success).type('application/json').send(JSON.stringify(answer.body));
}

/** Compares an answer with its schema. Presenters list fields by hand, so a difference is a defect, not a leak. */
function checkAnswer(route: Route, body: unknown, options: MountOptions, log: Logger): void {
  const result = route.output.safeParse(body);
  if (result.success) return;
  const problems = problemsOfZod(result.error);
  const message = `The answer of ${route.method} ${route.path} is not as declared.`;
  if (options.refuseUndeclaredAnswers) throw new Error(`${message} ${JSON.stringify(problems)}`);
  log.error({ problems }, message);
}

function refuseMethod(methods: readonly Method[]): RequestHandler {
  const allowed = [...methods, ...(methods.includes('get') ? ['head'] : [])].map((method) => method.toUpperCase());
  const refuse: RequestHandler = (request: Request, response: Response) => {
    response.set('Allow', allowed.sort().join(', '));
    sendProblem(response, 'method-not-allowed', { detail: `${request.method} is not offered here.` });
  };
  refusals.add(refuse);
  return refuse;
}
