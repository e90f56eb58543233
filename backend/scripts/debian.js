import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { UserError, say } from './project.js';

/** @param {string} name */
function onPath(name) {
  const folders = (process.env['PATH'] ?? '').split(':').concat('/usr/sbin', '/sbin');
  return folders.map((folder) => path.join(folder, name)).find((file) => existsSync(file));
}

/**
 * Installs Debian packages as root or through a sudo that asks no password; otherwise stops with the command to run.
 *
 * @param {string[]} packages
 * @param {string} what for example `PostgreSQL`
 * @param {string} otherwise what to do on a system without apt-get
 */
function install(packages, what, otherwise) {
  if (onPath('apt-get') === undefined) throw new UserError(`${what} was not found. ${otherwise}`);
  const isRoot = process.getuid?.() === 0;
  const sudo = isRoot ? [] : ['sudo', '-n'];
  const list = packages.join(' ');
  if (!isRoot && spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status !== 0) {
    throw new UserError(
      `Missing: ${what}. Installing needs root. Run this once, then try again:\n\n` +
        `  sudo apt-get update && sudo apt-get install -y --no-install-recommends ${list}\n\n${otherwise}`,
    );
  }
  say(`Installing ${what} from Debian (once): ${list} …`);
  const apt = [...sudo, 'env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', '-q', '-o', 'DPkg::Lock::Timeout=300'];
  // An update that fails (no network, a mirror away) may still leave usable lists.
  for (const [args, mayFail] of /** @type {const} */ ([
    [['update'], true],
    [['install', '-y', '--no-install-recommends', ...packages], false],
  ])) {
    const [command = '', ...rest] = [...apt, ...args];
    const { status, stdout, stderr } = spawnSync(command, rest, { encoding: 'utf8', cwd: '/' });
    if (status !== 0 && !mayFail) throw new UserError(`apt-get could not install ${list}:\n${stdout}${stderr}`);
  }
}

/**
 * Folders with a PostgreSQL server, newest version first.
 *
 * @returns {{ major: number, bin: string }[]}
 */
function postgresFolders() {
  const debian = '/usr/lib/postgresql';
  const found = existsSync(debian)
    ? readdirSync(debian).map((version) => ({ major: Number(version), bin: path.join(debian, version, 'bin') }))
    : [];
  const elsewhere = process.env['PG_BIN'] ?? path.dirname(onPath('initdb') ?? '');
  if (elsewhere !== '' && elsewhere !== '.') {
    const { stdout } = spawnSync(path.join(elsewhere, 'postgres'), ['--version'], { encoding: 'utf8', cwd: '/' });
    const major = Number(/ (\d+)/.exec(stdout ?? '')?.[1] ?? Number.NaN);
    found.unshift({ major, bin: elsewhere });
  }
  const needed = ['initdb', 'pg_ctl', 'postgres'];
  return found
    .filter(({ major, bin }) => major >= 15 && needed.every((name) => existsSync(path.join(bin, name))))
    .sort((a, b) => b.major - a.major);
}

const POSTGRES = {
  title: 'PostgreSQL',
  packages: ['postgresql'],
  otherwise: 'Or set DATABASE_URL to a PostgreSQL 15 or newer that runs already.',
};
const CHROMIUM = {
  title: 'Chromium',
  // Chromium without the parts that draw a window: the tests take a third less time than in the whole program.
  packages: ['chromium-headless-shell', 'fonts-dejavu-core'],
  otherwise: 'Or set CHROMIUM_PATH to a Chromium that is there already.',
};

/** What the tests need, asked for in one go where several are missing. */
export function ensureTestPrograms() {
  const hasServer = process.env['TEST_DATABASE_URL'] !== undefined || postgresFolders().length > 0;
  const missing = [
    ...(hasServer ? [] : [{ ...POSTGRES, otherwise: POSTGRES.otherwise.replace('DATABASE', 'TEST_DATABASE') }]),
    ...(chromiumPath() === undefined ? [CHROMIUM] : []),
  ];
  if (missing.length === 0) return tryForShell();
  install(
    missing.flatMap(({ packages }) => packages),
    missing.map(({ title }) => title).join(' and '),
    missing.map(({ otherwise }) => otherwise).join('\n'),
  );
}

/**
 * The folder of PostgreSQL's programs; installs Debian's server when there is none. The cluster that Debian's package
 * may set up for itself is neither used nor changed.
 *
 * @param {number | null} major the version an existing data folder needs
 * @returns {string}
 */
export function ensurePostgres(major) {
  const fitting = () => postgresFolders().find((folder) => major === null || folder.major === major)?.bin;
  const present = fitting();
  if (present !== undefined) return present;
  const packages = major === null ? POSTGRES.packages : [`postgresql-${major}`];
  install(packages, POSTGRES.title, POSTGRES.otherwise);
  say('Debian may have set up a cluster of its own on port 5432: it is neither used nor changed here.');
  const installed = fitting();
  if (installed === undefined)
    throw new UserError('PostgreSQL was installed, yet /usr/lib/postgresql holds no server.');
  return installed;
}

/** @returns {string | undefined} */
function shellPath() {
  return process.env['CHROMIUM_PATH'] ?? onPath('chromium-headless-shell');
}

/** @returns {string | undefined} */
function chromiumPath() {
  return shellPath() ?? onPath('chromium') ?? onPath('chromium-browser');
}

/** Where the whole program is there already, the lighter one is worth a try, not a failure. */
function tryForShell() {
  if (shellPath() !== undefined || process.getuid?.() !== 0 || onPath('apt-get') === undefined) return;
  const options = ['-q', '-o', 'Acquire::Retries=0', '-o', 'Acquire::http::Timeout=10', '-o', 'DPkg::Lock::Timeout=60'];
  const install = ['install', '-y', '--no-install-recommends', 'chromium-headless-shell'];
  say('Fetching the lighter build of Chromium from Debian (once) …');
  for (const args of [['update'], install]) {
    const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
    spawnSync('apt-get', [...options, ...args], { stdio: 'ignore', cwd: '/', timeout: 60_000, env });
  }
}

/**
 * The Chromium program for the browser tests; installs Debian's when there is none.
 *
 * @returns {string}
 */
export function ensureChromium() {
  const present = chromiumPath();
  if (present !== undefined) return present;
  install(CHROMIUM.packages, CHROMIUM.title, CHROMIUM.otherwise);
  const installed = chromiumPath();
  if (installed === undefined)
    throw new UserError('Chromium was installed, yet no `chromium-headless-shell` is on the PATH.');
  return installed;
}
