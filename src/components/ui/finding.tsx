import type { ReactNode } from 'react';

type Props = { children: ReactNode };

/** The page in one sentence, with its numbers. */
export function Finding({ children }: Props) {
  return (
    <p className="max-w-[34em] text-finding font-finding text-pretty" data-finding>
      {children}
    </p>
  );
}

/** The number that matters. */
export function Strong({ children }: Props) {
  return <strong className="font-strong">{children}</strong>;
}

/** Over a limit; the sentence around it says so too. */
export function Over({ children }: Props) {
  return <strong className="font-strong text-oxide">{children}</strong>;
}

/** Held: within a limit, cured, better. */
export function Held({ children }: Props) {
  return <strong className="font-strong text-verdigris">{children}</strong>;
}
