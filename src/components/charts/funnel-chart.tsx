import {
  CartesianGrid,
  ComposedChart,
  Line,
  Tooltip,
  useActiveTooltipDataPoints,
  usePlotArea,
  useXAxisScale,
  useYAxisScale,
  XAxis,
  YAxis,
} from 'recharts';
import { GRID, MARGIN, shareTicks, X_AXIS, Y_AXIS } from './axes';
import { ChartBox } from './chart-box';
import { labelPlaces, type LabelPlace } from './label-places';
import { TipContent, type Tip } from './tip';

export type FunnelPoint = {
  id: string;
  name: string;
  size: number;
  rate: number;
  limitLower: number | null;
  limitUpper: number | null;
  tip: Tip;
};

export type FunnelChartProps = {
  points: readonly FunnelPoint[];
  center: number | null;
  centerText: string;
  xLabel: string;
  tickText: (share: number) => string;
  heightPx: number;
  label: string;
};

/** Shares against the number of jobs behind them: what lies between the curves is told from the average by nothing. */
export function FunnelChart({
  points,
  center,
  centerText,
  xLabel,
  tickText,
  heightPx,
  label,
}: FunnelChartProps) {
  const data = [...points].sort((a, b) => a.size - b.size);
  const ticks = shareTicks(
    Math.max(0.05, ...usual(data).map(({ rate, limitUpper }) => Math.max(rate, limitUpper ?? 0))),
  );
  const largest = data.at(-1)?.size ?? 1;
  return (
    <ChartBox heightPx={heightPx}>
      <ComposedChart data={data} margin={{ ...MARGIN, right: 62 }} title={label}>
        <CartesianGrid {...GRID} />
        <XAxis
          {...X_AXIS}
          dataKey="size"
          type="number"
          domain={[0, Math.ceil(largest * 1.04)]}
          height={44}
          label={{ value: xLabel, position: 'insideBottom', fill: 'var(--color-dim)', fontSize: 12 }}
        />
        <YAxis
          {...Y_AXIS}
          domain={[0, ticks.at(-1) ?? 1]}
          allowDataOverflow
          ticks={ticks}
          tickFormatter={tickText}
        />
        <FunnelMarks points={data} center={center} centerText={centerText} />
        <Tooltip content={<TipContent />} cursor={false} isAnimationActive={false} />
        <Line dataKey="rate" stroke="none" dot={false} activeDot={false} isAnimationActive={false} />
      </ComposedChart>
    </ChartBox>
  );
}

/** Models with a handful of jobs would stretch the scale; they are drawn at its edge. */
function usual(points: readonly FunnelPoint[]): readonly FunnelPoint[] {
  const largest = points.at(-1)?.size ?? 0;
  const kept = points.filter(({ size }) => size >= Math.min(20, largest / 4));
  return kept.length > 0 ? kept : points;
}

type MarksProps = { points: readonly FunnelPoint[]; center: number | null; centerText: string };

function FunnelMarks({ points, center, centerText }: MarksProps) {
  const area = usePlotArea();
  const scaleX = useXAxisScale();
  const scaleY = useYAxisScale();
  const active = useActiveTooltipDataPoints<FunnelPoint>()?.[0]?.id;
  if (!area || !scaleX || !scaleY) return null;
  const bottom = area.y + area.height;
  const x = (size: number) => scaleX(size) ?? 0;
  const y = (share: number) => Math.min(Math.max(scaleY(share) ?? 0, area.y), bottom);
  const edge = (side: 'limitLower' | 'limitUpper') =>
    points
      .flatMap((point) => {
        const limit = point[side];
        return limit === null ? [] : [`${x(point.size)} ${y(limit)}`];
      })
      .map((at, index) => `${index === 0 ? 'M' : 'L'}${at}`)
      .join('');
  const right = area.x + area.width;
  const places = labelPlaces(
    points
      .filter((point) => standing(point) !== 'within')
      .map(({ id, name, size, rate }) => ({ id, name, x: x(size), y: y(rate) })),
    { left: area.x, right, top: area.y, bottom },
  );
  return (
    <g className="text-xs">
      <path d={edge('limitUpper')} fill="none" stroke="var(--color-dim)" strokeWidth="1.2" />
      <path d={edge('limitLower')} fill="none" stroke="var(--color-dim)" strokeWidth="1.2" />
      {center !== null && (
        <>
          <line
            x1={area.x}
            x2={right}
            y1={y(center)}
            y2={y(center)}
            stroke="var(--color-dim)"
            strokeDasharray="2 4"
          />
          <text x={right + 6} y={y(center) - 3} fill="var(--color-dim)">
            average
          </text>
          <text x={right + 6} y={y(center) + 12} fill="var(--color-ink)">
            {centerText}
          </text>
        </>
      )}
      {points.map((point) => (
        <FunnelMark
          key={point.id}
          point={point}
          x={x(point.size)}
          y={y(point.rate)}
          isActive={point.id === active}
          place={places.get(point.id)}
        />
      ))}
    </g>
  );
}

function standing({ rate, limitLower, limitUpper }: FunnelPoint): 'over' | 'under' | 'within' {
  if (limitUpper !== null && rate > limitUpper) return 'over';
  return limitLower !== null && rate < limitLower ? 'under' : 'within';
}

const COLORS = {
  over: 'var(--color-oxide)',
  under: 'var(--color-verdigris)',
  within: 'var(--color-layout)',
} as const;

type MarkProps = {
  point: FunnelPoint;
  x: number;
  y: number;
  isActive: boolean;
  place: LabelPlace | undefined;
};

/** What lies outside of the limits is a diamond with its name. */
function FunnelMark({ point, x, y, isActive, place }: MarkProps) {
  const stands = standing(point);
  return (
    <g>
      {stands === 'within' ? (
        <circle cx={x} cy={y} r="3.6" fill={COLORS[stands]} opacity="0.75" />
      ) : (
        <path d={`M${x} ${y - 6}l6 6l-6 6l-6 -6z`} fill={COLORS[stands]} />
      )}
      {isActive && <circle cx={x} cy={y} r="8" fill="none" stroke="var(--color-layout)" strokeWidth="2" />}
      {place && (
        <text
          x={place.x}
          y={place.y + 4}
          textAnchor={place.anchor}
          fill="var(--color-ink)"
          stroke="var(--color-sheet)"
          strokeWidth="4"
          paintOrder="stroke"
          className="font-heading"
        >
          {point.name}
        </text>
      )}
    </g>
  );
}
