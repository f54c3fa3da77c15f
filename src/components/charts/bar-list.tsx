import type { ReactNode } from 'react';

export type BarRow = {
  id: string;
  name: ReactNode;
  /** What is known, then what the unknown could add. */
  solid: number;
  faint?: number;
  /** The counts, written beside the bar. */
  text: string;
};

type Props = { rows: readonly BarRow[] };

/** Bars with their names and counts in words: nothing has to be hovered to be read. */
export function BarList({ rows }: Props) {
  const max = Math.max(1, ...rows.map(({ solid, faint = 0 }) => solid + faint));
  const share = (value: number) => `${(value / max) * 100}%`;
  return (
    <ol className="flex flex-col">
      {rows.map(({ id, name, solid, faint = 0, text }) => (
        <li key={id} className="grid min-h-9 items-center gap-x-3 py-1 sm:grid-cols-[11rem_minmax(0,1fr)]">
          <span className="text-table sm:text-right">{name}</span>
          <span className="flex min-w-0 items-center gap-2">
            <span className="flex h-3.5 min-w-0 flex-1 bg-[linear-gradient(var(--color-rule),var(--color-rule))] bg-[length:1px_100%] bg-no-repeat">
              <span className="bg-layout" style={{ width: share(solid) }} />
              <span
                className="border border-l-0 border-layout/50 bg-[repeating-linear-gradient(45deg,transparent_0_3px,color-mix(in_oklab,var(--color-layout)_35%,transparent)_3px_4px)]"
                style={{ width: share(faint), ...(faint === 0 ? { display: 'none' } : {}) }}
              />
            </span>
            <span className="w-[8.5rem] shrink-0 text-sm text-dim">{text}</span>
          </span>
        </li>
      ))}
    </ol>
  );
}
