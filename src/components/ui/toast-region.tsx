import { useEffect, useState, useSyncExternalStore } from 'react';
import { classNames } from '../../lib/class-names';
import { Cross } from './icons';
import { dismissToast, toastStore, type Toast } from './toast-store';

const SHOWN_MS = 6000;

/** The corner where `notify` speaks; it is read out politely and never takes the focus. */
export function ToastRegion() {
  const toasts = useSyncExternalStore(toastStore.subscribe, toastStore.read);
  return (
    <div
      role="status"
      aria-live="polite"
      className="pointer-events-none fixed inset-x-3 bottom-20 z-50 flex flex-col items-center gap-2 desk:right-6 desk:bottom-6 desk:left-auto desk:items-end"
      data-screen-only
    >
      {toasts.map((toast) => (
        <Slip key={toast.id} toast={toast} />
      ))}
    </div>
  );
}

function Slip({ toast }: { toast: Toast }) {
  const [isHeld, setHeld] = useState(false);
  useEffect(() => {
    // A failure stays until it is put away.
    if (isHeld || toast.tone === 'failed') return undefined;
    const timer = setTimeout(() => dismissToast(toast.id), SHOWN_MS);
    return () => clearTimeout(timer);
  }, [isHeld, toast]);
  return (
    <div
      className={classNames(
        'pointer-events-auto flex max-w-[26rem] items-center gap-3 rounded-bench border border-edge border-l-4 bg-sheet py-1 pr-1 pl-3 text-table shadow-bench',
        toast.tone === 'failed' ? 'border-l-oxide' : 'border-l-verdigris',
      )}
      onPointerEnter={() => setHeld(true)}
      onPointerLeave={() => setHeld(false)}
    >
      <span>
        <span className="font-heading">{toast.tone === 'failed' ? 'Not done: ' : 'Done: '}</span>
        {toast.text}
      </span>
      <button
        type="button"
        aria-label="Put away"
        className="grid size-11 shrink-0 place-items-center rounded-bench text-dim hover:bg-wash desk:size-8"
        onClick={() => dismissToast(toast.id)}
      >
        <Cross />
      </button>
    </div>
  );
}
