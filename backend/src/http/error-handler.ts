import { STATUS_CODES } from 'node:http';
import type { ErrorRequestHandler, Response } from 'express';
import type { Problem } from '#common/schemas/problem.ts';
import {
  BusyError,
  ConflictError,
  DomainError,
  InvalidInputError,
  LimitExceededError,
} from '#backend/domain/errors.ts';
import { presentConflict } from './presenters.ts';

/** The one table from error code to status. */
const STATUS: Readonly<Record<string, number>> = {
  'invalid-input': 400,
  unauthenticated: 401,
  'wrong-credentials': 401,
  forbidden: 403,
  'no-workspace': 403,
  'cross-site': 403,
  'not-found': 404,
  'method-not-allowed': 405,
  conflict: 409,
  'body-too-large': 413,
  'unsupported-media-type': 415,
  'too-many-attempts': 429,
  internal: 500,
  busy: 503,
  unavailable: 503,
};

/** What the body parser and the file server throw, by their `type` or `status`. */
const BODY_ERRORS: Readonly<Record<string, { code: string; detail: string }>> = {
  'entity.parse.failed': { code: 'invalid-input', detail: 'The body is not valid JSON.' },
  'entity.too.large': { code: 'body-too-large', detail: 'The body is larger than this address takes.' },
  'encoding.unsupported': { code: 'unsupported-media-type', detail: 'Send the body without compression.' },
  'charset.unsupported': { code: 'unsupported-media-type', detail: 'Send the body as UTF-8.' },
  'request.aborted': { code: 'invalid-input', detail: 'The request ended before its body.' },
  'request.size.invalid': { code: 'invalid-input', detail: 'The body is not as long as its header says.' },
};

export interface ProblemOptions {
  detail?: string;
  errors?: Problem['errors'];
  current?: unknown;
  yours?: unknown;
}

/** Sends an error answer; everything that fails goes out through here. */
export function sendProblem(response: Response, code: string, options: ProblemOptions = {}): void {
  const status = STATUS[code] ?? 500;
  const requestId = response.getHeader('X-Request-Id');
  const problem: Problem = {
    type: 'about:blank',
    title: STATUS_CODES[status] ?? 'Error',
    status,
    code,
    requestId: typeof requestId === 'string' ? requestId : '',
    errors: [],
    ...options,
  };
  response
    .status(status)
    .set('Cache-Control', 'no-store')
    .type('application/problem+json')
    .send(JSON.stringify(problem));
}

/**
 * Turns every error into an answer. What is not known is logged under the request's id and answered without detail.
 *
 * @param isUnavailable tells that the database cannot be reached now
 */
export function errorHandler(isUnavailable: (error: unknown) => boolean): ErrorRequestHandler {
  return function answerError(error: unknown, request, response, next) {
    if (response.headersSent) return next(error);
    const known = describe(error, response.locals['input']);
    if (known !== null) {
      if (error instanceof LimitExceededError || error instanceof BusyError) {
        response.set('Retry-After', String(error.retryAfterS));
      }
      return sendProblem(response, known.code, known.options);
    }
    if (isUnavailable(error)) {
      request.log.warn({ err: error }, 'database unavailable');
      response.set('Retry-After', '5');
      return sendProblem(response, 'unavailable', { detail: 'The database cannot be reached. Try again in a moment.' });
    }
    request.log.error({ err: error }, 'unexpected error');
    sendProblem(response, 'internal', {
      detail: 'Something went wrong on the server. The request id names the log entry.',
    });
  };
}

function describe(error: unknown, input: unknown): { code: string; options: ProblemOptions } | null {
  if (error instanceof InvalidInputError) {
    return { code: error.code, options: { detail: error.message, errors: [...error.problems] } };
  }
  if (error instanceof ConflictError) {
    return {
      code: error.code,
      options: { detail: error.message, current: presentConflict(error.conflict), yours: input },
    };
  }
  if (error instanceof DomainError) return { code: error.code, options: { detail: error.message } };
  if (!(error instanceof Error)) return null;
  const type = 'type' in error && typeof error.type === 'string' ? error.type : '';
  const body = BODY_ERRORS[type];
  if (body) {
    const errors = body.code === 'invalid-input' ? [{ path: '', message: body.detail }] : [];
    return { code: body.code, options: { detail: body.detail, errors } };
  }
  const status = 'status' in error ? error.status : undefined;
  // The file server and the router say so when an address leads nowhere or cannot be decoded.
  if (status === 404 || error instanceof URIError) return { code: 'not-found', options: {} };
  if (status === 400)
    return { code: 'invalid-input', options: { errors: [{ path: '', message: 'The request is malformed.' }] } };
  return null;
}
