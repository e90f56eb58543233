import { fireEvent, render, screen, within } from '@testing-library/react';
import { beforeEach, describe, expect, test, vi } from 'vitest';
import { scenarioTemplate } from '#common/catalogue/templates.ts';
import { ToastProvider } from '#frontend/components/toast.tsx';
import { EditorProvider } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { createEditorStore, type EditorStore } from '#frontend/features/scenario-editor/model/editor-store.ts';
import { resetUi } from '#test/support/ui.tsx';
import { RoutinesSection } from './routines-section.tsx';

// A whole section in a simulated browser, on a machine that may be busy.
vi.setConfig({ testTimeout: 30_000 });

let store: EditorStore;

function open(templateId: string): void {
  const { document } = scenarioTemplate(templateId);
  store = createEditorStore({ document, version: 1, revision: 1, savedAt: '2026-12-01T12:00:00.000Z', savedBy: 'A' });
  render(
    <ToastProvider>
      <EditorProvider store={store} isReadOnly={false}>
        <RoutinesSection problems={[]} />
      </EditorProvider>
    </ToastProvider>,
  );
}

const routines = () => store.getState().document.node.routines;
const field = (label: string): HTMLInputElement => screen.getByLabelText<HTMLInputElement>(label);
const type = (label: string, value: string): boolean => fireEvent.change(field(label), { target: { value } });
const openDays = (): boolean => fireEvent.click(screen.getByText('+ Bad days'));
const day = (name: string) => within(screen.getByLabelText(name, { selector: 'section' }));

beforeEach(resetUi);

describe('bad days', () => {
  test('adds a firmware update as often a year as is typed', () => {
    open('acknowledged-report');
    openDays();
    fireEvent.change(day('Firmware update').getByLabelText('Times a year'), { target: { value: '4' } });
    fireEvent.click(screen.getByLabelText('Add Firmware update'));
    const added = routines().at(-1);
    expect([added?.name, added?.schedule]).toEqual(['Firmware update', { kind: 'random', meanPerDay: 4 / 365.25 }]);
  });

  test('tells how often a year in the list of routines', () => {
    open('acknowledged-report');
    openDays();
    fireEvent.click(screen.getByLabelText('Add Lost parent'));
    expect(screen.getByText('at random, 12 a year')).toBeTruthy();
  });

  test('changes how often a year in the schedule', () => {
    open('acknowledged-report');
    openDays();
    fireEvent.click(screen.getByLabelText('Add Lost parent'));
    type('Times a year', '6');
    expect(routines().at(-1)?.schedule).toMatchObject({ meanPerDay: 6 / 365.25 });
  });

  test('asks no number for what happens once', () => {
    open('acknowledged-report');
    openDays();
    expect(day('Install day').queryByLabelText('Times a year')).toBeNull();
  });

  test('is undone in one go', () => {
    open('acknowledged-report');
    openDays();
    fireEvent.click(screen.getByLabelText('Add Install day'));
    store.undo();
    expect(routines().map(({ id }) => id)).toEqual(['report']);
  });

  test('gives the steps ids of their own when added twice', () => {
    open('acknowledged-report');
    for (let i = 0; i < 2; i += 1) {
      openDays();
      fireEvent.click(screen.getByLabelText('Add Install day'));
    }
    const ids = routines().flatMap(({ steps }) => steps.map(({ id }) => id));
    expect(new Set(ids).size).toBe(ids.length);
  });

  test('says what an empty node lacks', () => {
    open('empty');
    openDays();
    expect(
      day('Lost parent').getByText(/^This node lacks a part of kind radio; a part of kind controller/),
    ).toBeTruthy();
  });
});

describe('poll, supervision and child timeout', () => {
  test('tell which one counts', () => {
    open('polling-child');
    expect(screen.getByText('the poll counts')).toBeTruthy();
  });

  test('make the shortest the period', () => {
    open('polling-child');
    type('Poll', '5 min');
    expect([routines()[0]?.schedule, screen.getByText('the supervision counts') !== null]).toEqual([
      { kind: 'every', periodS: 120, keepAlive: { pollS: 300, supervisionS: 120, childTimeoutS: 240 } },
      true,
    ]);
  });

  test('stay out of sight of a routine without them', () => {
    open('acknowledged-report');
    expect([screen.queryByLabelText('Child timeout'), field('Period').value]).toEqual([null, '15 min']);
  });

  test('leave a plain period when all are emptied', () => {
    open('polling-child');
    for (const label of ['Poll', 'Supervision', 'Child timeout']) type(label, '');
    expect(routines()[0]?.schedule).toEqual({ kind: 'every', periodS: 240 });
  });
});
