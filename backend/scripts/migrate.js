import { spawn } from 'node:child_process';
import path from 'node:path';
import { build } from './build.js';
import { ensurePackages } from './packages.js';
import { chooseDatabase } from './postgres.js';
import { ROOT, requireNode, runMain } from './project.js';
import { serverEnvironment } from './server.js';

/** Brings the database to the newest schema and ends: DATABASE_URL, or the project's own cluster. */
async function main() {
  requireNode();
  ensurePackages();
  const { url } = await chooseDatabase();
  await build();
  const args = ['--enable-source-maps', path.join(ROOT, 'dist/server/main.js'), '--migrate-only'];
  const env = { ...serverEnvironment({ databaseUrl: url, port: 3000, withDemo: false }), NODE_ENV: 'production' };
  const child = spawn(process.execPath, args, { cwd: ROOT, env, stdio: 'inherit' });
  return new Promise((resolve) => child.once('exit', (code) => resolve(code ?? 1)));
}

runMain(main);
