import { dateOf } from './calendar';

export type Season = 'mowing' | 'snow' | 'allYear';

/** Share of a year's use that falls in each month, January first, before scaling to a year. */
const MONTH_WEIGHTS: Record<Season, readonly number[]> = {
  mowing: [0.02, 0.03, 0.55, 1.3, 1.8, 1.6, 1.3, 1.2, 1.1, 0.8, 0.35, 0.05],
  snow: [1.9, 1.6, 0.8, 0.08, 0, 0, 0, 0, 0, 0.05, 0.6, 1.7],
  allYear: [0.4, 0.4, 0.8, 1.1, 1.4, 1.2, 1.1, 1.1, 1.1, 1, 0.8, 0.6],
};

/** How a year's operating hours are spread over the calendar, as a clock that can be read both ways. */
export interface SeasonClock {
  /** Years of use between two days. */
  yearsBetween(fromDay: number, toDay: number): number;
  /** The day by which so many years of use are done after `fromDay`; past the horizon, Infinity. */
  dayAfter(fromDay: number, years: number): number;
}

export function seasonClock(season: Season, firstDay: number, lastDay: number): SeasonClock {
  const weights = MONTH_WEIGHTS[season];
  const yearTotal = (weights.reduce((sum, weight) => sum + weight, 0) * 365.25) / 12;
  const done = new Float64Array(lastDay - firstDay + 2);
  for (let index = 1; index < done.length; index += 1) {
    const month = Number(dateOf(firstDay + index - 1).slice(5, 7)) - 1;
    done[index] = (done[index - 1] ?? 0) + (weights[month] ?? 0) / yearTotal;
  }
  const at = (day: number): number => done[Math.min(Math.max(day - firstDay, 0), done.length - 1)] ?? 0;
  return {
    yearsBetween: (fromDay, toDay) => at(toDay) - at(fromDay),
    dayAfter: (fromDay, years) => {
      const target = at(fromDay) + years;
      if (target > (done[done.length - 1] ?? 0)) return Infinity;
      let low = fromDay - firstDay;
      let high = done.length - 1;
      while (low < high) {
        const middle = (low + high) >> 1;
        if ((done[middle] ?? 0) >= target) high = middle;
        else low = middle + 1;
      }
      return firstDay + low;
    },
  };
}
