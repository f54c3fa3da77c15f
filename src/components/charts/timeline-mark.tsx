export type TimelineShape = 'circle' | 'diamond' | 'square' | 'small';

type Props = { shape: TimelineShape; isHollow: boolean; x: number; y: number };

const COLORS: Record<TimelineShape, string> = {
  circle: 'var(--color-layout)',
  diamond: 'var(--color-oxide)',
  square: 'var(--color-dim)',
  small: 'var(--color-dim)',
};

/** Told apart by shape first, then by color; hollow where its reading is not used. */
export function TimelineMark({ shape, isHollow, x, y }: Props) {
  const color = COLORS[shape];
  const look = { fill: isHollow ? 'var(--color-sheet)' : color, stroke: color, strokeWidth: 2 };
  switch (shape) {
    case 'circle':
      return <circle cx={x} cy={y} r="5.5" {...look} />;
    case 'diamond':
      return <path d={`M${x} ${y - 7.5}l7.5 7.5l-7.5 7.5l-7.5 -7.5z`} {...look} />;
    case 'square':
      return <rect x={x - 5} y={y - 5} width="10" height="10" {...look} />;
    case 'small':
      return <circle cx={x} cy={y} r="3.5" {...look} />;
  }
}
