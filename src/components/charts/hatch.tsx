import { useId } from 'react';

type Props = { x: number; y: number; width: number; height: number };

/** Slanted lines: what lies under them is not settled yet. */
export function Hatch({ x, y, width, height }: Props) {
  const id = useId();
  if (width <= 0 || height <= 0) return null;
  return (
    <g aria-hidden="true">
      <defs>
        <pattern id={id} width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <line x1="0" y1="0" x2="0" y2="6" stroke="var(--color-brass)" strokeWidth="1" opacity="0.45" />
        </pattern>
      </defs>
      <rect x={x} y={y} width={width} height={height} fill={`url(#${id})`} />
    </g>
  );
}
