import {
  CartesianGrid,
  ComposedChart,
  Line,
  Tooltip,
  usePlotArea,
  useXAxisScale,
  useYAxisScale,
  XAxis,
  YAxis,
} from 'recharts';
import { GRID, MARGIN, X_AXIS, Y_AXIS } from './axes';
import { ChartBox } from './chart-box';
import { TipContent, type Tip } from './tip';

/** In the coordinates of the paper, on which the fitted line is straight. */
export type PaperPoint = {
  x: number;
  y: number;
  lowerY: number | null;
  upperY: number | null;
  /** The line lies outside of this point's limits. */
  isMissed: boolean;
  tip: Tip;
};
type PaperTick = { at: number; text: string };

export type ProbabilityChartProps = {
  points: readonly PaperPoint[];
  line: readonly [{ x: number; y: number }, { x: number; y: number }];
  xTicks: readonly PaperTick[];
  yTicks: readonly PaperTick[];
  xLabel: string;
  heightPx: number;
  label: string;
};

/** Shares failed on paper where a fit is a straight line: what bends away from it is not described by it. */
export function ProbabilityChart(props: ProbabilityChartProps) {
  const { points, line, xTicks, yTicks, xLabel, heightPx, label } = props;
  const xs = [...points.map(({ x }) => x), ...xTicks.map(({ at }) => at)];
  const ys = yTicks.map(({ at }) => at);
  const textAt = (ticks: readonly PaperTick[]) => (at: number) =>
    ticks.find((tick) => tick.at === at)?.text ?? '';
  return (
    <ChartBox heightPx={heightPx}>
      <ComposedChart data={[...points]} margin={{ ...MARGIN, right: 20 }} title={label}>
        <CartesianGrid {...GRID} vertical />
        <XAxis
          {...X_AXIS}
          dataKey="x"
          type="number"
          domain={[Math.min(...xs), Math.max(...xs)]}
          ticks={xTicks.map(({ at }) => at)}
          tickFormatter={textAt(xTicks)}
          height={44}
          label={{ value: xLabel, position: 'insideBottom', fill: 'var(--color-dim)', fontSize: 12 }}
        />
        <YAxis
          {...Y_AXIS}
          width={50}
          domain={[Math.min(...ys), Math.max(...ys)]}
          ticks={ys}
          interval={0}
          allowDataOverflow
          tickFormatter={textAt(yTicks)}
        />
        <PaperMarks points={points} line={line} />
        <Tooltip content={<TipContent />} cursor={false} isAnimationActive={false} />
        <Line dataKey="y" stroke="none" dot={false} activeDot={{ r: 5 }} isAnimationActive={false} />
      </ComposedChart>
    </ChartBox>
  );
}

function PaperMarks({ points, line }: Pick<ProbabilityChartProps, 'points' | 'line'>) {
  const area = usePlotArea();
  const scaleX = useXAxisScale();
  const scaleY = useYAxisScale();
  if (!area || !scaleX || !scaleY) return null;
  const x = (at: number) => scaleX(at) ?? 0;
  const y = (at: number) => Math.min(Math.max(scaleY(at) ?? 0, area.y), area.y + area.height);
  const [from, to] = line;
  return (
    <g>
      {points.map((point) => (
        <g key={point.x}>
          {point.lowerY !== null && point.upperY !== null && (
            <path
              d={`M${x(point.x)} ${y(point.lowerY)}V${y(point.upperY)}`}
              stroke={point.isMissed ? 'var(--color-oxide)' : 'var(--color-layout)'}
              opacity="0.3"
            />
          )}
          {point.isMissed ? (
            <path
              d={`M${x(point.x)} ${y(point.y) - 4.5}l4.5 4.5l-4.5 4.5l-4.5 -4.5z`}
              fill="var(--color-oxide)"
            />
          ) : (
            <circle cx={x(point.x)} cy={y(point.y)} r="2.6" fill="var(--color-layout)" />
          )}
        </g>
      ))}
      {/* Clipped by the plot on its way to the edge. */}
      <svg x={area.x} y={area.y} width={area.width} height={area.height} overflow="hidden">
        <line
          x1={x(from.x) - area.x}
          y1={(scaleY(from.y) ?? 0) - area.y}
          x2={x(to.x) - area.x}
          y2={(scaleY(to.y) ?? 0) - area.y}
          stroke="var(--color-ink)"
          strokeWidth="1.4"
        />
      </svg>
    </g>
  );
}
