import { spawn } from 'node:child_process';
import path from 'node:path';
import { ensurePackages } from './packages.js';
import { chooseDatabase } from './postgres.js';
import { ROOT, atEnd, freePort, requireNode, runMain, say } from './project.js';
import { choosePort, demoPassword, serverEnvironment } from './server.js';

/**
 * Runs a tool of node_modules until it ends.
 *
 * @param {string} tool
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<number>}
 */
function runTool(tool, args, env) {
  const command = [path.join(ROOT, 'node_modules', tool), ...args];
  // Detached: Ctrl-C reaches it once, through the step below, and not a second time from the terminal.
  const child = spawn(process.execPath, command, {
    cwd: ROOT,
    env,
    stdio: ['ignore', 'inherit', 'inherit'],
    detached: true,
  });
  const ended = new Promise((resolve) => child.once('exit', (code) => resolve(code ?? 1)));
  atEnd(async () => {
    child.kill('SIGTERM');
    await ended;
  });
  return ended;
}

/** Server and pages that reload when a source changes, on the same database as `npm start`. */
async function main() {
  requireNode();
  ensurePackages();
  const database = await chooseDatabase();
  const port = await choosePort(3000);
  const webPort = await freePort(5173);
  const env = {
    ...serverEnvironment({ databaseUrl: database.url, port, withDemo: database.isOwn }),
    NODE_ENV: 'development',
    WEB_PORT: String(webPort),
    // tsx reads one tsconfig only, and the entities need this one's decorators.
    TSX_TSCONFIG_PATH: path.join(ROOT, 'backend/tsconfig.json'),
  };
  say(`Pages on http://127.0.0.1:${webPort}/, API on http://127.0.0.1:${port}/; both reload on change.`);
  if (database.isOwn) say(`Sign in as owner@tarnfold.example with ${demoPassword()}`);
  return Promise.race([
    runTool('tsx/dist/cli.mjs', ['watch', '--clear-screen=false', 'backend/src/main.ts'], env),
    runTool('vite/bin/vite.js', ['-c', 'frontend/vite.config.ts', '--clearScreen', 'false'], env),
  ]);
}

runMain(main, 0);
