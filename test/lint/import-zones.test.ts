import { ESLint, Linter } from 'eslint';
import { readFileSync } from 'node:fs';
import ts from 'typescript-eslint';
import { describe, expect, it } from 'vitest';
import { importZones, reasonedExceptions } from './import-zones.js';

interface Line {
  file: string;
  code: string;
}

function readLines(name: string): Line[] {
  const text = readFileSync(new URL(`./fixtures/${name}`, import.meta.url), 'utf8');
  return text
    .split('\n')
    .filter((line) => line.includes(' | ') && !line.startsWith('#'))
    .map((line) => {
      const [file = '', code = ''] = line.split(' | ');
      return { file, code };
    });
}

const linter = new Linter({ cwd: process.cwd() });
const config: Linter.Config = {
  files: ['**/*.{ts,tsx}'],
  // The plugin's parser type is declared against its own copy of ESLint's types.
  languageOptions: { parser: ts.parser },
  linterOptions: { reportUnusedDisableDirectives: 'off' },
  plugins: { overwinter: { rules: { zones: importZones, reasons: reasonedExceptions } } },
  rules: { 'overwinter/zones': 'error', 'overwinter/reasons': 'error' },
};

const messages = ({ file, code }: Line): string[] =>
  linter.verify(code, config, { filename: file }).map(({ message }) => message);

describe('import zones', () => {
  it.each(readLines('forbidden-imports.txt'))('reports $code in $file', (line) => {
    expect(messages(line)).toHaveLength(1);
  });

  it.each(readLines('allowed-imports.txt'))('accepts $code in $file', (line) => {
    expect(messages(line)).toEqual([]);
  });

  it.each([
    'common/src/units/si.ts',
    'common/src/engine/link/airtime.ts',
    'backend/src/http/project.routes.ts',
    'frontend/src/features/scenario/page.tsx',
    'test/api/projects.test.ts',
  ])('are an error of the project’s own lint in %s', async (file) => {
    const real: unknown = await new ESLint().calculateConfigForFile(file);
    expect(real).toMatchObject({
      rules: { 'overwinter/import-zones': [2], 'overwinter/reasoned-exceptions': [2] },
    });
  });
});

describe('reasoned exceptions', () => {
  it('reports a disabled rule without a reason', () => {
    const code = '// eslint-disable-next-line no-console\nconsole.log(1);';
    expect(messages({ file: 'backend/src/main.ts', code })).toHaveLength(1);
  });

  it('accepts a disabled rule with its reason', () => {
    const code = '// eslint-disable-next-line no-console -- the only output before the logger exists\nconsole.log(1);';
    expect(messages({ file: 'backend/src/main.ts', code })).toEqual([]);
  });
});
