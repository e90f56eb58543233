import { cleanup, fireEvent, render, screen, within } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Scenario } from '#common/engine/index.ts';
import { pictureScenario } from '#test/support/picture-fixtures.ts';
import { NodeDay } from './node-day.tsx';

afterEach(cleanup);

function renderDay(change?: (scenario: Scenario) => void) {
  const onSelectStep = vi.fn<(stepId: string) => void>();
  const onSelectRoutine = vi.fn<(routineId: string) => void>();
  const props = { routineId: 'report', selectedStepId: 'clear', onSelectStep, onSelectRoutine };
  render(<NodeDay scenario={pictureScenario(change)} {...props} />);
  return { onSelectStep, onSelectRoutine };
}

describe('NodeDay', () => {
  it('NodeDay: is headed by the routine and its schedule', () => {
    renderDay();
    expect(screen.getByRole('heading', { level: 2 }).textContent).toMatch(/^Report, every 15.min$/);
    expect(screen.getByText(/96.cycles a day, .* awake each/)).toBeTruthy();
  });

  it('NodeDay: has a button for each step that tells name and duration', () => {
    renderDay();
    const steps = within(screen.getByRole('toolbar', { name: 'Steps' })).getAllByRole('button');
    expect(steps.map((step) => step.textContent.replaceAll('\u00a0', ' '))).toEqual([
      'Sense14 ms',
      'Clear channel128 µs',
      'Transmit1.31 ms',
      'Await acknowledgement544 µs',
    ]);
    expect(steps.map((step) => step.getAttribute('aria-pressed'))).toEqual(['false', 'true', 'false', 'false']);
  });

  it('NodeDay: selects a step by click and by arrow keys', () => {
    const { onSelectStep } = renderDay();
    fireEvent.click(screen.getByRole('button', { name: /^Sense/ }));
    fireEvent.keyDown(screen.getByRole('button', { name: /^Clear channel/ }), { key: 'ArrowRight' });
    fireEvent.keyDown(screen.getByRole('button', { name: /^Clear channel/ }), { key: 'End' });
    expect(onSelectStep.mock.calls).toEqual([['sense'], ['send'], ['ack']]);
  });

  it('NodeDay: leaves one step in the tab order', () => {
    renderDay();
    const steps = within(screen.getByRole('toolbar', { name: 'Steps' })).getAllByRole('button');
    expect(steps.map((step) => step.tabIndex)).toEqual([-1, 0, -1, -1]);
  });

  it('NodeDay: shows a missing path in the lane of its part', () => {
    renderDay((scenario) => {
      const radio = scenario.node.parts[0];
      if (radio) radio.transitions = radio.transitions.filter((move) => move.toStateId !== 'r-tx');
    });
    expect(screen.getByText(/Step 3: .*from “Receive” to “Transmit”/)).toBeTruthy();
    expect(screen.getByText('Cannot be laid out yet.')).toBeTruthy();
    expect(screen.getByRole('rowheader', { name: 'Radio' })).toBeTruthy();
  });

  it('NodeDay: lays all routines over 24 hours with their counts and selects one', () => {
    const { onSelectRoutine } = renderDay();
    fireEvent.click(screen.getByRole('radio', { name: 'one day' }));
    expect(screen.getByText(/every 15.min: 96.cycles a day/)).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: /^Self-test/ }));
    expect(onSelectRoutine).toHaveBeenCalledWith('selftest');
  });

  it('NodeDay: has the intervals as a table with what each part does', () => {
    renderDay();
    const details = screen.getByText('The same numbers as a table').closest('details');
    if (!details) throw new Error('There is no disclosure.');
    details.open = true;
    fireEvent(details, new Event('toggle'));
    const row = within(details).getByRole('row', { name: /^Transmit/ });
    expect(row.textContent.replaceAll('\u00a0', ' ')).toContain('Transmit 14.2 mA');
    expect(row.textContent.replaceAll('\u00a0', ' ')).toContain('Active 3.1 mA');
  });

  it('NodeDay: says what to do without parts and without routines', () => {
    renderDay((scenario) => (scenario.node.routines = []));
    expect(screen.getByText(/Add a routine/)).toBeTruthy();
    cleanup();
    renderDay((scenario) => {
      scenario.node.parts = [];
      scenario.node.routines = [];
    });
    expect(screen.getByText(/Parts come first/)).toBeTruthy();
  });
});
