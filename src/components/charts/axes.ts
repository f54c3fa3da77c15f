/** The look that every chart's axes and grid share. */
const TICK = { fill: 'var(--color-dim)', fontSize: 12 } as const;

export const X_AXIS = {
  tick: TICK,
  tickLine: false,
  axisLine: { stroke: 'var(--color-rule)' },
  tickMargin: 6,
} as const;

export const Y_AXIS = {
  tick: TICK,
  tickLine: false,
  axisLine: false,
  tickMargin: 4,
  width: 44,
} as const;

export const GRID = { stroke: 'var(--color-rule)', strokeWidth: 0.7, vertical: false } as const;

/** Room for axis labels below and direct labels on the right. */
export const MARGIN = { top: 10, right: 8, bottom: 4, left: 0 } as const;

/** Round steps for a scale of shares that reaches at least `highest`. */
export function shareTicks(highest: number): number[] {
  const step = highest > 0.6 ? 0.2 : highest > 0.26 ? 0.1 : highest > 0.1 ? 0.05 : 0.02;
  const steps = Math.max(1, Math.ceil(Math.min(highest, 1) / step - 1e-9));
  return Array.from({ length: steps + 1 }, (_, index) => Math.round(index * step * 100) / 100);
}
