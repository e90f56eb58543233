import { fireEvent, render, screen, within } from '@testing-library/react';
import { beforeEach, describe, expect, test, vi } from 'vitest';
import { scenarioTemplate } from '#common/catalogue/templates.ts';
import { EditorProvider } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { createEditorStore, type EditorStore } from '#frontend/features/scenario-editor/model/editor-store.ts';
import { resetUi } from '#test/support/ui.tsx';
import { WhatIf } from './what-if.tsx';

vi.setConfig({ testTimeout: 30_000 });

let store: EditorStore;

function open(isReadOnly = false): void {
  const { document } = scenarioTemplate('acknowledged-report');
  store = createEditorStore({ document, version: 1, revision: 1, savedAt: '2026-12-01T12:00:00.000Z', savedBy: 'A' });
  const { container } = render(
    <EditorProvider store={store} isReadOnly={isReadOnly}>
      <WhatIf routineId="report" stepId="send" />
    </EditorProvider>,
  );
  const details = container.querySelector('details');
  if (!details) throw new Error('Nothing to open.');
  details.open = true;
  fireEvent(details, new Event('toggle'));
}

const alternatives = (title: string) => screen.findByLabelText(`What if: ${title}`, undefined, { timeout: 10_000 });
const rowsOf = (group: HTMLElement): string[] =>
  [...group.querySelectorAll('tbody th')].map((cell) => cell.textContent);
const duration = () => store.getState().document.node.routines[0]?.steps.at(-1)?.duration;

beforeEach(resetUi);

describe('WhatIf', () => {
  test('tells duration, delivery, charge and life of each alternative', async () => {
    open();
    const group = await alternatives('Payload');
    expect(rowsOf(group)).toEqual([
      'Mean duration',
      'Delivered',
      'Charge per cycle',
      'Charge a day',
      'Life',
      'Take a value',
    ]);
  });

  test('changes nothing by itself', async () => {
    open();
    const before = store.getState().document;
    await alternatives('Payload');
    expect(store.getState().document).toBe(before);
  });

  test('takes an alternative, and undo takes it back', async () => {
    open();
    await alternatives('Payload');
    fireEvent.click(screen.getByLabelText(/^Take it: payload 48/));
    expect(duration()).toMatchObject({ payloadOctets: 48 });
    store.undo();
    expect(duration()).toMatchObject({ payloadOctets: 24 });
  });

  test('asks about the busy channel when that is chosen', async () => {
    open();
    fireEvent.click(screen.getByLabelText('Busy channel'));
    const group = await alternatives('Busy channel');
    expect(within(group).getByText('now').closest('th')?.textContent.replace('\u00a0', ' ')).toBe('10 %now');
  });

  test('offers nothing to take to a reader', async () => {
    open(true);
    const group = await alternatives('Payload');
    expect(rowsOf(group)).not.toContain('Take a value');
  });

  test('reads out the present point of each chart, and the next one on an arrow key', async () => {
    open();
    const chart = await screen.findByLabelText('Charge per exchange against busy channel', undefined, {
      timeout: 10_000,
    });
    expect(chart.getAttribute('aria-valuetext')).toMatch(/^now, busy 10.% ?: .*C, .* delivered$/);
    fireEvent.keyDown(chart, { key: 'ArrowRight' });
    expect(chart.getAttribute('aria-valuetext')).toMatch(/^busy 15/);
  });

  test('has the points of a chart in a table', async () => {
    open();
    const summary = await screen.findByText('Charge per delivered octet against payload, as a table', undefined, {
      timeout: 10_000,
    });
    const details = summary.closest('details');
    if (details) details.open = true;
    fireEvent(summary.closest('details') ?? summary, new Event('toggle'));
    expect(screen.getByText('24 octets', { exact: false, selector: 'th[scope=row]' }).textContent).toContain('now');
  });
});
