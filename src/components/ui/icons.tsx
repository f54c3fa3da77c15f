import type { ComponentProps } from 'react';

type Props = Omit<ComponentProps<'svg'>, 'viewBox' | 'children'>;

function icon(path: string) {
  return function Icon(props: Props) {
    return (
      <svg
        viewBox="0 0 16 16"
        width="16"
        height="16"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.6"
        aria-hidden="true"
        {...props}
      >
        <path d={path} />
      </svg>
    );
  };
}

export const ChevronDown = icon('m3.5 6 4.5 4.5L12.5 6');
export const Check = icon('m3 8.5 3.2 3.2L13 4.8');
export const Cross = icon('m4 4 8 8m0-8-8 8');
export const Bars = icon('M2.5 4.5h11M2.5 8h11M2.5 11.5h7');
export const Ascending = icon('m4.5 9.5 3.5-4 3.5 4');
export const Descending = icon('m4.5 6.5 3.5 4 3.5-4');

/** The product's mark: a scribed line, crossed by the witness that was left on it. */
export function Mark({ size = 22 }: { size?: number }) {
  return (
    <svg viewBox="0 0 22 22" width={size} height={size} aria-hidden="true" fill="none" strokeWidth="2">
      <path d="M3 19 19 3" stroke="var(--color-layout)" />
      <path d="m7 8 7 7" stroke="var(--color-ink)" />
    </svg>
  );
}
