import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { ROOT, UserError, say } from './project.js';

/** @typedef {{ version?: string, optional?: boolean, devOptional?: boolean, peer?: boolean, link?: boolean }} LockEntry */

/**
 * @param {string} file
 * @returns {Record<string, LockEntry>}
 */
function lockedPackages(file) {
  return existsSync(file) ? (JSON.parse(readFileSync(file, 'utf8')).packages ?? {}) : {};
}

/** Whether node_modules holds what the lockfile asks for; packages for other platforms may be missing. */
function isInstalled() {
  const wanted = lockedPackages(path.join(ROOT, 'package-lock.json'));
  const present = lockedPackages(path.join(ROOT, 'node_modules/.package-lock.json'));
  return Object.entries(wanted).every(([name, entry]) => {
    if (name === '' || entry.optional || entry.devOptional || entry.peer || entry.link) return true;
    return present[name]?.version === entry.version;
  });
}

/** Installs the npm packages of the lockfile where they are missing or of another version. Runs no package's script. */
export function ensurePackages() {
  if (isInstalled()) return;
  say('Installing npm packages (once) …');
  const npm = process.env['npm_execpath'];
  const args = ['ci', '--ignore-scripts', '--no-audit', '--no-fund', '--include=dev'];
  const [command, commandArgs] = npm ? [process.execPath, [npm, ...args]] : ['npm', args];
  const { status } = spawnSync(command, commandArgs, { cwd: ROOT, stdio: ['ignore', 'inherit', 'inherit'] });
  if (status !== 0) throw new UserError('npm ci failed: see its message above.');
}
