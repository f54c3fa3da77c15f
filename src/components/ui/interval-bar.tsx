type Props = {
  estimate: number;
  lower: number;
  upper: number;
  /** The value at the right end; equal for all bars that are compared. */
  max: number;
  /** A dotted line to compare with, such as the shop's average. */
  center?: number | null;
  /** What stands beside the bar, "19 %". */
  text: string;
  /** Read out in place of the picture: "19 % (12–29 %)". */
  label: string;
  tone?: 'layout' | 'oxide';
};

const WIDTH = 150;

/** An estimate with its interval, small enough for a table's cell. */
export function IntervalBar({ estimate, lower, upper, max, center, text, label, tone = 'layout' }: Props) {
  const x = (value: number) => 5 + (Math.min(Math.max(value, 0), max) / (max || 1)) * (WIDTH - 10);
  const color = `var(--color-${tone})`;
  return (
    <span className="inline-flex items-center gap-2 align-middle">
      <svg role="img" aria-label={label} width={WIDTH} height="20" className="shrink-0">
        {center !== undefined && center !== null && (
          <line
            x1={x(center)}
            x2={x(center)}
            y1="1"
            y2="19"
            stroke="var(--color-dim)"
            strokeDasharray="2 3"
          />
        )}
        <line x1={x(lower)} x2={x(upper)} y1="10" y2="10" stroke={color} strokeWidth="2" opacity="0.55" />
        <circle cx={x(estimate)} cy="10" r="4" fill={color} />
      </svg>
      <span aria-hidden="true" className="whitespace-nowrap">
        {text}
      </span>
    </span>
  );
}
