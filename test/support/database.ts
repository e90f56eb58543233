import { randomBytes } from 'node:crypto';
import { setTimeout as pause } from 'node:timers/promises';
import pg from 'pg';
import { inject } from 'vitest';

export interface TestDatabase {
  /** Connection string of the database. */
  url: string;
  /** Removes the database, whoever is still connected to it. */
  drop: () => Promise<void>;
}

async function withAdmin(task: (client: pg.Client) => Promise<unknown>): Promise<void> {
  const client = new pg.Client({ connectionString: inject('postgresUrl') });
  await client.connect();
  try {
    await task(client);
  } finally {
    await client.end();
  }
}

/** PostgreSQL's code for a template that another session is copying or connected to at this moment. */
const OBJECT_IN_USE = '55006';

async function copyTemplate(client: pg.Client, name: string): Promise<void> {
  for (let triesLeft = 50; ; triesLeft -= 1) {
    try {
      await client.query(`CREATE DATABASE ${name} TEMPLATE ${inject('templateDatabase')}`);
      return;
    } catch (error) {
      const isBusy = error instanceof pg.DatabaseError && error.code === OBJECT_IN_USE;
      if (!isBusy || triesLeft === 0) throw error;
      await pause(100);
    }
  }
}

/**
 * Makes a migrated database without any row, for one test file. Drop it in `afterAll`.
 *
 * @param name lower-case letters, digits and underscores; a random suffix keeps runs apart
 */
export async function createTestDatabase(name: string): Promise<TestDatabase> {
  const database = `${name}_${randomBytes(4).toString('hex')}`;
  await withAdmin((client) => copyTemplate(client, database));
  const url = new URL(inject('postgresUrl'));
  url.pathname = `/${database}`;
  return {
    url: url.href,
    drop: () => withAdmin((client) => client.query(`DROP DATABASE IF EXISTS ${database} WITH (FORCE)`)),
  };
}
