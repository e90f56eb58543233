import { InvalidInputError, UnauthenticatedError } from '#backend/domain/errors.ts';
import type { Principal } from '#backend/domain/principal.ts';
import type { UserRecord } from '#backend/domain/records.types.ts';
import type { Database } from '#backend/persistence/database.ts';
import type { Passwords } from './passwords.ts';
import type { SignInThrottle } from './sign-in-throttle.ts';

/** What a session remembers of who signed in. */
export interface SignedIn {
  userId: string;
  /** Epoch of the user at sign-in; a change of password makes it stale. */
  epoch: number;
  /** Workspace chosen, if any. */
  workspaceId: string | null;
}

export class AccountsService {
  readonly #database: Database;
  readonly #passwords: Passwords;
  readonly #throttle: SignInThrottle;

  constructor(database: Database, passwords: Passwords, throttle: SignInThrottle) {
    this.#database = database;
    this.#passwords = passwords;
    this.#throttle = throttle;
  }

  /**
   * Checks e-mail address and password.
   *
   * @param credentials as typed
   * @param address where the request comes from
   * @returns the user
   * @throws {UnauthenticatedError} the same for an unknown address and a wrong password
   * @throws {LimitExceededError} after too many wrong passwords
   */
  async signIn(credentials: { email: string; password: string }, address: string): Promise<UserRecord> {
    const email = credentials.email.trim();
    const user = await this.#throttle.attempt(email, address, async () => {
      const found = await this.#database.unit.accounts.findUserForSignIn(email);
      const isRight = await this.#passwords.verify(credentials.password, found?.passwordHash ?? null);
      return isRight ? found : null;
    });
    if (user === null) throw new UnauthenticatedError('wrong-credentials');
    return user;
  }

  /**
   * Who a session stands for at this moment: user, memberships and role are read anew.
   *
   * @param signedIn what the session remembers
   * @returns the principal; null when the session is over because the password was changed or the user is gone
   */
  async principalOf(signedIn: SignedIn): Promise<Principal | null> {
    const { accounts } = this.#database.unit;
    const user = await accounts.findUser(signedIn.userId);
    if (user === null || user.sessionEpoch !== signedIn.epoch) return null;
    const workspaces = await accounts.listWorkspaces(user.id);
    const chosen = workspaces.find(({ id }) => id === signedIn.workspaceId);
    return { user, workspaces, workspace: chosen ?? workspaces[0] ?? null };
  }

  /**
   * Sets another password and ends all other sessions of the user.
   *
   * @param user who asks
   * @param change the current password and the new one
   * @param address where the request comes from
   * @returns the user with the new epoch, for the session that goes on
   * @throws {InvalidInputError} when the current password is wrong
   * @throws {LimitExceededError} after too many wrong passwords
   */
  async changePassword(
    user: UserRecord,
    change: { currentPassword: string; newPassword: string },
    address: string,
  ): Promise<UserRecord> {
    const { accounts } = this.#database.unit;
    const stored = await this.#throttle.attempt(user.email, address, async () => {
      const found = await accounts.findUserForSignIn(user.email);
      const isRight = await this.#passwords.verify(change.currentPassword, found?.passwordHash ?? null);
      return isRight ? found : null;
    });
    if (stored === null) throw wrongCurrentPassword();
    const hash = await this.#passwords.hash(change.newPassword);
    const epoch = await accounts.replacePassword(user.id, stored.passwordHash, hash);
    // Changed by another request meanwhile: what was checked is not the current password any more.
    if (epoch === null) throw wrongCurrentPassword();
    return { ...user, sessionEpoch: epoch };
  }
}

function wrongCurrentPassword(): InvalidInputError {
  return new InvalidInputError([{ path: 'currentPassword', message: 'This is not your current password.' }]);
}
