import type { DataSource } from 'typeorm';

/** Any number, as long as it is ours alone. */
const LOCK = 7_263_519;

/** Runs the migrations that are missing. Servers that start at once wait for each other. */
export async function migrate(dataSource: DataSource): Promise<string[]> {
  const lock = dataSource.createQueryRunner();
  try {
    await lock.query('SELECT pg_advisory_lock($1)', [LOCK]);
    const done = await dataSource.runMigrations();
    return done.map(({ name }) => name);
  } finally {
    await lock.query('SELECT pg_advisory_unlock($1)', [LOCK]).catch(() => undefined);
    await lock.release();
  }
}
