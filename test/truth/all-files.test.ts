import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { readTruth } from '#test/support/truth.ts';

const folder = new URL('.', import.meta.url);
const names = readdirSync(folder);
const truthFiles = names.filter((name) => name.endsWith('.json'));

test('test/truth: each file of check values is run by a test', () => {
  const tests = names
    .filter((name) => name.endsWith('.test.ts'))
    .map((name) => readFileSync(new URL(name, folder), 'utf8'))
    .join('\n');
  expect(truthFiles.filter((name) => !tests.includes(`'${name}'`))).toEqual([]);
});

test('test/truth: each row has an id of its own, a standing and a source', () => {
  const rows = truthFiles.flatMap((name) => readTruth(name).rows);
  expect(new Set(rows.map(({ id }) => id)).size).toBe(rows.length);
  const standings = ['published', 'computed', 'from memory', 'common practice, no source'];
  expect(rows.filter(({ standing, source }) => !standings.includes(standing) || source === '')).toEqual([]);
});

test('test/truth: a row that is only computed never stands as published', () => {
  const published = truthFiles
    .filter((name) => name.startsWith('computed'))
    .flatMap((name) => readTruth(name).rows)
    .filter(({ standing }) => standing === 'published');
  expect(published).toEqual([]);
});
