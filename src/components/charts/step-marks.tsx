import { useActiveTooltipDataPoints, usePlotArea, useXAxisScale, useYAxisScale } from 'recharts';
import type { StepCurve, StepMark, StepPoint } from './step-chart';
import { stairBand, stairs } from './steps';

type Props = {
  curves: readonly StepCurve[];
  start: 0 | 1;
  line: readonly { at: number; value: number }[];
  marks: readonly StepMark[];
  end: number;
  underLabel: string;
};

/** Beyond three a series is grey. */
const TONES = [
  { color: 'var(--color-layout)', dash: undefined },
  { color: 'var(--color-brass)', dash: '7 3' },
  { color: 'var(--color-verdigris)', dash: '2 3' },
] as const;
const GREY = { color: 'var(--color-dim)', dash: '1 3' } as const;

/** What is drawn on the axes of a `StepChart`. */
export function StepMarks({ curves, start, line, marks, end, underLabel }: Props) {
  const area = usePlotArea();
  const scaleX = useXAxisScale();
  const scaleY = useYAxisScale();
  const active = useActiveTooltipDataPoints<StepPoint>()?.[0];
  if (!area || !scaleX || !scaleY) return null;
  const bottom = area.y + area.height;
  const x = (at: number) => scaleX(Math.min(Math.max(at, 0), end)) ?? 0;
  const y = (value: number) => Math.min(Math.max(scaleY(value) ?? 0, area.y), bottom);
  return (
    <g className="text-xs">
      <text x={0} y={bottom + 33} fill="var(--color-dim)" aria-hidden="true">
        {underLabel}
      </text>
      {curves.map((curve, index) => {
        const { color, dash } = TONES[index] ?? GREY;
        const last = curve.points.at(-1);
        const lastY = y(last?.value ?? start);
        return (
          <g key={curve.name}>
            <path
              d={stairBand(curve.points, curve.end, x, y)}
              fill={color}
              opacity={curves.length > 1 ? 0.12 : 0.2}
            />
            <path
              d={stairs({ at: 0, value: start }, curve.points, curve.end, x, y)}
              fill="none"
              stroke={color}
              strokeWidth="1.8"
              strokeDasharray={dash}
            />
            {curves.length > 1 && (
              <Label x={Math.min(x(curve.end) + 6, area.x + area.width - 4)} y={lastY - 7} anchor="end">
                {curve.name}
              </Label>
            )}
          </g>
        );
      })}
      {line.length > 1 && (
        <path
          d={line.map(({ at, value }, index) => `${index === 0 ? 'M' : 'L'}${x(at)} ${y(value)}`).join('')}
          fill="none"
          stroke="var(--color-ink)"
          strokeWidth="1.2"
        />
      )}
      {marks.map((mark) => (
        <Named
          key={mark.text}
          mark={mark}
          x={x}
          y={y}
          left={area.x}
          right={area.x + area.width}
          bottom={bottom}
        />
      ))}
      {active && (
        <circle
          cx={x(active.at)}
          cy={y(active.value)}
          r="5"
          fill="var(--color-sheet)"
          stroke="var(--color-layout)"
          strokeWidth="2"
        />
      )}
    </g>
  );
}

type NamedProps = {
  mark: StepMark;
  x: (at: number) => number;
  y: (value: number) => number;
  left: number;
  right: number;
  bottom: number;
};

/** A point on the line with its guides, its limits, and its name beside it. */
function Named({ mark, x, y, left, right, bottom }: NamedProps) {
  const at = x(mark.at);
  const level = y(mark.value);
  const isLate = at > left + (right - left) * 0.62;
  return (
    <g stroke="var(--color-brass)">
      <path d={`M${left} ${level}H${at}V${bottom}`} fill="none" strokeDasharray="2 3" />
      {mark.lower !== null && mark.upper !== null && (
        <path d={`M${x(mark.lower)} ${level}H${x(mark.upper)}`} strokeWidth="3.5" opacity="0.45" />
      )}
      <circle cx={at} cy={level} r="4" fill="var(--color-brass)" stroke="none" />
      <Label
        x={isLate ? at - 7 : at + 8}
        y={isLate ? level + 17 : level - 8}
        anchor={isLate ? 'end' : 'start'}
      >
        {mark.text}
      </Label>
    </g>
  );
}

type LabelProps = { x: number; y: number; anchor: 'start' | 'end'; children: string };

/** Stays readable over lines and bands. */
function Label({ x, y, anchor, children }: LabelProps) {
  return (
    <text
      x={x}
      y={y}
      textAnchor={anchor}
      fill="var(--color-ink)"
      stroke="var(--color-sheet)"
      strokeWidth="4"
      paintOrder="stroke"
    >
      {children}
    </text>
  );
}
