import pg from 'pg';
import { CONNECTION_TIMEOUT_MS } from './data-source.ts';

/** Connections of the session store, apart from the others so that sign-in does not wait for long queries. */
export function createSessionPool(url: string, onError: (error: unknown) => void): pg.Pool {
  const pool = new pg.Pool({
    connectionString: url,
    max: 4,
    connectionTimeoutMillis: CONNECTION_TIMEOUT_MS,
    statement_timeout: 10_000,
  });
  pool.on('error', onError);
  return pool;
}
