import { Link } from 'react-router';
import { EpisodeMark, type MarkShape } from './episode-mark';
import type { Tip } from './tip';
import { useTip } from './use-tip';
import { useWidth } from './use-width';

export type EpisodeRow = {
  id: string;
  name: string;
  href: string;
  /** Read out in place of the line. */
  label: string;
  tip: Tip;
  marks: readonly { at: number; shape: MarkShape }[];
};

export type EpisodeChartProps = {
  rows: readonly EpisodeRow[];
  end: number;
  ticks: readonly { at: number; text: string }[];
  /** What each shape stands for, in the order in which it is explained. */
  shapes: readonly { shape: MarkShape; text: string }[];
  label: string;
};

const ROW_PX = 24;
const PX_PER_LETTER = 6.6;

/** One line is one machine: what was replaced at each visit, from the first on. */
export function EpisodeChart({ rows, end, ticks, shapes, label }: EpisodeChartProps) {
  const [ref, widthPx] = useWidth(600);
  const { on, card } = useTip(widthPx);
  const namePx = Math.min(150, widthPx * 0.3);
  const left = namePx + 14;
  const right = widthPx - 22;
  const x = (at: number) => left + (Math.max(at, 0) / (end || 1)) * (right - left);
  const bottom = rows.length * ROW_PX + 6;
  const letters = Math.floor(namePx / PX_PER_LETTER);
  return (
    <div ref={ref} className="relative">
      <svg width={widthPx} height={bottom + 22} role="group" aria-label={label} className="text-xs">
        {ticks.map(({ at, text }) => (
          <g key={at}>
            <line x1={x(at)} x2={x(at)} y1="0" y2={bottom} stroke="var(--color-rule)" strokeWidth="0.8" />
            <text x={x(at)} y={bottom + 15} textAnchor="middle" fill="var(--color-dim)">
              {text}
            </text>
          </g>
        ))}
        {rows.map((row, index) => {
          const y = index * ROW_PX + ROW_PX / 2 + 2;
          const last = row.marks.at(-1)?.at ?? 0;
          return (
            <Link
              key={row.id}
              to={row.href}
              aria-label={row.label}
              className="group"
              {...on({ tip: row.tip, x: Math.min(x(last) + 14, right), y: y + 14 })}
            >
              <rect
                x="0"
                y={y - ROW_PX / 2}
                width={widthPx}
                height={ROW_PX}
                className="fill-transparent group-hover:fill-wash group-focus-visible:fill-wash"
              />
              <text x={namePx} y={y + 4} textAnchor="end" fill="var(--color-dim)">
                {row.name.length > letters ? `…${row.name.slice(1 - letters)}` : row.name}
              </text>
              <line x1={x(0)} x2={x(last)} y1={y} y2={y} stroke="var(--color-dim)" strokeWidth="1.2" />
              {row.marks.map(({ at, shape }, mark) => (
                <EpisodeMark key={mark} shape={shape} x={x(at)} y={y} />
              ))}
            </Link>
          );
        })}
      </svg>
      {card}
      <ul className="mt-1 flex flex-wrap gap-x-5 text-xs">
        {shapes.map(({ shape, text }) => (
          <li key={shape} className="inline-flex items-center gap-1.5">
            <svg width="16" height="16" aria-hidden="true">
              <EpisodeMark shape={shape} x={8} y={8} />
            </svg>
            {text}
          </li>
        ))}
      </ul>
    </div>
  );
}
