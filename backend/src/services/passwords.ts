import { createHmac, randomBytes } from 'node:crypto';
import bcrypt from 'bcryptjs';
import { BusyError } from '#backend/domain/errors.ts';

export interface PasswordOptions {
  /** bcrypt cost: 12 in use, 4 in tests. */
  cost: number;
  /** Key of the hash that comes before bcrypt. Changing it voids every password. */
  pepper: string;
  /** Hashes at once; further ones wait. Default 4. */
  maxAtOnce?: number;
  /** Requests that may wait; more are told that the server is busy. Default 32. */
  maxWaiting?: number;
}

/**
 * Hashes and checks passwords. bcrypt reads 72 bytes at most, so the password goes through HMAC-SHA-256 and base64 first:
 * 44 characters that depend on every one typed, without a zero byte.
 */
export class Passwords {
  readonly #cost: number;
  readonly #pepper: string;
  readonly #slots: Slots;
  readonly #nobody: Promise<string>;

  constructor({ cost, pepper, maxAtOnce = 4, maxWaiting = 32 }: PasswordOptions) {
    this.#cost = cost;
    this.#pepper = pepper;
    this.#slots = new Slots(maxAtOnce, maxWaiting);
    this.#nobody = bcrypt.hash(this.#digest(randomBytes(24).toString('base64')), cost);
  }

  /**
   * Makes the hash to be stored.
   *
   * @param password as typed, neither trimmed nor folded
   * @returns the bcrypt hash, with its salt and cost
   * @throws {BusyError} when too many hashes are waiting
   */
  async hash(password: string): Promise<string> {
    return this.#slots.run(async () => bcrypt.hash(this.#digest(password), this.#cost));
  }

  /**
   * Tells whether a password is the one behind a hash. Without a hash it does the same work for nothing, so that the time
   * of an answer does not tell which accounts exist.
   *
   * @param password as typed
   * @param hash the stored hash; null for an unknown account
   * @returns true only for the right password of a known account
   * @throws {BusyError} when too many hashes are waiting
   */
  async verify(password: string, hash: string | null): Promise<boolean> {
    const stored = hash ?? (await this.#nobody);
    const isRight = await this.#slots.run(async () => bcrypt.compare(this.#digest(password), stored));
    return isRight && hash !== null;
  }

  #digest(password: string): string {
    return createHmac('sha256', this.#pepper).update(password, 'utf8').digest('base64');
  }
}

/** At most so many at once, at most so many waiting. */
class Slots {
  #running = 0;
  readonly #waiting: (() => void)[] = [];
  readonly #maxAtOnce: number;
  readonly #maxWaiting: number;

  constructor(maxAtOnce: number, maxWaiting: number) {
    this.#maxAtOnce = maxAtOnce;
    this.#maxWaiting = maxWaiting;
  }

  /**
   * Runs work in a slot, waiting for one if needed.
   *
   * @param work to be run
   * @returns what it gives
   * @throws {BusyError} when too many wait already
   */
  async run<T>(work: () => Promise<T>): Promise<T> {
    if (this.#running < this.#maxAtOnce) this.#running += 1;
    else if (this.#waiting.length >= this.#maxWaiting) throw new BusyError();
    // The slot is handed over by whoever leaves, so that nobody slips in between.
    else await new Promise<void>((resolve) => this.#waiting.push(resolve));
    try {
      return await work();
    } finally {
      const next = this.#waiting.shift();
      if (next) next();
      else this.#running -= 1;
    }
  }
}
