import pg from 'pg';
import type { TestProject } from 'vitest/node';
import { createDataSource } from '#backend/persistence/data-source.ts';
import { startThrowAwayPostgres } from '#scripts/postgres.js';

declare module 'vitest' {
  interface ProvidedContext {
    /** Connection string of the test cluster's database `postgres`; its role may create databases and is no superuser. */
    postgresUrl: string;
    /** Name of the migrated, empty database that test databases are copied from. */
    templateDatabase: string;
  }
}

async function execute(url: string, sql: string): Promise<void> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    await client.query(sql);
  } finally {
    await client.end();
  }
}

function withDatabase(url: string, name: string): string {
  const changed = new URL(url);
  changed.pathname = `/${name}`;
  return changed.href;
}

/**
 * Vitest global setup: a migrated template database on the cluster of TEST_DATABASE_URL, or on one started here, so that
 * `npx vitest run --project api` works alone.
 */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const given = process.env['TEST_DATABASE_URL'];
  const cluster = given === undefined ? await startThrowAwayPostgres() : null;
  const url = cluster?.baseUrl ?? given ?? '';
  const template = `template_${project.name}_${process.pid}`;
  try {
    await execute(url, `CREATE DATABASE ${template} TEMPLATE template0`);
    const source = await createDataSource(withDatabase(url, template)).initialize();
    await source.runMigrations();
    await source.destroy();
  } catch (error) {
    cluster?.stop();
    throw error;
  }
  project.provide('postgresUrl', url);
  project.provide('templateDatabase', template);
  return async () => {
    if (cluster === null) await execute(url, `DROP DATABASE IF EXISTS ${template} WITH (FORCE)`);
    cluster?.stop();
  };
}
