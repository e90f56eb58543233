import path from 'node:path';
import { build } from './build.js';
import { ensurePostgres } from './debian.js';
import { ensurePackages } from './packages.js';
import { chooseDatabase } from './postgres.js';
import { atEnd, goOn, hasBegunToEnd, requireNode, runMain, say } from './project.js';
import {
  choosePort,
  demoPassword,
  lastLines,
  newLog,
  serverEnvironment,
  setupUrl,
  startServer,
  stopOrphans,
} from './server.js';

/** @param {string} origin @param {string} logFile @param {boolean} isOwn whether the database is the project's own */
function greet(origin, logFile, isOwn) {
  say(`\nOverwinter runs at ${origin}/\n`);
  const link = setupUrl(logFile);
  if (link !== undefined) say(`  Make the first owner (this link works once): ${link}\n`);
  if (isOwn) {
    say('  Sign in as  owner@tarnfold.example');
    say('              also engineer@, sales@ and viewer@tarnfold.example, who may do less');
    say(`  Password    ${demoPassword()}\n`);
  }
  say(`Log: ${path.relative(process.cwd(), logFile)}`);
  say(`Ctrl-C stops the server${isOwn ? ' and its database; the data stays for the next start' : ''}.`);
}

async function main() {
  requireNode();
  // Before the packages: who must ask for it should not wait for them first.
  if (!process.env['DATABASE_URL']) ensurePostgres(null);
  ensurePackages();
  await stopOrphans();
  const port = await choosePort(3000);
  const [hasBuilt, database] = await Promise.all([build(), chooseDatabase()]);
  if (hasBuilt) say('Built the pages and the server.');
  goOn();
  const logFile = newLog();
  const server = startServer(serverEnvironment({ databaseUrl: database.url, port, withDemo: database.isOwn }), logFile);
  atEnd(server.stop);
  await server.ready;
  greet(server.origin, logFile, database.isOwn);
  const code = await server.ended;
  if (hasBegunToEnd()) return 0;
  say(`The server ended by itself (code ${code}). Its log ends with:\n${lastLines(logFile, 20)}`);
  return 1;
}

runMain(main, 0);
