import { createHmac } from 'node:crypto';
import { LimitExceededError } from '#backend/domain/errors.ts';
import type { Database } from '#backend/persistence/database.ts';

/** Wrong passwords allowed before further attempts are refused. */
export interface ThrottleLimits {
  /** One account from one address in 5 minutes. */
  perAccountAndAddress: number;
  /** All accounts from one address in a minute. */
  perAddress: number;
  /** One account from all addresses in an hour. */
  perAccount: number;
}

export const THROTTLE_LIMITS: ThrottleLimits = { perAccountAndAddress: 5, perAddress: 10, perAccount: 50 };

/**
 * Slows down guessing without letting a stranger lock somebody out: the tight limit counts an account and an address
 * together, and the limit of an account over all addresses spares addresses from which its owner was signed in lately.
 * Attempts are noted before the password is looked at, so that parallel ones are counted too; right ones are forgotten.
 */
export class SignInThrottle {
  readonly #database: Database;
  readonly #key: string;
  readonly #limits: ThrottleLimits;

  constructor(database: Database, key: string, limits: ThrottleLimits) {
    this.#database = database;
    this.#key = key;
    this.#limits = limits;
  }

  /**
   * Runs one check of a password under the limits.
   *
   * @param email account as typed, known or not
   * @param address where the attempt comes from
   * @param check gives null for a wrong password
   * @returns what `check` gives
   * @throws {LimitExceededError} without running `check`, when there were too many wrong ones
   */
  async attempt<T>(email: string, address: string, check: () => Promise<T | null>): Promise<T | null> {
    const account = createHmac('sha256', this.#key).update(email.toLowerCase(), 'utf8').digest('hex');
    const id = await this.#begin(account, address);
    let result: T | null;
    try {
      result = await check();
    } catch (error) {
      await this.#database.unit.signInAttempts.withdraw(id);
      throw error;
    }
    if (result !== null) {
      await this.#database.transaction(async ({ signInAttempts }) => signInAttempts.succeed(id, account, address));
    }
    return result;
  }

  async #begin(account: string, address: string): Promise<string> {
    return this.#database.transaction(async ({ signInAttempts }) => {
      await signInAttempts.lock(account, address);
      const counts = await signInAttempts.count(account, address);
      const limits = this.#limits;
      if (counts.pair >= limits.perAccountAndAddress) throw tooMany(300, counts.pairOldestS);
      if (counts.address >= limits.perAddress) throw tooMany(60, counts.addressOldestS);
      if (counts.account >= limits.perAccount && !counts.isKnownAddress) throw tooMany(3_600, counts.accountOldestS);
      return signInAttempts.begin(account, address);
    });
  }
}

function tooMany(windowS: number, oldestS: number): LimitExceededError {
  return new LimitExceededError(Math.max(1, Math.ceil(windowS - oldestS)));
}
