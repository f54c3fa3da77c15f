import type { StepTickText } from './step-chart';

type Props = { x: number; y: number; index: number; ticks: readonly StepTickText[] };

/** An age, and under it how many were still observed there. */
export function StepTick({ x, y, index, ticks }: Props) {
  const tick = ticks[index];
  if (!tick) return null;
  return (
    <g className="text-xs" aria-hidden="true" textAnchor={index === 0 ? 'start' : 'middle'}>
      <text x={x} y={y + 8} fill="var(--color-dim)">
        {tick.text}
      </text>
      <text x={x} y={y + 27} fill="var(--color-ink)">
        {tick.under}
      </text>
    </g>
  );
}
