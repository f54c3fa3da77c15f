import { CartesianGrid, ComposedChart, Line, Tooltip, XAxis, YAxis } from 'recharts';
import { GRID, MARGIN, X_AXIS, Y_AXIS } from './axes';
import { ChartBox } from './chart-box';
import { StepMarks } from './step-marks';
import { StepTick } from './step-tick';
import { TipContent, type Tip } from './tip';

export type StepPoint = {
  at: number;
  value: number;
  lower: number | null;
  upper: number | null;
  tip: Tip;
};

export type StepCurve = {
  /** Written at the curve's end where there is more than one. */
  name: string;
  points: readonly StepPoint[];
  /** To where it was observed. */
  end: number;
};

export type StepMark = {
  at: number;
  value: number;
  lower: number | null;
  upper: number | null;
  text: string;
};

export type StepTickText = { at: number; text: string; under: string };

export type StepChartProps = {
  curves: readonly StepCurve[];
  /** Where every curve begins: all running, or no repair. */
  start: 0 | 1;
  /** A smooth line over the steps. */
  line?: readonly { at: number; value: number }[];
  /** Points on the line that are worth a name. */
  marks?: readonly StepMark[];
  end: number;
  ticks: readonly StepTickText[];
  /** What the second row under the axis counts. */
  underLabel: string;
  yTicks: readonly number[];
  yTickText: (value: number) => string;
  heightPx: number;
  label: string;
};

/** Steps as observed with their band, a fitted line, named points, and how many each age rests on. */
export function StepChart(props: StepChartProps) {
  const { curves, start, line = [], marks = [], end, ticks, underLabel, heightPx, label } = props;
  const data = curves
    .flatMap(({ points }) => points)
    .map((point) => ({ at: point.at, value: point.value, tip: point.tip }))
    .sort((a, b) => a.at - b.at);
  return (
    <ChartBox heightPx={heightPx}>
      <ComposedChart data={data} margin={{ ...MARGIN, right: 20 }} title={label}>
        <CartesianGrid {...GRID} horizontalValues={[...props.yTicks]} />
        <XAxis
          {...X_AXIS}
          dataKey="at"
          type="number"
          domain={[0, end]}
          allowDataOverflow
          ticks={ticks.map(({ at }) => at)}
          interval={0}
          height={44}
          tick={(tick) => <StepTick x={Number(tick.x)} y={Number(tick.y)} index={tick.index} ticks={ticks} />}
        />
        <YAxis
          {...Y_AXIS}
          width={50}
          domain={[0, props.yTicks.at(-1) ?? 1]}
          allowDataOverflow
          ticks={[...props.yTicks]}
          tickFormatter={props.yTickText}
        />
        <StepMarks
          curves={curves}
          start={start}
          line={line}
          marks={marks}
          end={end}
          underLabel={underLabel}
        />
        <Tooltip content={<TipContent />} cursor={false} isAnimationActive={false} />
        {/* Draws nothing: it is what the pointer and the arrow keys move along. */}
        <Line dataKey="value" stroke="none" dot={false} activeDot={false} isAnimationActive={false} />
      </ComposedChart>
    </ChartBox>
  );
}
