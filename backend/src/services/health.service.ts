import type { Database } from '#backend/persistence/database.ts';

export class HealthService {
  readonly #database: Database;

  constructor(database: Database) {
    this.#database = database;
  }

  /**
   * Succeeds when the server can do its work.
   *
   * @returns when the database has answered
   * @throws {Error} of the driver when it cannot be reached
   */
  async checkReady(): Promise<void> {
    await this.#database.ping();
  }
}
