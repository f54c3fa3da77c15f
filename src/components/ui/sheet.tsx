import { useId, type ReactNode } from 'react';
import { classNames } from '../../lib/class-names';

type Props = {
  title?: ReactNode;
  sub?: ReactNode;
  actions?: ReactNode;
  className?: string;
  children: ReactNode;
};

/** A sheet of paper on the bench: a titled section of a page. */
export function Sheet({ title, sub, actions, className, children }: Props) {
  const headingId = useId();
  return (
    <section
      aria-labelledby={title ? headingId : undefined}
      className={classNames(
        'min-w-0 rounded-bench border border-rule bg-sheet px-4 py-4 desk:px-[18px]',
        className,
      )}
    >
      {(title || actions) && (
        <div className="flex flex-wrap items-baseline justify-between gap-x-4">
          {title && (
            <h2 id={headingId} className="text-table font-heading">
              {title}
            </h2>
          )}
          {actions && (
            <div className="flex flex-wrap items-center gap-x-4 text-sm" data-screen-only>
              {actions}
            </div>
          )}
        </div>
      )}
      {sub && <p className="mt-0.5 text-sm text-dim">{sub}</p>}
      {(title || sub) && <div className="h-2.5" aria-hidden="true" />}
      {children}
    </section>
  );
}
