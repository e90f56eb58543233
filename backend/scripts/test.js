import { spawn } from 'node:child_process';
import path from 'node:path';
import { ensureChromium, ensurePostgres, ensureTestPrograms } from './debian.js';
import { ensurePackages } from './packages.js';
import { startThrowAwayPostgres } from './postgres.js';
import { ROOT, atEnd, goOn, requireNode, runMain, say } from './project.js';

const QUICK = ['unit', 'truth', 'ui'];
const SERVED = ['api', 'browser'];

/** @typedef {{ passed: number, failed: number }} Count */

/**
 * Runs a program of node_modules and returns its output, shown at once or at its end.
 *
 * @param {string[]} command
 * @param {{ env?: NodeJS.ProcessEnv, isShown?: boolean }} [options]
 * @returns {Promise<{ code: number, output: string }>}
 */
function run(command, { env = {}, isShown = false } = {}) {
  const colour = process.stdout.isTTY ? { FORCE_COLOR: '1' } : { NO_COLOR: '1' };
  const child = spawn(process.execPath, command, {
    cwd: ROOT,
    env: { ...process.env, ...colour, ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let output = '';
  for (const stream of [child.stdout, child.stderr]) {
    stream.setEncoding('utf8').on('data', (text) => {
      output += text;
      if (isShown) process.stdout.write(text);
    });
  }
  const ended = new Promise((resolve) => child.once('close', (code) => resolve({ code: code ?? 1, output })));
  atEnd(async () => {
    child.kill('SIGTERM');
    await ended;
  });
  return ended;
}

/**
 * A check that counts as one test.
 *
 * @param {string} name
 * @param {string[]} command
 * @returns {Promise<Count>}
 */
async function check(name, command) {
  const startMs = Date.now();
  const { code, output } = await run(command.map((part, at) => (at === 0 ? path.join('node_modules', part) : part)));
  const seconds = ((Date.now() - startMs) / 1000).toFixed(1);
  say(code === 0 ? `✓ ${name} (${seconds} s)` : `✗ ${name} (${seconds} s)\n${output}`);
  return code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 };
}

/** @returns {Promise<Count>} */
async function checks() {
  return sum([
    await check('type check', ['typescript/bin/tsc', '-b']),
    await check('lint', [
      'eslint/bin/eslint.js',
      ...['.', '--max-warnings', '0', '--cache', '--cache-strategy', 'content'],
      ...['--cache-location', '.local/eslint-cache'],
    ]),
    await check('format', [
      'prettier/bin/prettier.cjs',
      ...['--check', '.', '--log-level', 'warn', '--cache', '--cache-strategy', 'content'],
      ...['--cache-location', '.local/prettier-cache'],
    ]),
  ]);
}

/**
 * @param {string[]} projects
 * @param {NodeJS.ProcessEnv} [env]
 * @returns {Promise<Count>}
 */
async function suites(projects, env) {
  if (projects.length === 0) return { passed: 0, failed: 0 };
  const selection = projects.flatMap((name) => ['--project', name]);
  const command = ['node_modules/vitest/vitest.mjs', 'run', ...selection, ...filters];
  const { code, output } = await run(command, { env, isShown: true });
  const [, passed, failed] = /(\d+) passed, (\d+) failed\s*$/.exec(output) ?? [];
  // Without its last line, the run did not get to count.
  if (passed === undefined || failed === undefined) return { passed: 0, failed: 1 };
  return { passed: Number(passed), failed: Math.max(Number(failed), code === 0 ? 0 : 1) };
}

/** @param {Count[]} counts @returns {Count} */
const sum = (counts) =>
  counts.reduce((a, b) => ({ passed: a.passed + b.passed, failed: a.failed + b.failed }), { passed: 0, failed: 0 });

const words = process.argv.slice(2);
const isLong = words.includes('--long');
const asked = words.filter((word) => [...QUICK, ...SERVED].includes(word));
const filters = words.filter((word) => word !== '--long' && !asked.includes(word));
const isWanted = (/** @type {string} */ name) => asked.length === 0 || asked.includes(name);

/** `test.js [--long] [project…] [file filter…]`: without a project, every check and every suite. */
async function main() {
  // Registered first and so done last: the last line of output, also when something fails before a test ran.
  let total = { passed: 0, failed: 1 };
  atEnd(() => say(`${total.passed} passed, ${total.failed} failed`));
  requireNode();
  const quick = QUICK.filter(isWanted);
  const served = SERVED.filter(isWanted);
  const needsCluster = served.length > 0 && process.env['TEST_DATABASE_URL'] === undefined;
  /** @type {NodeJS.ProcessEnv} */
  const env = isLong ? { LONG: '1' } : {};
  if (served.includes('browser')) ensureTestPrograms();
  else if (needsCluster) ensurePostgres(null);
  if (served.includes('browser')) env['CHROMIUM_PATH'] = ensureChromium();
  ensurePackages();
  if (needsCluster) {
    const starting = startThrowAwayPostgres();
    atEnd(async () => (await starting.catch(() => null))?.stop());
    env['TEST_DATABASE_URL'] = (await starting).baseUrl;
    goOn();
  }
  const isWhole = asked.length === 0;
  // Two lanes for two cores; the suite with a real browser takes both.
  const lane = isWhole ? { ...env, TEST_WORKERS: '1' } : env;
  const api = served.filter((name) => name === 'api');
  const firstLane = async () => sum([...(isWhole ? [await checks()] : []), await suites(api, lane)]);
  const first = await Promise.all([firstLane(), suites(quick, lane)]);
  const browser = served.filter((name) => name === 'browser');
  total = sum([...first, await suites(browser, env)]);
  return total.failed === 0 ? 0 : 1;
}

runMain(main);
