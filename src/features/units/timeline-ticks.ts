import type { Formats } from '../../lib/format';
import { dayOf } from './timeline-points';

type Tick = { at: number; text: string };
const STEPS = [10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10_000] as const;

/** Four to eight round hours, from nought. */
export function hourTicks(end: number, formats: Formats): Tick[] {
  const step = STEPS.find((one) => end / one <= 6) ?? 20_000;
  return Array.from({ length: Math.floor(end / step) + 1 }, (_, index) => ({
    at: index * step,
    text: index === 0 ? '0' : formats.hours(index * step, 0),
  }));
}

/** The first day of each year, or of each quarter where there is but one year. */
export function dayTicks(start: number, end: number): Tick[] {
  const firstYear = new Date(start * 86_400_000).getUTCFullYear();
  const lastYear = new Date(end * 86_400_000).getUTCFullYear();
  const isShort = end - start < 550;
  const ticks: Tick[] = [];
  for (let year = firstYear; year <= lastYear; year += 1) {
    for (const month of isShort ? ['01', '04', '07', '10'] : ['01']) {
      const at = dayOf(`${year}-${month}-01`);
      if (at >= start && at <= end) ticks.push({ at, text: isShort ? `${year}-${month}` : String(year) });
    }
  }
  return ticks;
}
