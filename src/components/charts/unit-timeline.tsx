import { useNavigate } from 'react-router';
import { placeLabels } from './timeline-layout';
import { TimelineMark, type TimelineShape } from './timeline-mark';
import type { Tip } from './tip';
import { useTip } from './use-tip';
import { useWidth } from './use-width';

export type TimelineStop = {
  id: string;
  at: number;
  shape: TimelineShape;
  isHollow: boolean;
  /** A break in the line before it: the meter began anew. */
  isBreak: boolean;
  /** A word or two over the mark. */
  name: string;
  href: string | null;
  /** Read out in place of the mark. */
  label: string;
  tip: Tip;
};

export type UnitTimelineProps = {
  stops: readonly TimelineStop[];
  start: number;
  end: number;
  ticks: readonly { at: number; text: string }[];
  shapes: readonly { shape: TimelineShape; isHollow: boolean; text: string }[];
  label: string;
};

const LEVELS = 4;
const LEVEL_PX = 20;
const AXIS_Y = LEVELS * LEVEL_PX + 30;
const SIDE_PX = 16;

/** One line from left to right: what happened to one machine, and when. */
export function UnitTimeline({ stops, start, end, ticks, shapes, label }: UnitTimelineProps) {
  const [ref, widthPx] = useWidth(640);
  const { on, card } = useTip(widthPx);
  const navigate = useNavigate();
  const x = (at: number) => SIDE_PX + ((at - start) / (end - start || 1)) * (widthPx - 2 * SIDE_PX);
  const labels = placeLabels(
    stops.map(({ at, name }) => ({ x: x(at), text: name })),
    widthPx,
    LEVELS,
  );
  return (
    <div ref={ref} className="relative">
      <svg width={widthPx} height={AXIS_Y + 42} role="group" aria-label={label} className="text-xs">
        {ticks.map(({ at, text }) => (
          <g key={at} aria-hidden="true">
            <line
              x1={x(at)}
              x2={x(at)}
              y1={AXIS_Y}
              y2={AXIS_Y + 12}
              stroke="var(--color-dim)"
              strokeWidth="0.8"
            />
            <text x={x(at)} y={AXIS_Y + 28} textAnchor={anchorAt(x(at), widthPx)} fill="var(--color-dim)">
              {text}
            </text>
          </g>
        ))}
        <line x1={x(start)} x2={x(end)} y1={AXIS_Y} y2={AXIS_Y} stroke="var(--color-dim)" strokeWidth="1.4" />
        {labels.map((placed, index) =>
          placed ? (
            <line
              key={stops[index]?.id}
              x1={placed.x}
              x2={placed.x}
              y1={AXIS_Y - 10}
              y2={labelY(placed.level) + 3}
              stroke="var(--color-rule)"
            />
          ) : null,
        )}
        {/* Over all lines, each in a halo: a line to a higher name passes behind a lower one. */}
        {labels.map((placed, index) =>
          placed ? (
            <text
              key={stops[index]?.id}
              aria-hidden="true"
              x={placed.x}
              y={labelY(placed.level)}
              textAnchor={placed.anchor}
              fill="var(--color-ink)"
              stroke="var(--color-sheet)"
              strokeWidth="4"
              paintOrder="stroke"
            >
              {placed.text}
            </text>
          ) : null,
        )}
        {stops.map((stop) => {
          const { href } = stop;
          const at = x(stop.at);
          const open = () => {
            if (href) void navigate(href);
          };
          return (
            <g
              key={stop.id}
              role={href ? 'link' : 'img'}
              tabIndex={0}
              aria-label={stop.label}
              className={href ? 'cursor-pointer' : undefined}
              onClick={open}
              {...hoverAndKeys(on({ tip: stop.tip, x: at, y: AXIS_Y + 14 }), open)}
            >
              <rect x={at - 11} y={AXIS_Y - 22} width="22" height="44" fill="transparent" />
              {stop.isBreak && (
                <path
                  d={`M${at - 16} ${AXIS_Y + 7}l4 -14m3 14l4 -14`}
                  stroke="var(--color-brass)"
                  strokeWidth="2"
                  fill="none"
                />
              )}
              <TimelineMark shape={stop.shape} isHollow={stop.isHollow} x={at} y={AXIS_Y} />
            </g>
          );
        })}
      </svg>
      {card}
      <ul className="mt-1 flex flex-wrap gap-x-5 gap-y-1 text-xs">
        {shapes.map(({ shape, isHollow, text }) => (
          <li key={text} className="inline-flex items-center gap-1.5">
            <svg width="18" height="18" aria-hidden="true">
              <TimelineMark shape={shape} isHollow={isHollow} x={9} y={9} />
            </svg>
            {text}
          </li>
        ))}
      </ul>
    </div>
  );
}

const labelY = (level: number): number => AXIS_Y - 18 - level * LEVEL_PX;
const anchorAt = (at: number, widthPx: number) => (at < 40 ? 'start' : at > widthPx - 40 ? 'end' : 'middle');

type Shown = ReturnType<ReturnType<typeof useTip>['on']>;

/** A mark is opened as a link is: by Enter too. */
function hoverAndKeys(shown: Shown, open: () => void): Shown {
  return {
    ...shown,
    onKeyDown: (event) => {
      if (event.key === 'Enter') open();
      else shown.onKeyDown(event);
    },
  };
}
