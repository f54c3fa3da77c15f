export type FlowSize = { from: string; to: string; size: number };
export type FlowNode = { name: string; total: number; y: number; height: number };
/** Where a ribbon leaves and arrives, and how thick it is. */
export type FlowPlace<Flow> = { flow: Flow; fromY: number; toY: number; thickness: number };
export type FlowLayout<Flow> = {
  left: FlowNode[];
  right: FlowNode[];
  ribbons: FlowPlace<Flow>[];
  height: number;
};

const GAP_PX = 16;
/** Room for a name in two lines and its count. */
const LEAST_SLOT_PX = 46;
const TALLEST_PX = 110;
const THINNEST_PX = 3;

/** Two columns, the largest first, each thing on the right beside the largest that leads to it. */
export function layOutFlows<Flow extends FlowSize>(flows: readonly Flow[]): FlowLayout<Flow> {
  const leftTotals = totals(flows, 'from');
  const rightTotals = totals(flows, 'to');
  const largest = Math.max(1, ...leftTotals.values(), ...rightTotals.values());
  const perSize = TALLEST_PX / largest;
  const thicknessOf = (flow: FlowSize) => Math.max(THINNEST_PX, flow.size * perSize);
  const heightOf = (name: string, end: 'from' | 'to') =>
    flows.filter((flow) => flow[end] === name).reduce((sum, flow) => sum + thicknessOf(flow), 0);
  const left: FlowNode[] = [];
  const right: FlowNode[] = [];
  let cursor = 0;
  for (const [name, total] of bySize(leftTotals)) {
    const targets = [...flows]
      .filter(({ from, to }) => from === name && !right.some((node) => node.name === to))
      .sort((a, b) => b.size - a.size)
      .map(({ to }) => ({ name: to, total: rightTotals.get(to) ?? 0, height: heightOf(to, 'to') }));
    const height = heightOf(name, 'from');
    const rightHeight = targets.reduce((sum, target) => sum + slot(target.height) + GAP_PX, -GAP_PX);
    const group = Math.max(slot(height), rightHeight);
    left.push({ name, total, height, y: cursor + (group - height) / 2 });
    let at = cursor + (group - Math.max(rightHeight, 0)) / 2;
    for (const target of targets) {
      right.push({ ...target, y: at + (slot(target.height) - target.height) / 2 });
      at += slot(target.height) + GAP_PX;
    }
    cursor += group + GAP_PX;
  }
  return {
    left,
    right,
    ribbons: ribbonsBetween(flows, left, right, thicknessOf),
    height: Math.max(0, cursor - GAP_PX),
  };
}

const slot = (height: number) => Math.max(height, LEAST_SLOT_PX);

function totals(flows: readonly FlowSize[], end: 'from' | 'to'): Map<string, number> {
  const sums = new Map<string, number>();
  for (const flow of flows) sums.set(flow[end], (sums.get(flow[end]) ?? 0) + flow.size);
  return sums;
}

const bySize = (sums: ReadonlyMap<string, number>) =>
  [...sums].sort(([nameA, a], [nameB, b]) => b - a || nameA.localeCompare(nameB));

/** Ribbons leave and arrive in the order of the other column, so that they do not cross at a bar. */
function ribbonsBetween<Flow extends FlowSize>(
  flows: readonly Flow[],
  left: readonly FlowNode[],
  right: readonly FlowNode[],
  thicknessOf: (flow: FlowSize) => number,
): FlowPlace<Flow>[] {
  const leftAt = new Map(left.map(({ name, y }) => [name, y]));
  const rightAt = new Map(right.map(({ name, y }) => [name, y]));
  const place = (
    flow: Flow,
    own: 'from' | 'to',
    ownAt: Map<string, number>,
    otherAt: Map<string, number>,
  ) => {
    const other = own === 'from' ? 'to' : 'from';
    const before = flows.filter(
      (peer) => peer[own] === flow[own] && (otherAt.get(peer[other]) ?? 0) < (otherAt.get(flow[other]) ?? 0),
    );
    return (ownAt.get(flow[own]) ?? 0) + before.reduce((sum, peer) => sum + thicknessOf(peer), 0);
  };
  return flows.map((flow) => ({
    flow,
    fromY: place(flow, 'from', leftAt, rightAt),
    toY: place(flow, 'to', rightAt, leftAt),
    thickness: thicknessOf(flow),
  }));
}
