import { CartesianGrid, ComposedChart, Line, Tooltip, XAxis, YAxis } from 'recharts';
import { GRID, MARGIN, shareTicks, X_AXIS, Y_AXIS } from './axes';
import { ChartBox } from './chart-box';
import { MonthMarks } from './month-marks';
import { MonthTick } from './month-tick';
import { TipContent, type Tip } from './tip';

export type MonthPoint = {
  /** 'YYYY-MM' */
  month: string;
  letter: string;
  rate: number | null;
  lower: number | null;
  upper: number | null;
  limitLower: number | null;
  limitUpper: number | null;
  isMaturing: boolean;
  projected: number | null;
  /** The month that the page is about. */
  isChosen: boolean;
  /** Written beside a point outside its limits, and on the axis. */
  rateText: string;
  tip: Tip;
};

export type MonthChartProps = {
  points: readonly MonthPoint[];
  center: number | null;
  centerText: string;
  tickText: (share: number) => string;
  heightPx: number;
  label: string;
};

/** A share by month with its interval, the limits for a month of that size, and months that are not settled. */
export function MonthChart({ points, center, centerText, tickText, heightPx, label }: MonthChartProps) {
  const ticks = shareTicks(highestShown(points, center));
  const data = points.map((point, index) => ({ ...point, index }));
  return (
    <ChartBox heightPx={heightPx}>
      <ComposedChart data={data} margin={{ ...MARGIN, right: center === null ? 8 : 58 }} title={label}>
        <CartesianGrid {...GRID} />
        <XAxis
          {...X_AXIS}
          dataKey="index"
          type="number"
          domain={[-0.5, points.length - 0.5]}
          ticks={points.map((_, index) => index)}
          interval={0}
          height={40}
          tick={(tick) => (
            <MonthTick x={Number(tick.x)} y={Number(tick.y)} index={tick.index} points={points} />
          )}
        />
        <YAxis {...Y_AXIS} domain={[0, ticks.at(-1) ?? 1]} ticks={ticks} tickFormatter={tickText} />
        <MonthMarks points={points} center={center} centerText={centerText} />
        <Tooltip content={<TipContent />} cursor={false} isAnimationActive={false} />
        {/* Draws nothing: it is what the pointer and the arrow keys move along. */}
        <Line dataKey="rate" stroke="none" dot={false} activeDot={false} isAnimationActive={false} />
      </ComposedChart>
    </ChartBox>
  );
}

/** A few wide intervals of very small months may be cut at the top; points and limits of usual months may not. */
function highestShown(points: readonly MonthPoint[], center: number | null): number {
  const shown = points.flatMap(({ rate, projected }) => [rate ?? 0, projected ?? 0]);
  const uppers = points.flatMap(({ upper }) => (upper === null ? [] : [upper])).sort((a, b) => a - b);
  const usualUpper = uppers[Math.floor((uppers.length - 1) * 0.85)] ?? 0;
  return Math.max(...shown.map((share) => share * 1.1), usualUpper, (center ?? 0) * 2, 0.05);
}
