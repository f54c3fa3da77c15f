export type MarkShape = 'dot' | 'diamond' | 'both' | 'ring';

type Props = { shape: MarkShape; x: number; y: number };

/** Told apart by shape first, then by color. */
export function EpisodeMark({ shape, x, y }: Props) {
  switch (shape) {
    case 'dot':
      return <circle cx={x} cy={y} r="4" fill="var(--color-oxide)" />;
    case 'diamond':
      return <path d={`M${x} ${y - 5.5}l5.5 5.5l-5.5 5.5l-5.5 -5.5z`} fill="var(--color-layout)" />;
    case 'both':
      return (
        <g>
          <circle
            cx={x}
            cy={y}
            r="7"
            fill="var(--color-sheet)"
            stroke="var(--color-oxide)"
            strokeWidth="1.8"
          />
          <path d={`M${x} ${y - 4.6}l4.6 4.6l-4.6 4.6l-4.6 -4.6z`} fill="var(--color-layout)" />
        </g>
      );
    case 'ring':
      return (
        <circle cx={x} cy={y} r="3" fill="var(--color-sheet)" stroke="var(--color-dim)" strokeWidth="1.4" />
      );
  }
}
