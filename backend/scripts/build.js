import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { ensurePackages } from './packages.js';
import { ROOT, UserError, isEntry, requireNode, runMain, say, withLock } from './project.js';

const HASH_FILE = path.join(ROOT, 'dist/source-hash');
const SOURCES = [
  'common/src',
  'backend/src',
  'backend/vite.config.ts',
  'backend/tsconfig.json',
  'frontend',
  'package-lock.json',
  'package.json',
  'tsconfig.base.json',
];

/**
 * @param {string} entry
 * @returns {string[]}
 */
function filesOf(entry) {
  const full = path.join(ROOT, entry);
  if (!existsSync(full)) return [];
  if (statSync(full).isFile()) return [entry];
  return readdirSync(full, { withFileTypes: true }).flatMap((child) => {
    const name = path.join(entry, child.name);
    if (child.isDirectory()) return filesOf(name);
    return /\.test\.tsx?$/.test(name) ? [] : [name];
  });
}

/** A digest of everything the build reads. */
function sourceHash() {
  const hash = createHash('sha256').update(process.versions.node);
  for (const file of SOURCES.flatMap(filesOf).sort())
    hash.update(`\0${file}\0`).update(readFileSync(path.join(ROOT, file)));
  return hash.digest('hex');
}

/** @param {string} config */
function viteBuild(config) {
  const vite = path.join(ROOT, 'node_modules/vite/bin/vite.js');
  const child = spawn(process.execPath, [vite, 'build', '-c', config, '--logLevel', 'warn'], {
    cwd: ROOT,
    env: { ...process.env, NODE_ENV: 'production' },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let output = '';
  child.stdout.on('data', (data) => (output += data));
  child.stderr.on('data', (data) => (output += data));
  return new Promise((resolve, reject) => {
    child.on('error', reject);
    child.on('exit', (code) => {
      if (code === 0) resolve(undefined);
      else reject(new UserError(`The build of ${config} failed:\n${output}`));
    });
  });
}

/**
 * Builds the web part and the server into dist/ when a source changed since the last build.
 *
 * @param {{ always?: boolean }} [options]
 * @returns {Promise<boolean>} whether something was built
 */
export async function build({ always = false } = {}) {
  return withLock('build', async () => {
    const hash = sourceHash();
    const isFresh =
      existsSync(HASH_FILE) &&
      readFileSync(HASH_FILE, 'utf8') === hash &&
      existsSync(path.join(ROOT, 'dist/web/index.html')) &&
      existsSync(path.join(ROOT, 'dist/server/main.js'));
    if (isFresh && !always) return false;
    rmSync(HASH_FILE, { force: true });
    await Promise.all([viteBuild('frontend/vite.config.ts'), viteBuild('backend/vite.config.ts')]);
    writeFileSync(HASH_FILE, hash);
    return true;
  });
}

if (isEntry(import.meta.url)) {
  runMain(async () => {
    requireNode();
    ensurePackages();
    await build({ always: process.argv.includes('--always') });
    say('Built dist/web and dist/server.');
  });
}
