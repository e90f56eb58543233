import { act, fireEvent, render, screen, within } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { compileNode } from '#common/engine/index.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { EngineError } from '#common/errors.ts';
import { problemsOfEngine, type InputProblem } from '#common/schemas/problem.ts';
import { ToastProvider } from '#frontend/components/toast.tsx';
import {
  EditorProvider,
  ProblemProvider,
  useEditorState,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useFieldProblems } from '#frontend/features/scenario-editor/hooks/use-field-problems.ts';
import { useFocusRequests } from '#frontend/features/scenario-editor/hooks/use-focus-requests.ts';
import { createEditorStore, type EditorStore } from '#frontend/features/scenario-editor/model/editor-store.ts';
import { editorScenario } from '#test/support/editor-scenario.ts';
import { resetUi } from '#test/support/ui.tsx';
import { NodeEditor } from './node-editor.tsx';

function problemsOf(document: Scenario): InputProblem[] {
  try {
    compileNode(document.node, { defaultReferenceVoltageV: 3 });
    return [];
  } catch (error) {
    if (error instanceof EngineError) return problemsOfEngine(error);
    throw error;
  }
}

/** The node's page with the engine's problems, without the pictures. */
function Page() {
  const document = useEditorState((state) => state.document);
  const problems = problemsOf(document);
  useFocusRequests('node', () => undefined);
  return (
    <ProblemProvider problems={useFieldProblems(problems)}>
      <NodeEditor problems={problems} />
    </ProblemProvider>
  );
}

// A whole page in a simulated browser, on a machine that may be busy.
vi.setConfig({ testTimeout: 30_000 });

let store: EditorStore;

function renderNode(document = editorScenario(), isReadOnly = false): void {
  store = createEditorStore({ document, version: 1, revision: 1, savedAt: '2026-12-01T12:00:00.000Z', savedBy: 'A' });
  render(
    <ToastProvider>
      <EditorProvider store={store} isReadOnly={isReadOnly}>
        <Page />
      </EditorProvider>
    </ToastProvider>,
  );
}

const focus = (element: HTMLElement | undefined): void => act(() => element?.focus());
// Roles of a whole page are slow to find here; labels are as visible and quick.
const dialogOf = (title: string): HTMLElement => screen.getByText(title).closest('dialog') ?? document.body;
const table = (name: string): HTMLElement => screen.getByLabelText(name, { selector: 'table' });
const cell = (name: string): HTMLInputElement => screen.getByLabelText<HTMLInputElement>(name);
const type = (input: HTMLInputElement, value: string): boolean => fireEvent.change(input, { target: { value } });
const press = (key: string, more: object = {}): boolean =>
  fireEvent.keyDown(document.activeElement ?? document.body, { key, ...more });
const paste = (target: HTMLElement, text: string): boolean =>
  fireEvent.paste(target, { clipboardData: { getData: () => text } });
const states = () => store.getState().document.node.parts[0]?.states ?? [];
const steps = () => store.getState().document.node.routines[0]?.steps ?? [];

beforeEach(() => renderNode());
afterEach(resetUi);

describe('keys in a table', () => {
  test('arrows move between cells and Enter goes down', () => {
    focus(cell('Radio, Sleep: current, typical'));
    press('ArrowDown');
    expect(document.activeElement).toBe(cell('Radio, Idle: current, typical'));
    press('Enter');
    expect(document.activeElement).toBe(cell('Radio, Transmit: current, typical'));
    press('ArrowUp');
    press('ArrowRight');
    expect(document.activeElement).toBe(cell('Radio, Idle: current, maximum'));
  });

  test('an arrow stays in the text while the caret is inside it', () => {
    const input = cell('Radio, Transmit: current, typical');
    focus(input);
    input.setSelectionRange(2, 2);
    press('ArrowRight');
    expect(document.activeElement).toBe(input);
    input.setSelectionRange(input.value.length, input.value.length);
    press('ArrowRight');
    expect(document.activeElement).toBe(cell('Radio, Transmit: current, maximum'));
  });

  test('Enter in the last row adds one', () => {
    focus(within(table('Steps of Report')).getAllByLabelText('Name of the step').at(-1));
    press('Enter');
    expect(steps().map(({ name }) => name)).toEqual(['Sense', 'Wait', 'New step']);
  });

  test('Alt with an arrow moves the row and leaves the focus in its cell', () => {
    const input = within(table('Steps of Report')).getByDisplayValue<HTMLInputElement>('Sense');
    focus(input);
    press('ArrowDown', { altKey: true });
    expect(steps().map(({ name }) => name)).toEqual(['Wait', 'Sense']);
    expect(document.activeElement).toBe(within(table('Steps of Report')).getByDisplayValue('Sense'));
  });

  test('Escape restores the cell', () => {
    const input = cell('Radio, Sleep: current, typical');
    focus(input);
    type(input, '1.5u');
    expect(states()[0]?.current.typical).toBe(1.5e-6);
    press('Escape');
    expect(states()[0]?.current.typical).toBe(1e-6);
  });
});

describe('typing', () => {
  test('is one undo step for a field', () => {
    const input = cell('Radio, Idle: current, typical');
    focus(input);
    for (const text of ['4', '45', '450', '450 n']) type(input, text);
    expect(states()[1]?.current.typical).toBeCloseTo(4.5e-7, 12);
    store.undo();
    expect(states()[1]?.current.typical).toBe(400e-6);
    store.redo();
    expect(states()[1]?.current.typical).toBeCloseTo(4.5e-7, 12);
  });

  test('of a figure that was cited marks it as assumed and keeps the citation in words', () => {
    type(cell('Radio, Transmit: current, typical'), '14 mA');
    expect(states()[2]?.current.provenance).toEqual({ kind: 'assumed', text: 'Typed here. Before: source, Table 4' });
  });

  test('of a name guesses the role', () => {
    type(within(table('States of Radio')).getByDisplayValue<HTMLInputElement>('Idle'), 'Listen to the channel');
    expect(states()[1]?.role).toBe('listen');
  });

  test('shows under the table what a cell cannot take', () => {
    type(cell('Radio, Sleep: current, maximum'), '0.5u');
    expect(screen.getByText('The maximum lies below the typical 1 µA.', { selector: '[role=status]' })).toBeDefined();
    expect(states()[0]?.current.max).toBe(2e-6);
  });
});

describe('pasting a block', () => {
  test('shows what it will do, and takes it as one step', () => {
    paste(
      within(table('States of Radio')).getByDisplayValue('Transmit'),
      'Send\ttransmit\t12mA\t13mA\t15mA\nNap\tsleep\t\t2u',
    );
    const dialog = dialogOf('Paste a table');
    expect(within(dialog).getByText('2 rows, 1 of them new. Every cell can be taken.')).toBeDefined();
    expect(states()).toHaveLength(3);
    fireEvent.click(within(dialog).getByRole('button', { name: 'Paste' }));
    expect(states().map(({ name }) => name)).toEqual(['Sleep', 'Idle', 'Send', 'Nap']);
    store.undo();
    expect(states().map(({ name }) => name)).toEqual(['Sleep', 'Idle', 'Transmit']);
  });

  test('tells the cells that are wrong and takes the others', () => {
    paste(within(table('Steps of Report')).getByDisplayValue('Sense'), 'Sense\tsoon\tIdle');
    const dialog = dialogOf('Paste a table');
    expect(within(dialog).getByText(/“?soon.*14 ms or 15 min/)).toBeDefined();
    fireEvent.click(within(dialog).getByRole('button', { name: 'Paste the 2 that can be taken' }));
    expect(steps()[0]).toMatchObject({ states: { radio: 'idle', sensor: 'measure' }, duration: { typical: 0.014 } });
  });

  test('leaves a single cell to the browser', () => {
    paste(within(table('States of Radio')).getByDisplayValue('Idle'), 'Nap');
    expect(screen.queryByText('Paste a table')).toBeNull();
  });
});

describe('removing', () => {
  test('a state that is used asks first, names the uses and cleans them', () => {
    focus(within(table('States of Radio')).getByDisplayValue('Idle'));
    fireEvent.click(screen.getByLabelText('Remove Idle'));
    const dialog = dialogOf('Remove the state “Idle”?');
    expect(within(dialog).getByText('step “Wait” of routine “Report”')).toBeDefined();
    fireEvent.click(within(dialog).getByRole('button', { name: 'Remove' }));
    expect(states().map(({ id }) => id)).toEqual(['sleep', 'transmit']);
    expect(steps()[1]?.states).toEqual({});
  });

  test('a step is undone from the message that tells it', () => {
    focus(within(table('Steps of Report')).getByDisplayValue('Wait'));
    fireEvent.click(screen.getByLabelText('Remove Wait'));
    expect(steps()).toHaveLength(1);
    fireEvent.click(screen.getByText('Undo'));
    expect(steps()).toHaveLength(2);
  });
});

describe('a move without a way', () => {
  test('is told at the routine, and one click adds the transition', () => {
    fireEvent.change(screen.getByLabelText('Radio in Wait'), { target: { value: 'transmit' } });
    const offer = screen.getByLabelText('Missing transition of Radio');
    expect(offer.textContent).toContain('Radio cannot go from Sleep to Transmit');
    expect(offer.textContent).toContain('From Sleep it can reach Idle.');
    type(within(offer).getByLabelText<HTMLInputElement>('It takes'), '192 µs');
    fireEvent.click(within(offer).getByRole('button', { name: 'Go through Idle: add Idle to Transmit' }));
    expect(store.getState().document.node.parts[0]?.transitions.at(-1)).toEqual({
      fromStateId: 'idle',
      toStateId: 'transmit',
      durationS: { typical: 0.000192, provenance: { kind: 'assumed' } },
      current: { typical: 0, provenance: { kind: 'assumed' } },
    });
    expect(screen.queryByLabelText('Missing transition of Radio')).toBeNull();
  });
});

describe('figures without a maximum', () => {
  test('are assumed all at once with the factor of one’s choice', () => {
    type(screen.getByLabelText<HTMLInputElement>('Maximum = typical ×'), '2');
    fireEvent.click(screen.getByText('Assume it for all 8'));
    expect(states()[1]?.current).toMatchObject({ max: 800e-6, provenance: { kind: 'assumed' } });
    expect(screen.getByText('Every figure that could turn out worse says how much.')).toBeDefined();
  });
});

describe('for a reader', () => {
  test('shows the figures as text and offers no edit', () => {
    resetUi();
    renderNode(editorScenario(), true);
    expect(document.querySelectorAll('input[type=text], select')).toHaveLength(0);
    expect(screen.queryByText(/Add a/)).toBeNull();
    expect(within(table('States of Radio')).getByText('14.2 mA')).toBeDefined();
  });
});
