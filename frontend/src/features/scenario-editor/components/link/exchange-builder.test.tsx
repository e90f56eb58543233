import { act, fireEvent, render, screen, within } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { stepDuration } from '#common/engine/index.ts';
import type { LinkSettings, Scenario } from '#common/engine/scenario/scenario.types.ts';
import { ToastProvider } from '#frontend/components/toast.tsx';
import { EditorProvider } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { createEditorStore, type EditorStore } from '#frontend/features/scenario-editor/model/editor-store.ts';
import { editorScenario } from '#test/support/editor-scenario.ts';
import { resetUi } from '#test/support/ui.tsx';
import { NodeEditor } from '../node/node-editor.tsx';

// A whole page in a simulated browser, on a machine that may be busy.
vi.setConfig({ testTimeout: 30_000 });

const CLEAN: LinkSettings = {
  phy: 'oqpsk-2450',
  busyProbability: { typical: 0 },
  frameErrorRate: { typical: 0 },
  ackErrorRate: { typical: 0 },
};
let store: EditorStore;

function withNodeLink(link: LinkSettings): Scenario {
  const scenario = editorScenario();
  return { ...scenario, node: { ...scenario.node, link } };
}

function renderStep(document: Scenario): void {
  store = createEditorStore({ document, version: 1, revision: 1, savedAt: '2026-12-01T12:00:00.000Z', savedBy: 'A' });
  render(
    <ToastProvider>
      <EditorProvider store={store} isReadOnly={false}>
        <NodeEditor problems={[]} />
      </EditorProvider>
    </ToastProvider>,
  );
  act(() => screen.getByDisplayValue('Wait').focus());
  choose('Duration', 'exchange');
}

const detail = () => within(screen.getByText('step 2 of 2').closest('section') ?? document.body);
const choose = (label: string, value: string): boolean =>
  fireEvent.change(detail().getByLabelText(label, { selector: 'select' }), { target: { value } });
const type = (label: string, value: string): boolean =>
  fireEvent.change(detail().getByLabelText(label, { selector: 'input' }), { target: { value } });
const open = (title: string): void => {
  const summary = detail().getByText(title).closest('summary');
  const details = summary?.parentElement;
  if (!(details instanceof HTMLDetailsElement)) throw new Error(`No section “${title}”.`);
  details.open = true;
  fireEvent(details, new Event('toggle'));
};
const step = () => store.getState().document.node.routines[0]?.steps[1];
const phases = () => detail().getByLabelText('Phases of the exchange', { selector: 'table' });
const totalOf = () => within(phases()).getByText('In all').closest('tr')?.textContent;

beforeEach(() => renderStep(withNodeLink(CLEAN)));
afterEach(resetUi);

describe('a step derived from the link', () => {
  test('shows the frame octet by octet and the phases of the exchange', () => {
    expect(detail().getByText(': 24 octets, places 16 to 39')).toBeDefined();
    expect(within(phases()).getByText('backoff')).toBeDefined();
  });

  test('moves frame, phases and the duration in the table with one figure', () => {
    const before = totalOf();
    type('Payload', '48');
    expect(detail().getByText(': 48 octets, places 16 to 63')).toBeDefined();
    expect(totalOf()).not.toBe(before);
    const made = step();
    const meanS = made ? stepDuration(made, CLEAN).meanS : NaN;
    expect(meanS).toBeGreaterThan(0.003);
    expect(totalOf()).toContain(`${(meanS * 1000).toPrecision(4).replace(/0+$/, '')}\u00a0ms`);
  });

  test('opens how a phase comes about', () => {
    fireEvent.click(within(phases()).getByText('frame'));
    expect(within(phases()).getByText('Formula')).toBeDefined();
    expect(within(phases()).getByText('Source')).toBeDefined();
  });

  test('tells of a field of the frame its octets, its time and its source', () => {
    fireEvent.click(detail().getByText(': 24 octets, places 16 to 39'));
    expect(detail().getByText(/24 octets, places 16 to 39, 768 µs on air/)).toBeDefined();
  });

  test('keeps the pictures and tells the reason while a figure does not work', () => {
    type('Payload', '300');
    expect(detail().getByRole('status').textContent).toMatch(/116/);
    expect(detail().getByText(': 24 octets, places 16 to 39')).toBeDefined();
  });

  test('stores only what differs from the node', () => {
    expect(step()?.duration).toEqual({ kind: 'exchange', pattern: 'acknowledged', payloadOctets: 24 });
    open('Channel access and retries');
    type('macMaxFrameRetries', '0');
    expect(step()?.duration).toMatchObject({ link: { macMaxFrameRetries: 0 } });
    type('macMaxFrameRetries', '');
    expect(step()?.duration).not.toHaveProperty('link');
  });

  test('shows what the node says where the step says nothing', () => {
    open('Channel');
    expect(detail().getAllByText('as the node: 0 %').length).toBeGreaterThan(0);
  });

  test('changes the exchange and its fields, and is one undo step', () => {
    choose('Exchange', 'beacon');
    type('Beacon order', '8');
    expect(step()?.duration).toMatchObject({ pattern: 'beacon', beaconOrder: 8 });
    store.undo();
    store.undo();
    expect(step()?.duration).toMatchObject({ pattern: 'acknowledged' });
  });

  test('counts loading over a serial line when asked for', () => {
    fireEvent.click(detail().getByText('Count loading of the frame over a serial line'));
    expect(step()?.duration).toMatchObject({ loading: { partId: 'sensor', stateId: 'measure' } });
    expect(within(phases()).getByText('loading of the frame')).toBeDefined();
  });
});

describe('a figure that nobody gave', () => {
  test('is told beside its field as assumed', () => {
    resetUi();
    renderStep(withNodeLink({ phy: 'oqpsk-2450' }));
    expect(detail().getByText('busy 10 % assumed', { exact: false })).toBeDefined();
    open('Channel');
    expect(detail().getByText(/busy: 10.% is assumed/)).toBeDefined();
  });
});

describe('a transition', () => {
  test('names the part that it keeps busy', () => {
    const table = screen.getByLabelText('Transitions of Radio', { selector: 'table' });
    act(() => within(table).getByLabelText('Start of transition 1').focus());
    fireEvent.change(screen.getByLabelText('Keeps busy'), { target: { value: 'sensor' } });
    const busy = () => store.getState().document.node.parts[0]?.transitions[0]?.busy;
    expect(busy()).toEqual({ partId: 'sensor', stateId: 'measure' });
    fireEvent.change(screen.getByLabelText('Keeps busy'), { target: { value: '' } });
    expect(busy()).toBeUndefined();
  });
});
