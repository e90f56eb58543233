import { act, cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { ToastProvider, useToast, type ToastMessage } from './toast.tsx';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  cleanup();
  vi.useRealTimers();
});

function Sayer({ message }: { message: ToastMessage }) {
  const toast = useToast();
  return <button onClick={() => toast(message)}>say</button>;
}

function say(message: ToastMessage): void {
  render(
    <ToastProvider>
      <Sayer message={message} />
    </ToastProvider>,
  );
  fireEvent.click(screen.getByRole('button', { name: 'say' }));
}

describe('useToast', () => {
  it('says the message where screen readers hear it', () => {
    say({ text: 'Archived.' });
    expect(screen.getByRole('status').textContent).toContain('Archived.');
  });

  it('takes the act back once and goes', () => {
    const undo = vi.fn();
    say({ text: 'Archived.', undo });
    fireEvent.click(screen.getByRole('button', { name: 'Undo' }));
    expect(undo).toHaveBeenCalledOnce();
    expect(screen.queryByText('Archived.')).toBeNull();
  });

  it('goes by itself after a while', () => {
    say({ text: 'Archived.' });
    act(() => void vi.advanceTimersByTime(12_001));
    expect(screen.queryByText('Archived.')).toBeNull();
  });

  it('stays while the pointer rests on it', () => {
    say({ text: 'Archived.' });
    fireEvent.mouseEnter(screen.getByText('Archived.'));
    act(() => void vi.advanceTimersByTime(60_000));
    expect(screen.getByText('Archived.')).toBeTruthy();
  });
});
