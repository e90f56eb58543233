import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import type { Request, RequestHandler, Response } from 'express';
import expressSession, { type Store } from 'express-session';
import { Passport } from 'passport';
import { Strategy } from 'passport-local';
import { UnauthenticatedError } from '#backend/domain/errors.ts';
import type { Principal } from '#backend/domain/principal.ts';
import type { UserRecord } from '#backend/domain/records.types.ts';
import type { AccountsService, SignedIn } from '#backend/services/accounts.service.ts';
import type { SessionControl } from '../session-control.ts';

declare module 'express-session' {
  interface SessionData {
    signedIn: SignedIn & { atMs: number };
  }
}

declare global {
  namespace Express {
    interface User {
      record: UserRecord;
    }
    interface Request {
      principal: Principal | null;
      control: SessionControl;
    }
  }
}

export interface SessionSettings {
  store: Store;
  secret: string;
  /** False only over plain HTTP on loopback. */
  isSecure: boolean;
  /** Time now, ms. */
  now: () => number;
}

/** A session ends after a day without a request … */
export const IDLE_LIMIT_MS = 24 * 3_600_000;
/** … and thirty days after sign-in at the latest. */
export const ABSOLUTE_LIMIT_MS = 30 * 24 * 3_600_000;

/** Sessions in the database, and for each request who it comes from. The order matters: session, then principal. */
export function sessions(settings: SessionSettings, accounts: AccountsService): RequestHandler[] {
  const prefix = settings.isSecure ? '__Host-' : '';
  const cookie = { httpOnly: true, sameSite: 'lax', secure: settings.isSecure, path: '/' } as const;
  const names = { session: `${prefix}overwinter_session`, visit: `${prefix}overwinter_visit` };
  const session = expressSession({
    store: settings.store,
    secret: derivedKey(settings.secret, 'session cookie'),
    name: names.session,
    resave: false,
    saveUninitialized: false,
    rolling: true,
    cookie: { ...cookie, maxAge: IDLE_LIMIT_MS },
  });
  const passport = localPassport(accounts);
  const identify: RequestHandler = async (request, response, next) => {
    const control = new ExpressSessionControl({ request, response, accounts, settings, passport, cookie, names });
    request.control = control;
    request.principal = await control.principal();
    next();
  };
  return [session, identify];
}

function localPassport(accounts: AccountsService): InstanceType<typeof Passport> {
  // An instance of its own: the package's shared one would leak strategies between servers in one process.
  const passport = new Passport();
  passport.use(
    new Strategy(
      { usernameField: 'email', passReqToCallback: true, session: false },
      (request, email, password, done) => {
        accounts.signIn({ email, password }, request.control.address).then(
          (record) => done(null, { record }),
          (error: unknown) => done(error),
        );
      },
    ),
  );
  return passport;
}

interface ControlParts {
  request: Request;
  response: Response;
  accounts: AccountsService;
  settings: SessionSettings;
  passport: InstanceType<typeof Passport>;
  cookie: { httpOnly: true; sameSite: 'lax'; secure: boolean; path: string };
  names: { session: string; visit: string };
}

class ExpressSessionControl implements SessionControl {
  readonly #parts: ControlParts;
  #visit: string | undefined;

  constructor(parts: ControlParts) {
    this.#parts = parts;
    this.#visit = cookieValue(parts.request, parts.names.visit);
  }

  get address(): string {
    return this.#parts.request.ip ?? 'unknown';
  }

  async authenticate(): Promise<UserRecord> {
    const { passport, request, response } = this.#parts;
    return new Promise((resolve, reject) => {
      const done = (error: unknown, user?: Express.User | false | null): void => {
        if (error instanceof Error) reject(error);
        else if (user) resolve(user.record);
        else reject(new UnauthenticatedError('wrong-credentials'));
      };
      const handler: unknown = passport.authenticate('local', { session: false }, done);
      if (typeof handler !== 'function') throw new TypeError('Passport gave no handler.');
      Reflect.apply(handler, undefined, [request, response, done]);
    });
  }

  async begin(user: UserRecord, workspaceId: string | null): Promise<void> {
    const { request, settings } = this.#parts;
    // A new id each time: one that somebody planted before sign-in is worth nothing after it.
    await settled((done) => request.session.regenerate(done));
    request.session.signedIn = { userId: user.id, epoch: user.sessionEpoch, workspaceId, atMs: settings.now() };
    await settled((done) => request.session.save(done));
  }

  async end(): Promise<void> {
    const { request, response, names, cookie } = this.#parts;
    await settled((done) => request.session.destroy(done));
    response.clearCookie(names.session, cookie);
  }

  async choose(workspaceId: string): Promise<void> {
    const { session } = this.#parts.request;
    if (session.signedIn === undefined) throw new UnauthenticatedError();
    session.signedIn = { ...session.signedIn, workspaceId };
    await settled((done) => session.save(done));
  }

  async principal(): Promise<Principal | null> {
    const { request, accounts, settings } = this.#parts;
    const signedIn = this.#signedIn();
    if (signedIn === null) return null;
    const isTooOld = settings.now() - signedIn.atMs > ABSOLUTE_LIMIT_MS;
    const principal = isTooOld ? null : await accounts.principalOf(signedIn);
    if (principal === null) await settled((done) => request.session.regenerate(done));
    return principal;
  }

  csrfToken(): string {
    if (this.#signedIn() === null && this.#visit === undefined) {
      const { response, names, cookie } = this.#parts;
      // Nobody is signed in and nothing is stored: the token hangs on a cookie of its own.
      this.#visit = randomBytes(24).toString('base64url');
      response.cookie(names.visit, this.#visit, cookie);
    }
    return this.#token();
  }

  hasToken(token: string | undefined): boolean {
    if (token === undefined || (this.#signedIn() === null && this.#visit === undefined)) return false;
    const expected = Buffer.from(this.#token());
    const sent = Buffer.from(token);
    return sent.length === expected.length && timingSafeEqual(sent, expected);
  }

  /** Session after `destroy` is gone from the request. */
  #signedIn(): (SignedIn & { atMs: number }) | null {
    const { session }: { session: Request['session'] | undefined } = this.#parts.request;
    return session?.signedIn ?? null;
  }

  #token(): string {
    const { request, settings } = this.#parts;
    const bound = this.#signedIn() === null ? `visit ${this.#visit ?? ''}` : `session ${request.sessionID}`;
    return createHmac('sha256', derivedKey(settings.secret, 'csrf token')).update(bound).digest('base64url');
  }
}

/** One secret, several uses: no use can be turned against another. */
export function derivedKey(secret: string, use: string): string {
  return createHmac('sha256', secret).update(use).digest('base64url');
}

async function settled(run: (done: (error?: unknown) => void) => void): Promise<void> {
  return new Promise((resolve, reject) => {
    run((error) => {
      if (error === undefined || error === null) resolve();
      else reject(error instanceof Error ? error : new Error('The session store failed.', { cause: error }));
    });
  });
}

function cookieValue(request: Request, name: string): string | undefined {
  const pair = (request.headers.cookie ?? '').split(';').find((part) => part.trim().startsWith(`${name}=`));
  const value = pair?.slice(pair.indexOf('=') + 1).trim();
  return value === undefined || !/^[\w-]{32}$/.test(value) ? undefined : value;
}
