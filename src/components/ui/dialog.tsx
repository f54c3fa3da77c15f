import { Dialog as Radix } from 'radix-ui';
import type { ReactNode } from 'react';
import { Cross } from './icons';

type Props = {
  isOpen: boolean;
  onClose: () => void;
  title: string;
  description?: ReactNode;
  children: ReactNode;
};

/** A question in the middle of the page; Esc and the cross close it, focus goes back to where it was. */
export function Dialog({ isOpen, onClose, title, description, children }: Props) {
  return (
    <Radix.Root open={isOpen} onOpenChange={(open) => !open && onClose()}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-[#10151b]/50" />
        <Radix.Content
          className="fixed inset-x-3 top-1/2 z-50 mx-auto max-h-[88vh] max-w-[32rem] -translate-y-1/2 overflow-y-auto rounded-bench border border-edge bg-sheet p-5 text-ink shadow-bench"
          {...(description ? {} : { 'aria-describedby': undefined })}
        >
          <div className="flex items-start justify-between gap-4">
            <Radix.Title className="text-title font-heading">{title}</Radix.Title>
            <Radix.Close
              aria-label="Close"
              className="-mt-2 -mr-2 grid size-11 place-items-center rounded-bench text-dim hover:bg-wash hover:text-ink"
            >
              <Cross />
            </Radix.Close>
          </div>
          <div className="scribe mt-1 mb-4" aria-hidden="true" />
          {description && <Radix.Description className="mb-4 text-dim">{description}</Radix.Description>}
          {children}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
