import type { ReactNode } from 'react';
import { Mark } from '../../components/ui/icons';

type Props = { title: string; intro?: ReactNode; children: ReactNode };

/** The page before the shop: one sheet, one question. */
export function Door({ title, intro, children }: Props) {
  return (
    <main className="mx-auto flex min-h-screen w-full max-w-[25rem] flex-col justify-center px-4 py-10">
      <title>{`${title} · Witness Mark`}</title>
      <p className="mb-5 flex items-center gap-2 font-strong">
        <Mark />
        Witness Mark
      </p>
      <div className="rounded-bench border border-rule bg-sheet p-5">
        <h1 className="text-title font-heading">{title}</h1>
        <div className="scribe mt-2 mb-4" aria-hidden="true" />
        {intro && <p className="mb-4 text-dim">{intro}</p>}
        {children}
      </div>
    </main>
  );
}

/** What is wrong with the whole form. */
export function FormError({ children }: { children: ReactNode }) {
  if (!children) return null;
  return (
    <p role="alert" className="border-l-3 border-oxide pl-3 text-oxide">
      {children}
    </p>
  );
}
