import { describe, expect, test } from 'vitest';
import { editorScenario } from '#test/support/editor-scenario.ts';
import { readDraft, removeDraft, writeDraft, type Draft } from './draft-storage.ts';

function fakeStorage(): Pick<Storage, 'getItem' | 'setItem' | 'removeItem'> & { texts: Map<string, string> } {
  const texts = new Map<string, string>();
  return {
    texts,
    getItem: (key) => texts.get(key) ?? null,
    setItem: (key, value) => void texts.set(key, value),
    removeItem: (key) => void texts.delete(key),
  };
}

const KEY_A = { userId: 'u', scenarioId: 'a' };
const KEY_B = { userId: 'u', scenarioId: 'b' };

const draft: Draft = {
  baseVersion: 4,
  baseRevision: 3,
  baseDocument: editorScenario(),
  document: { ...editorScenario(), name: 'Changed' },
  pending: { name: { text: '', message: 'Give it a name.' } },
  writtenAt: '2026-12-01T12:00:00.000Z',
};

describe('readDraft', () => {
  test('gives what writeDraft kept', () => {
    const storage = fakeStorage();
    expect(writeDraft(storage, KEY_A, draft)).toBe(true);
    expect(readDraft(storage, KEY_A)).toEqual(draft);
    expect(readDraft(storage, KEY_B)).toBeNull();
    removeDraft(storage, KEY_A);
    expect(readDraft(storage, KEY_A)).toBeNull();
  });

  test('gives nobody the work of somebody else', () => {
    const storage = fakeStorage();
    writeDraft(storage, KEY_A, draft);
    expect(readDraft(storage, { ...KEY_A, userId: 'v' })).toBeNull();
  });

  test('gives nothing when what lies there is no draft', () => {
    const storage = fakeStorage();
    storage.texts.set('overwinter.draft.u.a', '{"document":');
    expect(readDraft(storage, KEY_A)).toBeNull();
    storage.texts.set('overwinter.draft.u.a', JSON.stringify({ ...draft, document: { name: 'x' } }));
    expect(readDraft(storage, KEY_A)).toBeNull();
  });
});

describe('writeDraft', () => {
  test('says so when the browser has no room', () => {
    const full = {
      ...fakeStorage(),
      setItem: () => {
        throw new DOMException('full', 'QuotaExceededError');
      },
    };
    expect(writeDraft(full, KEY_A, draft)).toBe(false);
  });
});
