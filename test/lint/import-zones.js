import path from 'node:path';

/**
 * Which part of the project may import which. Everything not listed is forbidden, external packages included.
 * The first zone whose pattern fits a file is the file's zone.
 *
 * @typedef {{ name: string, files: RegExp, imports: RegExp, packages: RegExp }} Zone
 */

const NOTHING = /^$/;
const SERVER_ONLY = String.raw`express|express-.*|helmet|passport|passport-.*|typeorm|pg|connect-pg-simple|pino-http|zod-openapi`;
const BROWSER_ONLY = String.raw`react|react-.*|@tanstack/.*|@hookform/.*|chart\.js.*|@fontsource/.*`;
const DEVELOPMENT = String.raw`vitest|vite|tsx|supertest|playwright-core|fast-check|@testing-library/.*|odex`;

/** @param {...string} names */
const only = (...names) => new RegExp(`^(${names.join('|')})(/|$)`);
/** @param {...string} names */
const allBut = (...names) => new RegExp(`^(?!(${names.join('|')})(/|$))`);

const FRONTEND_PACKAGES = only(
  'react',
  'react-dom',
  'react-router-dom',
  'react-hook-form',
  'chart\\.js',
  '@tanstack/.*',
  '@hookform/.*',
  '@fontsource/.*',
  'zod',
  'decimal\\.js',
);

/** @type {Zone[]} */
const ZONES = [
  { name: 'common/errors', files: /^common\/src\/errors\.ts$/, imports: NOTHING, packages: NOTHING },
  {
    name: 'common/units',
    files: /^common\/src\/units\//,
    imports: only('common/errors'),
    packages: only('decimal\\.js'),
  },
  {
    name: 'common/engine',
    files: /^common\/src\/engine\//,
    imports: only('common/errors', 'common/units'),
    packages: only('decimal\\.js'),
  },
  {
    name: 'common/schemas',
    files: /^common\/src\/schemas\//,
    imports: only('common/errors', 'common/units', 'common/engine'),
    packages: only('zod'),
  },
  {
    name: 'common/catalogue',
    files: /^common\/src\/catalogue\//,
    imports: only('common/errors', 'common/units', 'common/engine', 'common/schemas'),
    packages: only('zod'),
  },
  {
    name: 'backend/domain',
    files: /^backend\/src\/domain\//,
    imports: only('common/.*'),
    packages: allBut(SERVER_ONLY, BROWSER_ONLY, DEVELOPMENT, 'zod', 'pino'),
  },
  {
    name: 'backend/persistence',
    files: /^backend\/src\/persistence\//,
    imports: only('common/.*', 'backend/domain', 'backend/settings'),
    packages: allBut('express', 'express-.*', 'helmet', 'passport', 'passport-.*', BROWSER_ONLY, DEVELOPMENT),
  },
  {
    name: 'backend/services',
    files: /^backend\/src\/services\//,
    imports: only('common/.*', 'backend/domain', 'backend/persistence', 'backend/settings'),
    packages: allBut(SERVER_ONLY, BROWSER_ONLY, DEVELOPMENT),
  },
  {
    name: 'backend/http',
    files: /^backend\/src\/http\//,
    imports: only('common/.*', 'backend/domain', 'backend/services', 'backend/settings'),
    packages: allBut('typeorm', 'pg', BROWSER_ONLY, DEVELOPMENT),
  },
  {
    name: 'backend/compose',
    files: /^backend\/src\/(compose|main|server)\.ts$/,
    imports: only('common/.*', 'backend/.*'),
    packages: allBut(BROWSER_ONLY, DEVELOPMENT),
  },
  // Files beside compose.ts: the environment read into settings, the logger.
  {
    name: 'backend/settings',
    files: /^backend\/src\/[^/]+\.ts$/,
    imports: only('common/.*', 'backend/domain'),
    packages: allBut('typeorm', 'pg', 'express', BROWSER_ONLY, DEVELOPMENT),
  },
  {
    name: 'frontend/shared',
    files: /^frontend\/src\/(components|hooks|lib|styles)\//,
    imports: only('common/.*'),
    packages: FRONTEND_PACKAGES,
  },
  {
    name: 'frontend/features',
    files: /^frontend\/src\/features\//,
    imports: only('common/.*', 'frontend/shared'),
    packages: FRONTEND_PACKAGES,
  },
  {
    name: 'frontend/app',
    files: /^frontend\/src\/(app\/|[^/]+\.)/,
    imports: only('common/.*', 'frontend/shared', 'frontend/features'),
    packages: FRONTEND_PACKAGES,
  },
];

/** @type {Record<string, string>} */
const ALIASES = {
  '#common/': 'common/src/',
  '#backend/': 'backend/src/',
  '#frontend/': 'frontend/src/',
  '#test/': 'test/',
  '#scripts/': 'backend/scripts/',
};

const TEST_FILE = /(^test\/|\.test\.tsx?$)/;

/** @param {string} file */
function zoneOf(file) {
  const zone = ZONES.find(({ files }) => files.test(file));
  if (zone === undefined) return undefined;
  // Each feature is a zone of its own: features never import each other.
  const feature = /^frontend\/src\/features\/([^/]+)\//.exec(file)?.[1];
  return { ...zone, name: feature === undefined ? zone.name : `${zone.name}/${feature}` };
}

/**
 * The imported file's path from the project root; null for an external package.
 *
 * @param {string} source
 * @param {string} importer
 */
function resolve(source, importer) {
  const alias = Object.keys(ALIASES).find((prefix) => source.startsWith(prefix));
  if (alias !== undefined) return path.posix.normalize((ALIASES[alias] ?? '') + source.slice(alias.length));
  if (source.startsWith('.')) return path.posix.join(path.posix.dirname(importer), source);
  return null;
}

/**
 * What is wrong with an import, or null.
 *
 * @param {string} importer path from the project root, with forward slashes
 * @param {string} rawSource the text between the quotes
 * @returns {string | null}
 */
export function importProblem(importer, rawSource) {
  const source = rawSource.replace(/\?.*$/, '');
  if (source.startsWith('../../')) return 'Two levels up hides the zone: use the alias.';
  const target = resolve(source, importer);
  if (target !== null && path.posix.extname(target) === '') return `Write the file extension: '${source}'.`;
  if (TEST_FILE.test(importer)) return null;
  const from = zoneOf(importer);
  if (from === undefined) {
    return /^(common|backend|frontend)\/src\//.test(importer)
      ? `${importer} lies in no zone of test/lint/import-zones.js.`
      : null;
  }
  if (target === null) {
    return from.packages.test(source) ? null : `${from.name} does not use the package '${source}'.`;
  }
  if (TEST_FILE.test(target)) return 'Shipped code never imports test code.';
  const to = zoneOf(target);
  if (to === undefined) return `${from.name} imports '${source}', which lies in no zone.`;
  if (to.name === from.name) return null;
  if (!from.imports.test(to.name)) return `${from.name} never imports ${to.name}.`;
  return source.startsWith('../') ? 'Cross a zone through its alias only.' : null;
}

/** @type {import('eslint').Rule.RuleModule} */
export const importZones = {
  meta: { type: 'problem', docs: { description: 'Keep the direction of imports between zones.' }, schema: [] },
  create(context) {
    const importer = path.relative(context.cwd, context.filename).split(path.sep).join('/');
    /** @param {any} node */
    const check = (node) => {
      const value = node.source?.value ?? node.source?.literal?.value;
      if (typeof value !== 'string') return;
      const message = importProblem(importer, value);
      if (message !== null) context.report({ node: node.source, message });
    };
    return {
      ImportDeclaration: check,
      ExportNamedDeclaration: check,
      ExportAllDeclaration: check,
      ImportExpression: check,
      TSImportType: check,
    };
  },
};

/**
 * A lint exception needs its reason beside it: `-- reason`.
 *
 * @type {import('eslint').Rule.RuleModule}
 */
export const reasonedExceptions = {
  meta: { type: 'suggestion', docs: { description: 'Require a reason for each lint exception.' }, schema: [] },
  create(context) {
    return {
      Program() {
        for (const comment of context.sourceCode.getAllComments()) {
          if (/^\s*eslint-disable/.test(comment.value) && !/\s--\s+\S{3,}/.test(comment.value) && comment.loc) {
            context.report({ loc: comment.loc, message: 'Say why, after two dashes: eslint-disable… rule -- reason.' });
          }
        }
      },
    };
  },
};
