import { fireEvent, render, screen } from '@testing-library/react';
import { beforeEach, describe, expect, test, vi } from 'vitest';
import { scenarioTemplate } from '#common/catalogue/templates.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { EditorProvider } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { createEditorStore, type EditorStore } from '#frontend/features/scenario-editor/model/editor-store.ts';
import { onExchange, withLink } from '#frontend/features/scenario-editor/model/operations/exchange-operations.ts';
import { updateStep } from '#frontend/features/scenario-editor/model/operations/routine-operations.ts';
import { resetUi } from '#test/support/ui.tsx';
import { LinkSection } from './link-section.tsx';

vi.setConfig({ testTimeout: 30_000 });

let store: EditorStore;

function open(document: Scenario = scenarioTemplate('acknowledged-report').document): void {
  store = createEditorStore({ document, version: 1, revision: 1, savedAt: '2026-12-01T12:00:00.000Z', savedBy: 'A' });
  render(
    <EditorProvider store={store} isReadOnly={false}>
      <LinkSection />
    </EditorProvider>,
  );
}

const show = (text: RegExp | string): boolean => fireEvent.click(screen.getByText(text));
const withNode = (apply: (node: Scenario['node']) => Scenario['node']): Scenario => {
  const { document } = scenarioTemplate('acknowledged-report');
  return { ...document, node: apply(document.node) };
};

beforeEach(resetUi);

describe('LinkSection', () => {
  test('tells the settings in one line while it is closed', () => {
    open();
    expect(screen.getByText(/2450 MHz O-QPSK/).textContent.replaceAll('\u00a0', ' ')).toContain('busy 10 %');
  });

  test('says how many figures are assumed', () => {
    open(withNode((node) => ({ ...node, link: { phy: 'oqpsk-2450' } })));
    expect(screen.getByText('3 figures are assumed')).toBeTruthy();
  });

  test('changes a setting of the node', () => {
    open();
    show('Settings of the node');
    show('Channel access and retries');
    fireEvent.change(screen.getByLabelText('macMaxFrameRetries'), { target: { value: '5' } });
    expect(store.getState().document.node.link?.macMaxFrameRetries).toBe(5);
  });

  test('names a step that differs, and goes to it', () => {
    const { document } = scenarioTemplate('acknowledged-report');
    open(
      updateStep(document, 'report', 'send', (step) => ({
        ...step,
        duration: onExchange((exchange) => withLink(exchange, () => ({ macMaxFrameRetries: 0 })))(step.duration),
      })),
    );
    expect(screen.getByText('in Measure and report: Channel access and retries')).toBeTruthy();
    show('Send the report');
    expect(store.getState().selection).toMatchObject({ routineId: 'report', stepId: 'send' });
  });
});
