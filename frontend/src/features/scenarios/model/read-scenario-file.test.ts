import { describe, expect, it } from 'vitest';
import { scenarioTemplate } from '#common/catalogue/templates.ts';
import { readScenarioFile } from './read-scenario-file.ts';

const file = () => ({
  format: 'overwinter-scenario',
  schemaVersion: 1,
  exportedAt: '2026-12-01T12:00:00.000Z',
  revision: 3,
  scenario: scenarioTemplate('empty').document,
});

describe('readScenarioFile', () => {
  it('reads an exported file', () => {
    expect(readScenarioFile(JSON.stringify(file()))).toMatchObject({ kind: 'file', file: { revision: 3 } });
  });

  it('refuses what is not JSON', () => {
    expect(readScenarioFile('time,current')).toMatchObject({ kind: 'unusable', problems: [] });
  });

  it('names the place of each problem', () => {
    const broken = { ...file(), revision: 'three', extra: 1 };
    const read = readScenarioFile(JSON.stringify(broken));
    if (read.kind !== 'unusable') throw new Error('The file was taken.');
    expect(read.problems.map(({ path }) => path).sort()).toEqual(['extra', 'revision']);
  });

  it('refuses a file of another version', () => {
    expect(readScenarioFile(JSON.stringify({ ...file(), schemaVersion: 2 }))).toMatchObject({
      kind: 'unusable',
      problems: [{ path: 'schemaVersion' }],
    });
  });

  it('refuses a file larger than any scenario', () => {
    expect(readScenarioFile('x'.repeat(600 * 1024))).toMatchObject({ kind: 'unusable', problems: [] });
  });
});
