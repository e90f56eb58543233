import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { SignInAttemptEntity } from './accounts.entities.ts';

/** Failures counted for one attempt, with the age of the oldest in each window. */
export interface AttemptCounts {
  /** This account from this address in the last 5 minutes. */
  pair: number;
  pairOldestS: number;
  /** Any account from this address in the last minute. */
  address: number;
  addressOldestS: number;
  /** This account from anywhere in the last hour. */
  account: number;
  accountOldestS: number;
  /** Whether this account was signed in from this address within 30 days. */
  isKnownAddress: boolean;
}

const COUNT = `
  SELECT
    count(*) FILTER (WHERE p.pair)::int AS "pair",
    COALESCE(extract(epoch FROM now() - min(p.at) FILTER (WHERE p.pair)), 0)::float8 AS "pairOldestS",
    count(*) FILTER (WHERE p.address)::int AS "address",
    COALESCE(extract(epoch FROM now() - min(p.at) FILTER (WHERE p.address)), 0)::float8 AS "addressOldestS",
    count(*) FILTER (WHERE p.account)::int AS "account",
    COALESCE(extract(epoch FROM now() - min(p.at) FILTER (WHERE p.account)), 0)::float8 AS "accountOldestS",
    EXISTS (
      SELECT 1 FROM sign_in_attempts
      WHERE account_key = $1 AND address = $2 AND succeeded AND at > now() - interval '30 days'
    ) AS "isKnownAddress"
  FROM (
    SELECT at,
      account_key = $1 AND address = $2 AND at > now() - interval '5 minutes' AS pair,
      address = $2 AND at > now() - interval '1 minute' AS address,
      account_key = $1 AS account
    FROM sign_in_attempts
    WHERE (account_key = $1 OR address = $2) AND NOT succeeded AND at > now() - interval '1 hour'
  ) p`;

export class SignInAttemptsRepository {
  readonly #manager: EntityManager;

  constructor(manager: EntityManager) {
    this.#manager = manager;
  }

  /** Serialises attempts on one account and from one address until the transaction ends, so that a burst is counted. */
  async lock(accountKey: string, address: string): Promise<void> {
    const lock = 'SELECT pg_advisory_xact_lock(hashtextextended($1, 0))';
    // Always in the same order: address first. Two attempts never wait for each other in a ring.
    await this.#manager.query(lock, [`address ${address}`]);
    await this.#manager.query(lock, [`account ${accountKey}`]);
  }

  async count(accountKey: string, address: string): Promise<AttemptCounts> {
    const rows: readonly AttemptCounts[] = await this.#manager.query(COUNT, [accountKey, address]);
    const [counts] = rows;
    if (counts === undefined) throw new Error('A count always has one row.');
    return counts;
  }

  /** Notes an attempt as failed until `succeed` says otherwise. */
  async begin(accountKey: string, address: string): Promise<string> {
    const id = randomUUID();
    await this.#manager.insert(SignInAttemptEntity, { id, accountKey, address });
    return id;
  }

  /** The attempt was right: it and earlier failures of the same account and address count no longer. */
  async succeed(id: string, accountKey: string, address: string): Promise<void> {
    await this.#manager.query('DELETE FROM sign_in_attempts WHERE account_key = $1 AND address = $2 AND id <> $3', [
      accountKey,
      address,
      id,
    ]);
    await this.#manager.update(SignInAttemptEntity, { id }, { succeeded: true });
  }

  /** The attempt was not judged: the server was busy or failed. */
  async withdraw(id: string): Promise<void> {
    await this.#manager.delete(SignInAttemptEntity, { id });
  }

  /** Removes what no window reaches any more. */
  async prune(): Promise<void> {
    await this.#manager.query(
      `DELETE FROM sign_in_attempts WHERE at < now() - CASE WHEN succeeded THEN interval '30 days' ELSE interval '1 hour' END`,
    );
  }
}
