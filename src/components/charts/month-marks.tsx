import { useActiveTooltipDataPoints, usePlotArea, useXAxisScale, useYAxisScale } from 'recharts';
import { Hatch } from './hatch';
import type { MonthPoint } from './month-chart';

type Props = { points: readonly MonthPoint[]; center: number | null; centerText: string };
type Place = { x: number; y: (share: number) => number };

/** What is drawn on the month's axes: hatching, limits, average, intervals, points. */
export function MonthMarks({ points, center, centerText }: Props) {
  const area = usePlotArea();
  const scaleX = useXAxisScale();
  const scaleY = useYAxisScale();
  const active = useActiveTooltipDataPoints<MonthPoint>()?.[0]?.month;
  if (!area || !scaleX || !scaleY) return null;
  const x = (index: number) => scaleX(index) ?? 0;
  // Nothing is drawn above the plot: what does not fit ends at its edge.
  const y = (share: number) => Math.max(scaleY(share) ?? 0, area.y);
  const band = area.width / Math.max(points.length, 1);
  const firstMaturing = points.findIndex(({ isMaturing }) => isMaturing);
  const right = area.x + area.width;
  const centerY = center === null ? null : y(center);
  const lastLimit = points.at(-1)?.limitUpper ?? null;
  const limitLabelY = lastLimit === null ? null : labelBeside(y(lastLimit), centerY);

  return (
    <g className="text-xs">
      {firstMaturing >= 0 && (
        <Hatch
          x={x(firstMaturing) - band / 2}
          y={area.y}
          width={right - x(firstMaturing) + band / 2}
          height={area.height}
        />
      )}
      {points.map((point, index) =>
        point.month === active || point.isChosen ? (
          <rect
            key={point.month}
            x={x(index) - band / 2}
            y={area.y}
            width={band}
            height={area.height}
            fill="var(--color-layout)"
            opacity={point.month === active ? 0.14 : 0.07}
          />
        ) : null,
      )}
      <path
        d={steps(points, 'limitUpper', x, y, band)}
        fill="none"
        stroke="var(--color-dim)"
        strokeWidth="1.2"
      />
      <path
        d={steps(points, 'limitLower', x, y, band)}
        fill="none"
        stroke="var(--color-dim)"
        strokeWidth="1.2"
      />
      {limitLabelY !== null && (
        <text x={right + 6} y={limitLabelY + 4} fill="var(--color-dim)">
          limit
        </text>
      )}
      {centerY !== null && (
        <>
          <line
            x1={area.x}
            x2={right}
            y1={centerY}
            y2={centerY}
            stroke="var(--color-dim)"
            strokeDasharray="2 4"
          />
          <text x={right + 6} y={centerY - 3} fill="var(--color-dim)">
            average
          </text>
          <text x={right + 6} y={centerY + 12} fill="var(--color-ink)">
            {centerText}
          </text>
        </>
      )}
      {points.map((point, index) =>
        point.isMaturing ? (
          <Maturing key={point.month} point={point} x={x(index)} y={y} />
        ) : (
          <Settled key={point.month} point={point} x={x(index)} y={y} isLate={index > points.length * 0.85} />
        ),
      )}
    </g>
  );
}

function Settled({ point, x, y, isLate }: Place & { point: MonthPoint; isLate: boolean }) {
  const { rate, lower, upper, limitLower, limitUpper, rateText } = point;
  if (rate === null) return null;
  const isOver = limitUpper !== null && rate > limitUpper;
  const isUnder = limitLower !== null && rate < limitLower;
  const color = isOver ? 'var(--color-oxide)' : isUnder ? 'var(--color-verdigris)' : 'var(--color-layout)';
  const at = y(rate);
  return (
    <g>
      {lower !== null && upper !== null && (
        <line x1={x} x2={x} y1={y(lower)} y2={y(upper)} stroke={color} strokeWidth="1.5" opacity="0.55" />
      )}
      {isOver || isUnder ? (
        <>
          <path d={`M${x} ${at - 6.5}l6.5 6.5l-6.5 6.5l-6.5 -6.5z`} fill={color} />
          <text
            x={isLate ? x - 11 : x + 11}
            y={at + 4}
            textAnchor={isLate ? 'end' : 'start'}
            fill="var(--color-ink)"
            stroke="var(--color-sheet)"
            strokeWidth="4"
            paintOrder="stroke"
            className="font-heading"
          >
            {rateText}
          </text>
        </>
      ) : (
        <circle cx={x} cy={at} r="3.8" fill={color} />
      )}
    </g>
  );
}

function Maturing({ point, x, y }: Place & { point: MonthPoint }) {
  const { rate, projected } = point;
  return (
    <g stroke="var(--color-brass)">
      {rate !== null && projected !== null && (
        <line x1={x} x2={x} y1={y(rate)} y2={y(projected)} strokeDasharray="2 3" />
      )}
      {rate !== null && <circle cx={x} cy={y(rate)} r="3" fill="var(--color-brass)" />}
      {projected !== null && (
        <circle cx={x} cy={y(projected)} r="4.2" fill="var(--color-sheet)" strokeWidth="1.6" />
      )}
    </g>
  );
}

/** A staircase over the months that have a limit; months without one leave a gap. */
function steps(
  points: readonly MonthPoint[],
  edge: 'limitUpper' | 'limitLower',
  x: (index: number) => number,
  y: (share: number) => number,
  band: number,
): string {
  let isOpen = false;
  return points
    .map((point, index) => {
      const limit = point[edge];
      // A lower limit at zero bounds nothing.
      if (limit === null || (edge === 'limitLower' && limit <= 0)) {
        isOpen = false;
        return '';
      }
      const start = `${isOpen ? 'L' : 'M'}${x(index) - band / 2} ${y(limit)}`;
      isOpen = true;
      return `${start}L${x(index) + band / 2} ${y(limit)}`;
    })
    .join('');
}

/** Keeps two labels in the margin from lying on each other. */
function labelBeside(wantedY: number, centerY: number | null): number {
  if (centerY === null || wantedY < centerY - 30 || wantedY > centerY + 28) return wantedY;
  return wantedY <= centerY ? centerY - 30 : centerY + 28;
}
