import js from '@eslint/js';
import jsdoc from 'eslint-plugin-jsdoc';
import hooks from 'eslint-plugin-react-hooks';
import { defineConfig } from 'eslint/config';
import globals from 'globals';
import ts from 'typescript-eslint';
import { importZones, reasonedExceptions } from './test/lint/import-zones.js';

const TESTS = ['**/*.test.ts', '**/*.test.tsx', 'test/**'];
// Data, declarations and the one document schema are read as tables: length is no sign of tangle there.
const TABLES = [
  '**/*.table.ts',
  '**/*.types.ts',
  'common/src/catalogue/**',
  'common/src/schemas/scenario.schema.ts',
  'backend/src/persistence/migrations/**',
];

const cap = (linesPerFile, linesPerFunction) => ({
  'max-lines': ['error', { max: linesPerFile, skipBlankLines: true, skipComments: true }],
  'max-lines-per-function': ['error', { max: linesPerFunction, skipBlankLines: true, skipComments: true }],
  'max-params': ['error', 4],
});

// A later object replaces a rule's options, so each place that adds to these repeats them.
const SYNTAX = [
  { selector: 'ExportDefaultDeclaration', message: 'Named exports only.' },
  { selector: 'ExportAllDeclaration', message: 'No barrels: import from the file that defines it.' },
  { selector: 'ExportNamedDeclaration[source]', message: 'No barrels: import from the file that defines it.' },
  { selector: 'ThrowStatement > :matches(Literal, TemplateLiteral)', message: 'Throw an instance of an error class.' },
];
const PURE_SYNTAX = [
  { selector: 'ImportExpression', message: 'No dynamic import in the engine.' },
  { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: 'Time is an argument.' },
];
const BARE_SYNTAX = SYNTAX.filter(({ selector }) => selector.startsWith('Throw'));

const EXPORTED_FUNCTIONS = [
  'ExportNamedDeclaration > FunctionDeclaration',
  'ExportNamedDeclaration > VariableDeclaration > VariableDeclarator > ArrowFunctionExpression',
];
const docBlocks = (contexts) => ({
  'jsdoc/require-jsdoc': ['error', { require: { FunctionDeclaration: false }, contexts, enableFixer: false }],
  'jsdoc/require-description': ['error', { contexts }],
  'jsdoc/require-param': ['error', { contexts, checkDestructured: false, enableFixer: false }],
  'jsdoc/require-param-description': ['error', { contexts }],
  'jsdoc/check-param-names': ['error', { checkDestructured: false }],
  'jsdoc/require-returns': ['error', { contexts, enableFixer: false }],
  'jsdoc/require-throws': ['error', { contexts }],
});

export default defineConfig(
  { ignores: ['dist/', '.local/', 'coverage/', 'test/lint/fixtures/'] },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  js.configs.recommended,
  ...ts.configs.recommendedTypeChecked,
  {
    // One program for all areas: a third less work than one for each of their projects.
    languageOptions: {
      parserOptions: { project: './test/lint/tsconfig.json', tsconfigRootDir: import.meta.dirname },
    },
    settings: { jsdoc: { mode: 'typescript' } },
  },
  {
    files: ['**/*.{ts,tsx,js}'],
    plugins: { overwinter: { rules: { 'import-zones': importZones, 'reasoned-exceptions': reasonedExceptions } } },
    rules: {
      'overwinter/import-zones': 'error',
      'overwinter/reasoned-exceptions': 'error',
      eqeqeq: 'error',
    },
  },
  {
    files: ['**/*.{ts,tsx}'],
    rules: {
      'no-restricted-syntax': ['error', ...SYNTAX],
      'max-params': ['error', 4],
      '@typescript-eslint/ban-ts-comment': ['error', { minimumDescriptionLength: 10 }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'separate-type-imports' }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
      '@typescript-eslint/require-await': 'off',
      // Express 5 and React both accept handlers that return promises.
      '@typescript-eslint/no-misused-promises': [
        'error',
        { checksVoidReturn: { arguments: false, attributes: false } },
      ],
    },
  },
  {
    files: ['{common,backend,frontend}/src/**/*.{ts,tsx}'],
    ignores: [...TESTS, 'common/src/schemas/**'],
    rules: { '@typescript-eslint/consistent-type-assertions': ['error', { assertionStyle: 'never' }] },
  },

  { files: ['common/src/**/*.ts'], ignores: [...TESTS, ...TABLES], rules: cap(300, 60) },
  {
    files: ['common/src/{engine,units}/**/*.ts', 'common/src/errors.ts'],
    ignores: TESTS,
    rules: {
      'no-restricted-syntax': ['error', ...SYNTAX, ...PURE_SYNTAX],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'Randomness is an argument.' },
        { object: 'Date', property: 'now', message: 'Time is an argument.' },
      ],
      'no-restricted-globals': [
        'error',
        'window',
        'document',
        'fetch',
        'process',
        'console',
        'setTimeout',
        'performance',
      ],
    },
  },
  {
    files: ['common/src/{engine,units}/**/*.ts'],
    ignores: [...TESTS, ...TABLES],
    plugins: { jsdoc },
    rules: {
      ...cap(200, 50),
      complexity: ['error', 12],
      ...docBlocks(EXPORTED_FUNCTIONS),
      'jsdoc/require-example': ['error', { contexts: EXPORTED_FUNCTIONS, enableFixer: false }],
    },
  },
  {
    files: ['common/src/engine/index.ts'],
    rules: { 'no-restricted-syntax': ['error', SYNTAX[0], SYNTAX[3], ...PURE_SYNTAX] },
  },

  { files: ['backend/src/**/*.ts'], ignores: [...TESTS, ...TABLES], rules: cap(300, 60) },
  { files: ['backend/**'], languageOptions: { globals: globals.node } },
  // Express types requests through a global namespace.
  {
    files: ['backend/src/**/*.ts'],
    rules: { '@typescript-eslint/no-namespace': ['error', { allowDeclarations: true }] },
  },
  {
    files: ['backend/src/services/**/*.ts'],
    ignores: TESTS,
    plugins: { jsdoc },
    rules: docBlocks([
      ...EXPORTED_FUNCTIONS,
      "MethodDefinition[kind='method'][accessibility!='private'][key.type!='PrivateIdentifier']",
    ]),
  },

  { files: ['frontend/src/**/*.ts'], ignores: [...TESTS, ...TABLES], rules: cap(300, 60) },
  { files: ['frontend/src/**/*.tsx'], ignores: TESTS, rules: cap(200, 80) },
  {
    files: ['frontend/src/**/*.{ts,tsx}'],
    extends: [hooks.configs.flat.recommended],
    languageOptions: { globals: globals.browser },
  },

  {
    files: TESTS,
    rules: {
      'max-lines': ['error', { max: 400, skipBlankLines: true, skipComments: true }],
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/unbound-method': 'off',
    },
  },
  // Vitest and Vite look for a default export.
  {
    files: ['**/*.config.ts', 'test/support/count-reporter.ts', 'test/support/*-setup.ts'],
    rules: { 'no-restricted-syntax': ['error', ...BARE_SYNTAX] },
  },
  {
    files: ['**/*.js'],
    extends: [ts.configs.disableTypeChecked],
    languageOptions: { globals: globals.node },
  },
  { files: ['frontend/public/**/*.js'], languageOptions: { globals: globals.browser } },
);
