import { usePlotArea } from 'recharts';

type Props = { x: number; y: number; index: number; points: readonly { month: string; letter: string }[] };

/** A month's letter, and the year under each January; where it is tight, only the quarters' first months. */
export function MonthTick({ x, y, index, points }: Props) {
  const area = usePlotArea();
  const point = points[index];
  if (!area || !point) return null;
  const isTight = area.width / points.length < 14;
  const monthNumber = Number(point.month.slice(5));
  const isShown = !isTight || monthNumber % 3 === 1;
  const hasYear = monthNumber === 1 || (index === 0 && monthNumber < (isTight ? 7 : 10));
  return (
    <g className="text-xs" aria-hidden="true">
      {isShown && (
        <text x={x} y={y + 8} textAnchor="middle" fill="var(--color-dim)">
          {point.letter}
        </text>
      )}
      {hasYear && (
        <text x={x - 4} y={y + 25} fill="var(--color-ink)">
          {point.month.slice(0, 4)}
        </text>
      )}
    </g>
  );
}
