import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { ConfirmDialog } from './confirm-dialog.tsx';
import { Dialog } from './dialog.tsx';

afterEach(cleanup);

describe('Dialog', () => {
  it('shows nothing while closed', () => {
    render(
      <Dialog title="New project" isOpen={false} onClose={() => undefined}>
        content
      </Dialog>,
    );
    expect(screen.queryByText('content')).toBeNull();
  });

  it('is named by its title and asks to be closed on Escape', () => {
    const onClose = vi.fn();
    render(
      <Dialog title="New project" isOpen onClose={onClose}>
        content
      </Dialog>,
    );
    const dialog = screen.getByRole('dialog', { name: 'New project' });
    fireEvent(dialog, new Event('cancel', { cancelable: true }));
    expect(onClose).toHaveBeenCalledOnce();
  });

  it('gives the focus back to where it was', () => {
    const opener = document.createElement('button');
    document.body.append(opener);
    opener.focus();
    const view = render(
      <Dialog title="New project" isOpen onClose={() => undefined}>
        <input aria-label="Name" />
      </Dialog>,
    );
    screen.getByLabelText('Name').focus();
    view.unmount();
    expect(document.activeElement).toBe(opener);
    opener.remove();
  });
});

describe('ConfirmDialog', () => {
  it('acts on the named button only', () => {
    const onConfirm = vi.fn();
    const onClose = vi.fn();
    render(
      <ConfirmDialog title="Leave?" action="Discard" isOpen onConfirm={onConfirm} onClose={onClose}>
        Work is lost.
      </ConfirmDialog>,
    );
    fireEvent.click(screen.getByRole('button', { name: 'Cancel' }));
    expect(onConfirm).not.toHaveBeenCalled();
    fireEvent.click(screen.getByRole('button', { name: 'Discard' }));
    expect(onConfirm).toHaveBeenCalledOnce();
  });
});
