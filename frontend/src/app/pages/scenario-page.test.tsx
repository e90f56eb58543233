import { act, configure, fireEvent, screen, waitFor, within } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import type { ScenarioDetail } from '#common/schemas/api/scenarios.ts';
import { writeDraft } from '#frontend/features/scenario-editor/model/draft-storage.ts';
import { editorScenario } from '#test/support/editor-scenario.ts';
import {
  buildSession,
  mockApi,
  problem,
  renderRoutes,
  resetUi,
  uuid,
  type Answer,
  type SentRequest,
} from '#test/support/ui.tsx';
import { ScenarioPage } from './scenario-page.tsx';

vi.setConfig({ testTimeout: 30_000 });
configure({ asyncUtilTimeout: 10_000 });

const ID = uuid(7);

function detail(more: Partial<ScenarioDetail> = {}): ScenarioDetail {
  return {
    id: ID,
    projectId: uuid(8),
    projectName: 'Frost watch',
    name: 'Frost post',
    version: 4,
    revision: 3,
    forecast: null,
    archivedAt: null,
    createdAt: '2026-11-01T10:00:00.000Z',
    updatedAt: '2026-11-30T10:00:00.000Z',
    updatedBy: 'Pat Person',
    document: editorScenario(),
    ...more,
  };
}

const THEIRS = detail({
  version: 5,
  revision: 4,
  updatedBy: 'Ola Other',
  document: { ...editorScenario(), target: { lifeS: 157_788_000, confidence: 0.8 } },
});

/** Opens the page; `onSave` answers each save in turn, the last one again and again. */
function openPage(onSave: Answer[] = [], role: 'engineer' | 'viewer' = 'engineer'): SentRequest[] {
  const answers = [...onSave];
  const sent = mockApi(({ method, path }) => {
    if (path.startsWith('/session')) return { body: buildSession(role) };
    if (method === 'PUT') return (answers.length > 1 ? answers.shift() : answers[0]) ?? { status: 500 };
    return path === `/scenarios/${ID}` ? { body: detail() } : problem(404, 'not-found');
  });
  renderRoutes(
    [{ path: '/scenarios/:scenarioId', element: <ScenarioPage />, children: [{ index: true }] }],
    `/scenarios/${ID}`,
  );
  return sent;
}

const nameField = (): Promise<HTMLInputElement> => screen.findByLabelText<HTMLInputElement>('Name of the scenario');
const saves = (sent: SentRequest[]): unknown[] => sent.filter(({ method }) => method === 'PUT').map(({ body }) => body);

async function rename(name: string): Promise<HTMLInputElement> {
  const input = await nameField();
  fireEvent.change(input, { target: { value: name } });
  return input;
}

const key = (pressed: string, more: object = {}): boolean =>
  fireEvent.keyDown(document.body, { key: pressed, ctrlKey: true, ...more });

beforeEach(() => localStorage.clear());
afterEach(resetUi);

describe('saving', () => {
  test('Ctrl+S sends the document with the version that was read', async () => {
    const sent = openPage([
      { body: detail({ version: 5, revision: 4, document: { ...editorScenario(), name: 'New' } }) },
    ]);
    await rename('New');
    expect(screen.getByText('Unsaved changes to revision 3')).toBeDefined();
    key('s');
    await screen.findByText(/revision 4, saved/);
    expect(saves(sent)).toMatchObject([{ version: 4, document: { name: 'New' } }]);
  });

  test('waits for text that is no value yet', async () => {
    const sent = openPage();
    await rename('New');
    await rename(' ');
    key('s');
    expect(await screen.findByText(/One field holds text that is no value yet/)).toBeDefined();
    expect(saves(sent)).toEqual([]);
  });

  test('without the server keeps the work and saves when it answers again', async () => {
    const sent = openPage(['unreachable', { body: detail({ version: 5, revision: 4 }) }]);
    await rename('New');
    key('s');
    await screen.findByText(/Not reached: kept here/);
    act(() => void window.dispatchEvent(new Event('online')));
    await screen.findByText(/revision 4, saved/);
    expect(saves(sent)).toHaveLength(2);
  });
});

describe('undo', () => {
  test('Ctrl+Z and Ctrl+Shift+Z go back and forth through the whole scenario', async () => {
    openPage();
    const input = await rename('New');
    key('z');
    expect(input.value).toBe('Frost post');
    key('z', { shiftKey: true });
    expect(input.value).toBe('New');
    key('z');
    key('y');
    expect(input.value).toBe('New');
  });
});

describe('a save that comes too late', () => {
  const late = problem(409, 'conflict', { current: THEIRS });

  async function meet(onSave: Answer[]): Promise<{ sent: SentRequest[]; dialog: HTMLElement }> {
    const sent = openPage(onSave);
    await rename('Mine');
    key('s');
    const title = await screen.findByText('Ola Other saved revision 4 meanwhile');
    return { sent, dialog: title.closest('dialog') ?? document.body };
  }

  test('shows what the other changed and what I changed', async () => {
    const { dialog } = await meet([late]);
    expect(within(dialog).getByLabelText('Their changes').textContent).toContain('confidence90 % → 80 %');
    expect(within(dialog).getByLabelText('Your changes').textContent).toContain('“Frost post” → “Mine”');
  });

  test('keeps mine as a new revision on top of theirs', async () => {
    const { sent, dialog } = await meet([late, { body: detail({ version: 6, revision: 5 }) }]);
    fireEvent.click(within(dialog).getByText('Keep mine as a new revision on top'));
    await screen.findByText(/revision 5, saved/);
    expect(saves(sent)).toMatchObject([
      { version: 4, document: { name: 'Mine' } },
      { version: 5, document: { name: 'Mine', target: { confidence: 0.9 } } },
    ]);
  });

  test('takes theirs and leaves mine in undo', async () => {
    const { sent, dialog } = await meet([late]);
    fireEvent.click(within(dialog).getByText('Take revision 4 (mine stays in undo)'));
    const input = await nameField();
    expect(input.value).toBe('Frost post');
    key('z');
    expect(input.value).toBe('Mine');
    expect(saves(sent)).toHaveLength(1);
  });
});

describe('unsaved work of an earlier visit', () => {
  const keep = (baseVersion: number): boolean =>
    writeDraft(
      localStorage,
      { userId: uuid(1), scenarioId: ID },
      {
        baseVersion,
        baseRevision: baseVersion - 1,
        baseDocument: editorScenario(),
        document: { ...editorScenario(), name: 'Half done' },
        pending: {},
        writtenAt: '2026-11-30T09:00:00.000Z',
      },
    );

  test('is back on the page and can be discarded, which undo takes back', async () => {
    keep(4);
    openPage();
    const input = await nameField();
    expect(input.value).toBe('Half done');
    fireEvent.click(screen.getByText('Discard them'));
    expect(input.value).toBe('Frost post');
    key('z');
    expect(input.value).toBe('Half done');
  });

  test('says when a newer revision was saved meanwhile, and saves on the old one only after showing both', async () => {
    keep(3);
    const sent = openPage([problem(409, 'conflict', { current: detail() })]);
    await nameField();
    expect(screen.getByText(/They were made on revision 2. Meanwhile Pat Person has saved revision 3/)).toBeDefined();
    key('s');
    await screen.findByText('Pat Person saved revision 3 meanwhile');
    expect(saves(sent)).toMatchObject([{ version: 3 }]);
  });

  test('is kept while one types and gone once it is saved', async () => {
    openPage([{ body: detail({ version: 5, revision: 4 }) }]);
    await rename('New');
    await waitFor(() => expect(localStorage.getItem(`overwinter.draft.${uuid(1)}.${ID}`)).toContain('New'), {
      timeout: 5_000,
    });
    key('s');
    await waitFor(() => expect(localStorage.getItem(`overwinter.draft.${uuid(1)}.${ID}`)).toBeNull(), {
      timeout: 5_000,
    });
  });
});

describe('for a reader', () => {
  test('shows the name as text and no way to save', async () => {
    openPage([], 'viewer');
    expect(await screen.findByText(/for reading/)).toBeDefined();
    expect(screen.queryByText('Save')).toBeNull();
    expect(screen.queryByLabelText('Name of the scenario')).toBeNull();
  });
});
