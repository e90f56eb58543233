import type { ReactNode } from 'react';
import { Button } from './button.tsx';
import { Dialog, DialogActions } from './dialog.tsx';

export interface ConfirmDialogProps {
  title: string;
  /** Names the act, such as "Archive", never "OK". */
  action: string;
  isOpen: boolean;
  isDanger?: boolean;
  isBusy?: boolean;
  onConfirm: () => void;
  onClose: () => void;
  children: ReactNode;
}

export function ConfirmDialog({
  title,
  action,
  isOpen,
  isDanger,
  isBusy,
  onConfirm,
  onClose,
  children,
}: ConfirmDialogProps) {
  return (
    <Dialog title={title} isOpen={isOpen} onClose={onClose}>
      <div className="text-muted">{children}</div>
      <DialogActions>
        <Button onClick={onClose}>Cancel</Button>
        <Button variant={isDanger === true ? 'danger' : 'primary'} isBusy={isBusy ?? false} onClick={onConfirm}>
          {action}
        </Button>
      </DialogActions>
    </Dialog>
  );
}
