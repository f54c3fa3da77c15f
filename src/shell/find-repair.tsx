import { useEffect, useRef } from 'react';
import { useNavigate } from 'react-router';
import { paths } from '../paths';

type Props = { hasShortcut?: boolean; onGo?: () => void };

/** One box for a repair number, serial, tag or name; `/` goes to it from anywhere. */
export function FindRepair({ hasShortcut = false, onGo }: Props) {
  const box = useRef<HTMLInputElement>(null);
  const navigate = useNavigate();

  useEffect(() => {
    if (!hasShortcut) return undefined;
    const onKeyDown = (event: KeyboardEvent) => {
      if (event.key !== '/' || event.ctrlKey || event.metaKey || event.altKey) return;
      const target = event.target;
      if (target instanceof HTMLElement && target.closest('input, textarea, select, [contenteditable]'))
        return;
      event.preventDefault();
      box.current?.focus();
      box.current?.select();
    };
    document.addEventListener('keydown', onKeyDown);
    return () => document.removeEventListener('keydown', onKeyDown);
  }, [hasShortcut]);

  return (
    <form
      role="search"
      aria-label="Repairs"
      action={(form) => {
        const words = form.get('q');
        void navigate(paths.repairs({ q: typeof words === 'string' ? words.trim() : '' }));
        onGo?.();
      }}
    >
      <input
        ref={box}
        type="search"
        name="q"
        aria-label="Find a repair"
        aria-keyshortcuts={hasShortcut ? '/' : undefined}
        placeholder={hasShortcut ? 'Find a repair  ( / )' : 'Find a repair'}
        className="control w-full text-table"
        onKeyDown={(event) => event.key === 'Escape' && event.currentTarget.blur()}
      />
    </form>
  );
}
