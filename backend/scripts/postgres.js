import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  chmodSync,
  chownSync,
  existsSync,
  lstatSync,
  mkdirSync,
  openSync,
  closeSync,
  readFileSync,
  readdirSync,
  readlinkSync,
  renameSync,
  rmSync,
  rmdirSync,
  writeFileSync,
} from 'node:fs';
import path from 'node:path';
import { ensurePostgres } from './debian.js';
import {
  LOCAL,
  ROOT,
  UserError,
  atEnd,
  freePort,
  goOn,
  isAlive,
  isHolderAlive,
  makeLocal,
  pause,
  processName,
  randomSecret,
  say,
  withLock,
} from './project.js';

/** @typedef {{ uid: number, gid: number }} Owner the user PostgreSQL runs as */
/** @typedef {{ adminPassword: string, appPassword: string, port: number, startedPid: number }} Kept */
/** @typedef {{ dir: string, data: string, file: string, users: string, owner: Owner | null, bin: string }} Place */
/**
 * @typedef {object} Cluster
 * @property {string} url connection string of the app's role on its own database
 * @property {string} baseUrl the same role on the database `postgres`
 * @property {() => void} stop stops the cluster if these scripts started it and no other of their processes uses it
 */

const ADMIN = 'cluster_admin';
const APP = 'overwinter';
// An autovacuum worker in a database would also keep a test from dropping it: it belongs to another role.
const THROW_AWAY = ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off', 'autovacuum=off'];

/** The unprivileged user for PostgreSQL when this process is root, else null: it refuses to run as root. */
function postgresUser() {
  if (process.getuid?.() !== 0) return null;
  const line = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .find((entry) => entry.startsWith('postgres:'));
  const [, , uid, gid] = line?.split(':') ?? [];
  if (uid === undefined || gid === undefined) {
    throw new UserError('PostgreSQL refuses to run as root and there is no user `postgres`: start as another user.');
  }
  return { uid: Number(uid), gid: Number(gid) };
}

/**
 * @param {Owner | null} owner
 * @param {string} command
 * @param {string[]} args
 * @param {import('node:child_process').SpawnSyncOptions} [options]
 */
function runAs(owner, command, args, options = {}) {
  // Another user may not be able to stand in this process's working folder.
  return spawnSync(command, args, { cwd: '/', encoding: 'utf8', ...owner, ...options });
}

/**
 * Makes the folder, private to PostgreSQL's user.
 *
 * @param {string} dir
 * @param {Owner | null} owner
 * @param {boolean} mayBeForeign whether root goes on as the normal user who made the folder
 * @returns {boolean} false when a parent folder is closed to that user
 */
function prepare(dir, owner, mayBeForeign) {
  mkdirSync(dir, { recursive: true, mode: 0o700 });
  const { uid } = lstatSync(dir);
  const self = process.getuid?.() ?? uid;
  if (self !== 0 && uid !== self) {
    throw new UserError(`${dir} belongs to another user (uid ${uid}): start as that user or as root, or remove it.`);
  }
  if (owner !== null && uid !== owner.uid) {
    // Started by a normal user before: go on as that user.
    if (uid !== 0 && !mayBeForeign) throw new UserError(`${dir} belongs to uid ${uid}: remove it.`);
    if (uid !== 0) Object.assign(owner, { uid, gid: lstatSync(dir).gid });
    else chownSync(dir, owner.uid, owner.gid);
  }
  chmodSync(dir, 0o700);
  return runAs(owner, 'test', ['-w', dir]).status === 0;
}

/**
 * The folder of a cluster: in `.local`, or under /var/lib (/var/tmp for tests) when the project lies below a folder closed to `postgres`.
 *
 * @param {string} name
 * @returns {Place}
 */
function place(name) {
  makeLocal();
  const newest = ensurePostgres(null);
  const owner = postgresUser();
  let dir = path.join(LOCAL, name);
  if (!prepare(dir, owner, true)) {
    removeIfEmpty(dir);
    dir = elsewhere(name);
    say(`User postgres cannot reach ${LOCAL} (a parent folder is closed to it): the database lies in ${dir}.`);
    if (!prepare(dir, owner, false)) throw new UserError(`User postgres cannot write to ${dir}.`);
  }
  const data = path.join(dir, 'data');
  const versionFile = path.join(data, 'PG_VERSION');
  const bin = existsSync(versionFile) ? ensurePostgres(Number(readFileSync(versionFile, 'utf8'))) : newest;
  return { dir, data, file: path.join(dir, 'cluster.json'), users: path.join(dir, 'users'), owner, bin };
}

/** @param {string} dir */
function removeIfEmpty(dir) {
  try {
    rmdirSync(dir);
  } catch {
    // It holds data from a time when the folder was open: that is not ours to remove.
  }
}

/**
 * A folder outside the project that user postgres reaches. Not /var/tmp for data that stays: systems empty it by age.
 *
 * @param {string} name
 */
function elsewhere(name) {
  const key = createHash('sha256').update(ROOT).digest('hex').slice(0, 12);
  return path.join(name.startsWith('test-') ? '/var/tmp' : '/var/lib', `overwinter-${key}-${name}`);
}

/** @param {Place} at @param {Kept} kept */
function keep(at, kept) {
  // Written beside and renamed: a start that is cut off never leaves half a file.
  const next = `${at.file}.next`;
  writeFileSync(next, JSON.stringify(kept), { mode: 0o600 });
  if (at.owner) chownSync(next, at.owner.uid, at.owner.gid);
  renameSync(next, at.file);
}

/** @param {Place} at @returns {Kept} */
const kept = (at) => JSON.parse(readFileSync(at.file, 'utf8'));

/** @param {Place} at */
function initialise(at) {
  const adminPassword = randomSecret(24);
  keep(at, { adminPassword, appPassword: randomSecret(24), port: 0, startedPid: 0 });
  const passwordFile = path.join(at.dir, 'initial-password');
  writeFileSync(passwordFile, adminPassword, { mode: 0o600 });
  if (at.owner) chownSync(passwordFile, at.owner.uid, at.owner.gid);
  // Made beside and renamed: an interrupted first start leaves no half of a data folder.
  const fresh = `${at.data}.new`;
  rmSync(fresh, { recursive: true, force: true });
  const options = ['-D', fresh, '-U', ADMIN, `--pwfile=${passwordFile}`, '-A', 'scram-sha-256', '-E', 'UTF8'];
  const { status, stderr } = runAs(at.owner, path.join(at.bin, 'initdb'), [
    ...options,
    '--locale=C.UTF-8',
    '--no-sync',
  ]);
  rmSync(passwordFile, { force: true });
  if (status !== 0) throw new UserError(`initdb failed:\n${stderr}`);
  renameSync(fresh, at.data);
}

/** @param {Place} at @param {string} database @param {'admin' | 'app'} role */
function urlOf(at, database, role) {
  const { adminPassword, appPassword, port } = kept(at);
  const login = role === 'admin' ? `${ADMIN}:${adminPassword}` : `${APP}:${appPassword}`;
  return `postgres://${login}@127.0.0.1:${port}/${database}`;
}

/**
 * @template T
 * @param {Place} at
 * @param {(client: import('pg').Client) => Promise<T>} task
 */
async function asAdmin(at, task) {
  // Loaded here and not at the top: this module is read before the npm packages are there.
  const { default: pg } = await import('pg');
  const client = new pg.Client({ connectionString: urlOf(at, 'postgres', 'admin'), connectionTimeoutMillis: 5000 });
  await client.connect();
  try {
    return await task(client);
  } finally {
    await client.end();
  }
}

/**
 * The process id and port of the cluster when it runs. A lock file left behind by a crash or by another container, whose
 * process is gone or is now somebody else's, is removed: PostgreSQL itself would refuse to start over a reused id.
 *
 * @param {Place} at
 */
async function running(at) {
  const lockFile = path.join(at.data, 'postmaster.pid');
  if (!existsSync(lockFile)) return null;
  const [pidLine, , , portLine] = readFileSync(lockFile, 'utf8').split('\n');
  const pid = Number(pidLine);
  const port = Number(portLine);
  if (pid > 0 && isAlive(pid) && readlinkOrNull(`/proc/${pid}/cwd`) === at.data) return { pid, port };
  keep(at, { ...kept(at), port });
  const answers = port > 0 && (await asAdmin(at, async () => true).catch(() => false));
  if (answers) return { pid: 0, port };
  rmSync(lockFile, { force: true });
  return null;
}

/** @param {string} link */
function readlinkOrNull(link) {
  try {
    return readlinkSync(link);
  } catch {
    return null;
  }
}

/** @param {Place} at @param {boolean} isThrowAway */
async function launch(at, isThrowAway) {
  const log = path.join(at.dir, 'postgres.log');
  for (let attempt = 1; ; attempt += 1) {
    const port = await freePort(kept(at).port || 54_000 + Math.floor(Math.random() * 1000));
    const settings = ['listen_addresses=127.0.0.1', `port=${port}`, `unix_socket_directories=''`];
    const flags = [...settings, ...(isThrowAway ? THROW_AWAY : [])].map((setting) => `-c ${setting}`).join(' ');
    // Files and not pipes: the server keeps them open, and a pipe would never end.
    const output = openSync(path.join(at.dir, 'pg_ctl.log'), 'w', 0o600);
    const args = ['-D', at.data, '-l', log, '-w', '-t', '60', '-o', flags, 'start'];
    const { status } = runAs(at.owner, path.join(at.bin, 'pg_ctl'), args, { stdio: ['ignore', output, output] });
    closeSync(output);
    if (status === 0) {
      const pid = Number(readFileSync(path.join(at.data, 'postmaster.pid'), 'utf8').split('\n')[0]);
      return keep(at, { ...kept(at), port, startedPid: pid });
    }
    const tail = existsSync(log) ? readFileSync(log, 'utf8').trim().split('\n').slice(-8).join('\n') : '';
    if (attempt === 3 || !/could not (bind|create any TCP)/.test(tail)) {
      throw new UserError(`PostgreSQL did not start (log: ${log}):\n${tail}`);
    }
    keep(at, { ...kept(at), port: 0 });
  }
}

/**
 * The app's role owns its database and is no superuser. Tests make databases of their own.
 *
 * @param {Place} at
 * @param {boolean} isThrowAway
 */
async function createRole(at, isThrowAway) {
  await asAdmin(at, async (client) => {
    const { rowCount } = await client.query('SELECT 1 FROM pg_roles WHERE rolname = $1', [APP]);
    if (rowCount === 0) {
      const password = client.escapeLiteral(kept(at).appPassword);
      await client.query(`CREATE ROLE ${APP} LOGIN PASSWORD ${password} ${isThrowAway ? 'CREATEDB' : ''}`);
    }
    const { rowCount: databases } = await client.query('SELECT 1 FROM pg_database WHERE datname = $1', [APP]);
    if (databases === 0) await client.query(`CREATE DATABASE ${APP} OWNER ${APP}`);
  });
}

/** @param {Place} at */
function hasOtherUsers(at) {
  const files = readdirSync(at.users).map((name) => path.join(at.users, name));
  const gone = files.filter((file) => !isHolderAlive(file));
  for (const file of gone) rmSync(file, { force: true });
  return files.length > gone.length;
}

/** @param {Place} at @param {number} pid @param {boolean} isThrowAway */
function release(at, pid, isThrowAway) {
  rmSync(path.join(at.users, String(process.pid)), { force: true });
  if (hasOtherUsers(at)) return;
  if (kept(at).startedPid === pid) {
    runAs(at.owner, path.join(at.bin, 'pg_ctl'), ['-D', at.data, '-m', 'fast', '-w', '-t', '30', 'stop']);
  }
  if (isThrowAway) rmSync(at.dir, { recursive: true, force: true });
}

/**
 * Starts the cluster, or joins it when it runs already.
 *
 * @param {{ name?: string, isThrowAway?: boolean }} [options] name of the folder in `.local`; throw-away: fast instead of
 *   safe, removed at stop
 * @returns {Promise<Cluster>}
 */
export async function startPostgres({ name = 'pg', isThrowAway = false } = {}) {
  return withLock(`${name}-start`, async () => {
    const at = place(name);
    mkdirSync(at.users, { recursive: true });
    writeFileSync(path.join(at.users, String(process.pid)), processName(process.pid) ?? '');
    if (!existsSync(at.data)) initialise(at);
    else if (!existsSync(at.file))
      throw new UserError(`${at.file}, which holds the passwords of ${at.data}, is missing.`);
    const present = await running(at);
    if (present === null) await launch(at, isThrowAway);
    else keep(at, { ...kept(at), port: present.port });
    const pid = present?.pid ?? kept(at).startedPid;
    await createRole(at, isThrowAway);
    let isStopped = false;
    return {
      url: urlOf(at, APP, 'app'),
      baseUrl: urlOf(at, 'postgres', 'app'),
      stop: () => {
        if (!isStopped) release(at, pid, isThrowAway);
        isStopped = true;
      },
    };
  });
}

/**
 * The database of DATABASE_URL, or of the project's own cluster, which is then stopped at the command's end.
 *
 * @returns {Promise<{ url: string, isOwn: boolean }>}
 */
export async function chooseDatabase() {
  const given = process.env['DATABASE_URL'];
  if (given) return { url: given, isOwn: false };
  const starting = startPostgres();
  // Registered before it runs: Ctrl-C in between stops it as well.
  atEnd(async () => (await starting.catch(() => null))?.stop());
  const { url } = await starting;
  goOn();
  return { url, isOwn: true };
}

/** A cluster for tests: its own folder, gone after `stop`. Removes what killed test runs left behind. */
export async function startThrowAwayPostgres() {
  makeLocal();
  for (const folder of [LOCAL, path.dirname(elsewhere('test-'))]) {
    for (const entry of readdirSync(folder).map((name) => path.join(folder, name))) {
      const pid = Number(/test-(\d+)$/.exec(entry)?.[1] ?? Number.NaN);
      const isOurs = entry === path.join(LOCAL, `test-${pid}`) || entry === elsewhere(`test-${pid}`);
      if (isOurs && !isAlive(pid)) await removeLeftover(entry);
    }
  }
  return startPostgres({ name: `test-${process.pid}`, isThrowAway: true });
}

/** @param {string} dir */
async function removeLeftover(dir) {
  const pidFile = path.join(dir, 'data/postmaster.pid');
  if (existsSync(pidFile)) {
    const pid = Number(readFileSync(pidFile, 'utf8').split('\n')[0]);
    if (pid > 0 && readlinkOrNull(`/proc/${pid}/cwd`) === path.join(dir, 'data')) {
      process.kill(pid, 'SIGQUIT');
      for (let waited = 0; isAlive(pid) && waited < 50; waited += 1) await pause(100);
    }
  }
  rmSync(dir, { recursive: true, force: true });
}
