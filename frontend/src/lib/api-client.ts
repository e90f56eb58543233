import { z } from 'zod';
import { problemSchema, type Problem } from '#common/schemas/problem.ts';
import { reportReachable } from './reachability.ts';

const BASE = '/api/v1';
/** Refusal of an unsafe request whose token belongs to an earlier session. */
const STALE_TOKEN_CODE = 'cross-site';

/** Any answer that is not a success. Status 0: the server was not reached. */
export class ApiError extends Error {
  readonly status: number;
  readonly problem: Problem | null;

  constructor(status: number, problem: Problem | null, options?: ErrorOptions) {
    super(problem?.detail ?? problem?.title ?? wordsOfStatus(status), options);
    this.name = 'ApiError';
    this.status = status;
    this.problem = problem;
  }

  get isOffline(): boolean {
    return this.status === 0;
  }
}

/** Schema of an answer without a body. */
export const nothing = z.undefined();

let csrfToken: string | null = null;
let signedOutListener: () => void = () => undefined;

/** Takes the token that came with a session; every unsafe request carries it from then on. */
export function setCsrfToken(token: string | null): void {
  csrfToken = token;
}

/** Called whenever the server does not know the session any more. */
export function onSignedOut(listener: () => void): void {
  signedOutListener = listener;
}

interface Call<T> {
  method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  path: string;
  body?: unknown;
  schema: z.ZodType<T>;
  signal?: AbortSignal | undefined;
}

export const api = {
  get: <T>(path: string, schema: z.ZodType<T>, signal?: AbortSignal) => call({ method: 'GET', path, schema, signal }),
  post: <T>(path: string, body: unknown, schema: z.ZodType<T>) => call({ method: 'POST', path, body, schema }),
  put: <T>(path: string, body: unknown, schema: z.ZodType<T>) => call({ method: 'PUT', path, body, schema }),
  patch: <T>(path: string, body: unknown, schema: z.ZodType<T>) => call({ method: 'PATCH', path, body, schema }),
  delete: <T>(path: string, body: unknown, schema: z.ZodType<T>) => call({ method: 'DELETE', path, body, schema }),
};

async function call<T>(options: Call<T>): Promise<T> {
  const isUnsafe = options.method !== 'GET';
  if (isUnsafe && csrfToken === null) await fetchCsrfToken();
  let response = await send(options);
  if (isUnsafe && response.status === 403 && (await isStaleToken(response))) {
    await fetchCsrfToken();
    response = await send(options);
  }
  return read(response, options);
}

async function send<T>({ method, path, body, signal }: Call<T>): Promise<Response> {
  const headers = new Headers({ Accept: 'application/json' });
  if (body !== undefined) headers.set('Content-Type', 'application/json');
  if (method !== 'GET' && csrfToken !== null) headers.set('X-CSRF-Token', csrfToken);
  try {
    const response = await fetch(BASE + path, {
      method,
      headers,
      credentials: 'same-origin',
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
      ...(signal ? { signal } : {}),
    });
    reportReachable(true);
    return response;
  } catch (cause) {
    if (signal?.aborted) throw cause;
    reportReachable(false);
    throw new ApiError(0, null, { cause });
  }
}

async function read<T>(response: Response, { schema }: Call<T>): Promise<T> {
  if (!response.ok) {
    const problem = await problemOf(response);
    if (response.status === 401 && problem?.code === 'unauthenticated') signedOutListener();
    throw new ApiError(response.status, problem);
  }
  const text = await response.text();
  const parsed = schema.safeParse(text === '' ? undefined : jsonOf(text));
  if (!parsed.success) throw new ApiError(502, null, { cause: parsed.error });
  return parsed.data;
}

async function fetchCsrfToken(): Promise<void> {
  const response = await send({ method: 'GET', path: '/session', schema: z.unknown() });
  const parsed = z.looseObject({ csrfToken: z.string() }).safeParse(jsonOf(await response.text()));
  if (parsed.success) csrfToken = parsed.data.csrfToken;
}

async function isStaleToken(response: Response): Promise<boolean> {
  const problem = await problemOf(response.clone());
  return problem?.code === STALE_TOKEN_CODE;
}

async function problemOf(response: Response): Promise<Problem | null> {
  const parsed = problemSchema.safeParse(jsonOf(await response.text()));
  return parsed.success ? parsed.data : null;
}

function jsonOf(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

function wordsOfStatus(status: number): string {
  if (status === 0) return 'The server cannot be reached.';
  if (status === 502) return 'The server sent an answer that this page does not understand. Reload the page.';
  return `The server answered with status ${status}.`;
}
