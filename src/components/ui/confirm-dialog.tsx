import type { ReactNode } from 'react';
import { Button } from './button';
import { Dialog } from './dialog';

type Props = {
  isOpen: boolean;
  onClose: () => void;
  title: string;
  /** What will happen, and what will not. */
  children: ReactNode;
  confirm: string;
  isBusy?: boolean;
  onConfirm: () => void;
};

/** Asks once more before something that cannot be taken back. */
export function ConfirmDialog({
  isOpen,
  onClose,
  title,
  children,
  confirm,
  isBusy = false,
  onConfirm,
}: Props) {
  return (
    <Dialog isOpen={isOpen} onClose={onClose} title={title} description={children}>
      <div className="flex flex-wrap justify-end gap-3">
        <Button onClick={onClose}>Leave it as it is</Button>
        <Button look="danger" isBusy={isBusy} onClick={onConfirm}>
          {confirm}
        </Button>
      </div>
    </Dialog>
  );
}
