import { createHash, randomBytes } from 'node:crypto';
import { InvalidInputError } from '#backend/domain/errors.ts';
import type { UserRecord } from '#backend/domain/records.types.ts';
import type { Database } from '#backend/persistence/database.ts';
import type { Passwords } from './passwords.ts';

/** Makes the first workspace and its owner on a database that has no user yet. */
export class SetupService {
  readonly #database: Database;
  readonly #passwords: Passwords;

  constructor(database: Database, passwords: Passwords) {
    this.#database = database;
    this.#passwords = passwords;
  }

  /**
   * Makes a one-time token; older ones become void.
   *
   * @returns the token, good for a day; null when there is a user already
   */
  async issueToken(): Promise<string | null> {
    const token = randomBytes(32).toString('base64url');
    return this.#database.transaction(async ({ accounts, setupTokens }) => {
      if ((await accounts.countUsers()) > 0) return null;
      await setupTokens.replaceAll(hashOf(token));
      return token;
    });
  }

  /**
   * Makes workspace and owner and uses the token up.
   *
   * @param setup the token with what the form asks for
   * @returns the new owner
   * @throws {InvalidInputError} when the token is unknown, used or too old
   */
  async redeem(setup: {
    token: string;
    workspaceName: string;
    name: string;
    email: string;
    password: string;
  }): Promise<UserRecord> {
    const tokenHash = hashOf(setup.token);
    // Looked at before the password is hashed: a stranger without token costs no work.
    if (!(await this.#database.unit.setupTokens.isValid(tokenHash))) throw invalidToken();
    const passwordHash = await this.#passwords.hash(setup.password);
    return this.#database.transaction(async ({ accounts, setupTokens }) => {
      if (!(await setupTokens.redeem(tokenHash)) || (await accounts.countUsers()) > 0) throw invalidToken();
      const userId = await accounts.createUser({ email: setup.email, name: setup.name, passwordHash });
      const workspaceId = await accounts.createWorkspace({ name: setup.workspaceName, isDemo: false });
      await accounts.addMember(workspaceId, userId, 'owner');
      const user = await accounts.findUser(userId);
      if (user === null) throw new Error('The user that was just made is not there.');
      return user;
    });
  }
}

/** Tokens have 256 random bits, so a plain hash is enough to keep them useless in a database dump. */
function hashOf(token: string): string {
  return createHash('sha256').update(token, 'utf8').digest('hex');
}

function invalidToken(): InvalidInputError {
  return new InvalidInputError([
    { path: 'token', message: 'This link is not valid any more. A restart of the server prints a new one.' },
  ]);
}
