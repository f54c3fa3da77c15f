import { Link } from 'react-router';
import { layOutFlows, type FlowNode, type FlowSize } from './flow-layout';
import type { Tip } from './tip';
import { useTip } from './use-tip';
import { useWidth } from './use-width';

export type CascadeFlow = FlowSize & {
  id: string;
  href: string;
  /** 0 to 1; darker is stronger. */
  strength: number;
  /** Read out in place of the ribbon. */
  label: string;
  tip: Tip;
};

export type CascadeChartProps = {
  flows: readonly CascadeFlow[];
  leftNote: (name: string, total: number) => string;
  rightNote: (name: string, total: number) => string;
  label: string;
};

const BAR_PX = 5;
const TOP_PX = 6;
const PX_PER_LETTER = 6.7;

/** What leads to what: causes left, what they take with them right; each ribbon is a link with its counts. */
export function CascadeChart({ flows, leftNote, rightNote, label }: CascadeChartProps) {
  const [ref, widthPx] = useWidth(560);
  const { on, card } = useTip(widthPx);
  const { left, right, ribbons, height } = layOutFlows(flows);
  const namePx = Math.min(150, widthPx * 0.33);
  const leftX = namePx + 8;
  const rightX = widthPx - namePx - 8;
  const middle = (leftX + rightX) / 2;
  return (
    <div ref={ref} className="relative">
      <svg width={widthPx} height={height + 2 * TOP_PX} role="group" aria-label={label} className="text-xs">
        <g transform={`translate(0 ${TOP_PX})`}>
          {ribbons.map(({ flow, fromY, toY, thickness }) => {
            const [x1, x2] = [leftX + BAR_PX, rightX - BAR_PX];
            const shape =
              `M${x1} ${fromY}C${middle} ${fromY} ${middle} ${toY} ${x2} ${toY}v${thickness}` +
              `C${middle} ${toY + thickness} ${middle} ${fromY + thickness} ${x1} ${fromY + thickness}Z`;
            const y = (fromY + toY) / 2 + thickness / 2 + TOP_PX + 10;
            return (
              <Link
                key={flow.id}
                to={flow.href}
                aria-label={flow.label}
                className="group"
                {...on({ tip: flow.tip, x: middle, y })}
              >
                <path
                  d={shape}
                  fill="var(--color-layout)"
                  fillOpacity={0.16 + 0.62 * flow.strength}
                  stroke="var(--color-layout)"
                  strokeWidth="0"
                  className="group-hover:stroke-2 group-focus-visible:stroke-2"
                />
                {/* A thin ribbon is hard to hit. */}
                <path
                  d={shape}
                  fill="none"
                  stroke="transparent"
                  strokeWidth={Math.max(0, 26 - thickness)}
                  pointerEvents="stroke"
                />
              </Link>
            );
          })}
          {left.map((node) => (
            <g key={node.name}>
              <rect x={leftX} y={node.y} width={BAR_PX} height={node.height} fill="var(--color-ink)" />
              <NodeName
                node={node}
                note={leftNote(node.name, node.total)}
                x={leftX - 8}
                anchor="end"
                roomPx={namePx}
              />
            </g>
          ))}
          {right.map((node) => (
            <g key={node.name}>
              <rect
                x={rightX - BAR_PX}
                y={node.y}
                width={BAR_PX}
                height={node.height}
                fill="var(--color-oxide)"
              />
              <NodeName
                node={node}
                note={rightNote(node.name, node.total)}
                x={rightX + 8}
                anchor="start"
                roomPx={namePx}
              />
            </g>
          ))}
        </g>
      </svg>
      {card}
    </div>
  );
}

type NameProps = { node: FlowNode; note: string; x: number; anchor: 'start' | 'end'; roomPx: number };

function NodeName({ node, note, x, anchor, roomPx }: NameProps) {
  const lines = inLines(node.name, Math.floor(roomPx / PX_PER_LETTER));
  const top = node.y + node.height / 2 - lines.length * 8 + 4;
  return (
    <text textAnchor={anchor} fill="var(--color-ink)" className="font-label">
      {lines.map((line, index) => (
        <tspan key={line} x={x} y={top + index * 15}>
          {line}
        </tspan>
      ))}
      <tspan x={x} y={top + lines.length * 15} fill="var(--color-dim)" className="font-text">
        {note}
      </tspan>
    </text>
  );
}

/** At most two lines, broken at a space. */
function inLines(text: string, most: number): string[] {
  if (text.length <= most) return [text];
  const words = text.split(' ');
  let first = words.shift() ?? '';
  while (words[0] !== undefined && `${first} ${words[0]}`.length <= most) first += ` ${words.shift()}`;
  const rest = words.join(' ');
  if (rest === '') return [first];
  return [first, rest.length <= most + 2 ? rest : `${rest.slice(0, most)}…`];
}
