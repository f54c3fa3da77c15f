import type { ReactNode } from 'react';

type EmptyProps = { title: string; children?: ReactNode; action?: ReactNode };

/** Nothing here yet: what would be here, and how it gets here. */
export function EmptyState({ title, children, action }: EmptyProps) {
  return (
    <div className="max-w-[40rem] border-l-2 border-rule py-2 pl-4">
      <p className="font-heading">{title}</p>
      {children && <div className="mt-1 text-dim">{children}</div>}
      {action && <div className="mt-3">{action}</div>}
    </div>
  );
}

type TooFewProps = { what: string; children?: ReactNode };

/** Too little to say: in words, with what is known. */
export function TooFew({ what, children }: TooFewProps) {
  return (
    <div className="max-w-[40rem] border-l-2 border-brass py-2 pl-4">
      <p className="font-label">{what}</p>
      {children && <div className="mt-1 text-dim">{children}</div>}
    </div>
  );
}
