import type { EntityManager } from 'typeorm';
import { SetupTokenEntity } from './accounts.entities.ts';

/** One-time tokens that make the first owner. Expiry is told by the database's clock alone. */
export class SetupTokensRepository {
  readonly #manager: EntityManager;

  constructor(manager: EntityManager) {
    this.#manager = manager;
  }

  /** Stores the hash of a new token, good for a day, and voids all older ones. */
  async replaceAll(tokenHash: string): Promise<void> {
    await this.#manager.createQueryBuilder().delete().from(SetupTokenEntity).where('used_at IS NULL').execute();
    await this.#manager.query(
      `INSERT INTO setup_tokens (token_hash, expires_at) VALUES ($1, now() + interval '1 day')`,
      [tokenHash],
    );
  }

  async isValid(tokenHash: string): Promise<boolean> {
    return this.#manager
      .createQueryBuilder(SetupTokenEntity, 't')
      .where('t.tokenHash = :tokenHash AND t.usedAt IS NULL AND t.expiresAt > now()', { tokenHash })
      .getExists();
  }

  /** Uses the token up; false when it is unknown, used or too old. */
  async redeem(tokenHash: string): Promise<boolean> {
    const result = await this.#manager
      .createQueryBuilder()
      .update(SetupTokenEntity)
      .set({ usedAt: () => 'now()' })
      .where('token_hash = :tokenHash AND used_at IS NULL AND expires_at > now()', { tokenHash })
      .execute();
    return result.affected === 1;
  }
}
