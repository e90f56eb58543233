import { randomBytes } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readFileSync, realpathSync, rmSync, writeFileSync } from 'node:fs';
import net from 'node:net';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

/** The project's folder. */
export const ROOT = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');

/** Everything a machine keeps for itself: data, logs, secrets. Git ignores it. */
export const LOCAL = path.join(ROOT, '.local');

/** An expected problem that the person at the terminal can solve: shown as text, without a stack. */
export class UserError extends Error {}

/** @param {string} text */
export const say = (text) => void process.stdout.write(`${text}\n`);

/** Stops with a plain sentence when this Node is too old for the packages. */
export function requireNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  if ((major === 20 && minor >= 19) || (major === 22 && minor >= 12) || major > 22) return;
  throw new UserError(
    `Node ${process.versions.node} is too old: this project needs 20.19 or newer (20.x), or 22.12 on.`,
  );
}

/** Makes `.local`; other users may pass through it to folders of their own but not list it. */
export function makeLocal() {
  mkdirSync(LOCAL, { recursive: true });
  try {
    chmodSync(LOCAL, 0o711);
  } catch {
    throw new UserError(`${LOCAL} belongs to another user: start as that user, or remove it.`);
  }
}

/**
 * Text kept in a file that only its owner reads; made at the first call.
 *
 * @param {string} file
 * @param {() => string} make
 */
export function keptSecret(file, make) {
  if (existsSync(file)) {
    const kept = readFileSync(file, 'utf8').trim();
    if (kept !== '') return kept;
  }
  const secret = make();
  writeFileSync(file, `${secret}\n`, { mode: 0o600 });
  return secret;
}

/** @param {number} [bytes] */
export const randomSecret = (bytes = 32) => randomBytes(bytes).toString('base64url');

/** Four groups of four characters without look-alikes: easy to read off a terminal, 78 bits. */
export function readablePassword() {
  const alphabet = 'abcdefghjkmnpqrstuvwxyz23456789';
  // 248 = 8 × 31: larger bytes would make the first letters likelier.
  const letters = [...randomBytes(64)].filter((byte) => byte < 248).map((byte) => alphabet[byte % alphabet.length]);
  return [0, 4, 8, 12].map((at) => letters.slice(at, at + 4).join('')).join('-');
}

/** @param {number} pid */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error instanceof Error && 'code' in error && error.code === 'EPERM';
  }
}

/**
 * Text that names a running process and no later one with the same number: ids are soon used again in a container.
 *
 * @param {number} pid
 * @returns {string | null} null when it does not run
 */
export function processName(pid) {
  if (!(pid > 0) || !isAlive(pid)) return null;
  const stat = `/proc/${pid}/stat`;
  // Field 22, the start time; field 2 may hold blanks and ends with the last bracket.
  const startTime = existsSync(stat) ? readFileSync(stat, 'utf8').split(') ').at(-1)?.split(' ')[19] : '';
  return `${pid} ${startTime}`;
}

/**
 * Whether the process of a `processName` still runs.
 *
 * @param {string} name
 */
export const isRunning = (name) => name !== '' && processName(Number(name.split(' ')[0])) === name;

/**
 * Whether the process that wrote its `processName` into a file still runs.
 *
 * @param {string} file
 */
export const isHolderAlive = (file) => existsSync(file) && isRunning(readFileSync(file, 'utf8'));

/**
 * Whether nothing listens on the port of the loopback address.
 *
 * @param {number} port 0 asks for any free port
 * @param {string} [host]
 * @returns {Promise<number | null>} the port, or null when it is taken
 */
export function tryPort(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', () => resolve(null));
    server.listen(port, host, () => {
      const address = server.address();
      server.close(() => resolve(typeof address === 'object' && address !== null ? address.port : null));
    });
  });
}

/**
 * The first free port from `first` on.
 *
 * @param {number} first
 */
export async function freePort(first) {
  for (let port = first; port < first + 50; port += 1) if ((await tryPort(port)) !== null) return port;
  const any = await tryPort(0);
  if (any === null) throw new UserError('No free port on 127.0.0.1.');
  return any;
}

/** @param {number} milliseconds */
export const pause = (milliseconds) => new Promise((resolve) => setTimeout(resolve, milliseconds));

/**
 * @param {string} lock
 * @param {string} self
 */
function claim(lock, self) {
  try {
    writeFileSync(lock, self, { flag: 'wx' });
    return true;
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'EEXIST') return false;
    throw error;
  }
}

/**
 * Runs a task while no other process of this project runs one of the same name.
 *
 * @template T
 * @param {string} name
 * @param {() => Promise<T>} task
 * @returns {Promise<T>}
 */
export async function withLock(name, task) {
  makeLocal();
  const lock = path.join(LOCAL, `${name}.lock`);
  const self = processName(process.pid) ?? '';
  for (let waitedMs = 0; !claim(lock, self); waitedMs += 100) {
    if (!isHolderAlive(lock)) rmSync(lock, { force: true });
    else if (waitedMs === 3000) say(`Waiting for another command of this project (${path.basename(lock)}) …`);
    await pause(100);
  }
  try {
    return await task();
  } finally {
    rmSync(lock, { force: true });
  }
}

/** @typedef {() => Promise<void> | void} Step */

/**
 * Steps to take when a command ends, also by Ctrl-C; the latest first.
 *
 * @type {Step[]}
 */
const undo = [];

/** @param {Step} step */
export const atEnd = (step) => void undo.push(step);

let isEnding = false;

/** Whether the command is on its way out, by Ctrl-C or an error. */
export const hasBegunToEnd = () => isEnding;

/** Leaves the main function when Ctrl-C came while it waited; called before it starts anything further. */
export function goOn() {
  if (isEnding) throw new UserError('Stopped.');
}

/** @param {number} code */
async function end(code) {
  if (isEnding) return;
  isEnding = true;
  // Steps may be added while others run.
  for (let step = undo.pop(); step !== undefined; step = undo.pop()) {
    try {
      await step();
    } catch (error) {
      process.stderr.write(`${error instanceof Error ? error.message : error}\n`);
    }
  }
  process.exit(code);
}

/**
 * Runs a command's main function, then the steps left with `atEnd`, whatever happens. Expected problems end as one
 * message and exit code 1.
 *
 * @param {() => Promise<number | void>} main
 * @param {number} [signalCode] exit code after Ctrl-C
 */
export function runMain(main, signalCode = 130) {
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
    process.on(signal, () => void end(signalCode));
  }
  main().then(
    (code) => end(code ?? 0),
    (error) => {
      // After Ctrl-C what was under way fails: that is no news.
      if (!isEnding) process.stderr.write(`${error instanceof UserError ? error.message : (error?.stack ?? error)}\n`);
      return end(1);
    },
  );
}

/**
 * Whether a module is the program that Node was started with, and not imported by another.
 *
 * @param {string} moduleUrl
 */
export function isEntry(moduleUrl) {
  const entry = process.argv[1];
  return entry !== undefined && existsSync(entry) && realpathSync(entry) === fileURLToPath(moduleUrl);
}
