import { spawn } from 'node:child_process';
import {
  closeSync,
  existsSync,
  mkdirSync,
  openSync,
  readFileSync,
  readdirSync,
  renameSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import path from 'node:path';
import {
  LOCAL,
  ROOT,
  UserError,
  freePort,
  isRunning,
  keptSecret,
  makeLocal,
  pause,
  processName,
  randomSecret,
  readablePassword,
  tryPort,
} from './project.js';

/**
 * The environment of a server with its own kept secrets.
 *
 * @param {{ databaseUrl: string, port: number, withDemo: boolean }} options
 * @returns {NodeJS.ProcessEnv}
 */
export function serverEnvironment({ databaseUrl, port, withDemo }) {
  makeLocal();
  /** @type {NodeJS.ProcessEnv} */
  const env = { HOST: '127.0.0.1', ...process.env, DATABASE_URL: databaseUrl, PORT: String(port) };
  env['OVERWINTER_SESSION_SECRET'] ??= keptSecret(path.join(LOCAL, 'session-secret'), () => randomSecret());
  if (withDemo) {
    env['OVERWINTER_SEED_DEMO'] = '1';
    env['OVERWINTER_DEMO_PASSWORD'] = demoPassword();
  }
  return env;
}

/** The password of the demo accounts on this machine. */
export const demoPassword = () => keptSecret(path.join(LOCAL, 'demo-password'), readablePassword);

/**
 * The port asked for by PORT, which must be free, or the first free one from `usual` on.
 *
 * @param {number} usual
 */
export async function choosePort(usual) {
  const asked = process.env['PORT'];
  if (asked === undefined || asked === '') return freePort(usual);
  const port = Number(asked);
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new UserError(`PORT is '${asked}': give a number from 1 to 65535.`);
  }
  if ((await tryPort(port)) === null) throw new UserError(`Port ${port} (from PORT) is taken: choose another.`);
  return port;
}

/** A new log file, readable only by its owner; the one before is kept. */
export function newLog() {
  const file = path.join(LOCAL, 'log/server.log');
  mkdirSync(path.dirname(file), { recursive: true, mode: 0o700 });
  if (existsSync(file)) renameSync(file, `${file}.1`);
  closeSync(openSync(file, 'w', 0o600));
  return file;
}

/** @param {string} file @param {number} count */
export const lastLines = (file, count) => readFileSync(file, 'utf8').trimEnd().split('\n').slice(-count).join('\n');

/**
 * @typedef {object} Server
 * @property {string} origin
 * @property {Promise<void>} ready fulfilled when it answers; rejected when it ends before, or stays silent for 2 minutes
 * @property {Promise<number | null>} ended exit code; null after a signal
 * @property {() => Promise<void>} stop asks it to finish its work, and ends it after 15 s
 */

/**
 * Starts the built server.
 *
 * @param {NodeJS.ProcessEnv} env
 * @param {string} logFile
 * @returns {Server}
 */
export function startServer(env, logFile) {
  const log = openSync(logFile, 'a', 0o600);
  const child = spawn(process.execPath, ['--enable-source-maps', path.join(ROOT, 'dist/server/main.js')], {
    cwd: ROOT,
    env: { ...env, NODE_ENV: 'production' },
    stdio: ['ignore', log, log],
    // A session of its own: Ctrl-C in the terminal reaches it only through `stop`.
    detached: true,
  });
  closeSync(log);
  let hasEnded = false;
  /** @type {Promise<number | null>} */
  const ended = new Promise((resolve) => {
    child.once('exit', (code) => resolve(code));
    child.once('error', () => resolve(1));
  });
  void ended.then(() => (hasEnded = true));
  const record = child.pid === undefined ? null : recordServer(child.pid);
  const stop = async () => {
    child.kill('SIGTERM');
    const late = setTimeout(() => child.kill('SIGKILL'), 15_000);
    await ended;
    clearTimeout(late);
    if (record !== null) rmSync(record, { force: true });
  };
  const origin = `http://127.0.0.1:${env['PORT']}`;
  const untilReady = async () => {
    const latestMs = Date.now() + 120_000;
    while (!hasEnded && Date.now() < latestMs) {
      if (await isReady(origin)) return;
      await pause(50);
    }
    throw new UserError(`The server did not start. Its log, ${logFile}, ends with:\n${lastLines(logFile, 20)}`);
  };
  return { origin, ready: untilReady(), ended, stop };
}

const SERVERS = path.join(LOCAL, 'servers');

/** @param {number} pid */
function recordServer(pid) {
  mkdirSync(SERVERS, { recursive: true, mode: 0o700 });
  const file = path.join(SERVERS, String(pid));
  writeFileSync(file, `${processName(pid)}\n${processName(process.pid)}`);
  return file;
}

/** Ends servers whose start command was killed and could not end them itself. */
export async function stopOrphans() {
  if (!existsSync(SERVERS)) return;
  for (const file of readdirSync(SERVERS).map((name) => path.join(SERVERS, name))) {
    const [server = '', launcher = ''] = readFileSync(file, 'utf8').split('\n');
    if (isRunning(launcher)) continue;
    if (isRunning(server)) {
      process.kill(Number(server.split(' ')[0]), 'SIGTERM');
      for (let waited = 0; isRunning(server) && waited < 100; waited += 1) await pause(50);
    }
    rmSync(file, { force: true });
  }
}

/** @param {string} origin */
async function isReady(origin) {
  try {
    const response = await fetch(`${origin}/health/ready`, { signal: AbortSignal.timeout(2000) });
    return response.ok;
  } catch {
    return false;
  }
}

/**
 * The one-time link for the first owner that the server wrote into its log, if any.
 *
 * @param {string} logFile
 * @returns {string | undefined}
 */
export function setupUrl(logFile) {
  return /"setupUrl":"([^"]+)"/.exec(readFileSync(logFile, 'utf8'))?.[1];
}
