import { Dialog } from 'radix-ui';
import { useState } from 'react';
import { Bars, Cross } from '../components/ui/icons';
import { FindRepair } from './find-repair';
import { RailLinks } from './rail-links';
import { Who } from './who';

/** Everything of the rail, on a phone. */
export function Drawer() {
  const [isOpen, setOpen] = useState(false);
  const close = () => setOpen(false);
  return (
    <Dialog.Root open={isOpen} onOpenChange={setOpen}>
      <Dialog.Trigger
        aria-label="All screens"
        className="grid size-11 place-items-center rounded-bench hover:bg-wash"
      >
        <Bars width="20" height="20" />
      </Dialog.Trigger>
      <Dialog.Portal>
        <Dialog.Overlay className="fixed inset-0 z-40 bg-[#10151b]/50" />
        <Dialog.Content
          aria-describedby={undefined}
          className="fixed inset-y-0 right-0 z-50 flex w-[min(20rem,88vw)] flex-col gap-4 overflow-y-auto border-l border-edge bg-paper pb-6 text-ink"
        >
          <div className="flex items-center justify-between border-b border-rule py-1.5 pr-1.5 pl-5">
            <Dialog.Title className="font-heading">All screens</Dialog.Title>
            <Dialog.Close aria-label="Close" className="grid size-11 place-items-center rounded-bench">
              <Cross width="18" height="18" />
            </Dialog.Close>
          </div>
          <div className="px-5">
            <FindRepair onGo={close} />
          </div>
          <RailLinks onGo={close} />
          <div className="mt-auto px-5 pt-4">
            <Who />
          </div>
        </Dialog.Content>
      </Dialog.Portal>
    </Dialog.Root>
  );
}
