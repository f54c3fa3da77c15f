import type { Catalog } from './catalog';
import { createCatalog } from './catalog';
import type { Season, SeasonClock } from './season';
import { seasonClock } from './season';

export interface World {
  seed: number;
  /** First day of the records. */
  firstDay: number;
  asOfDay: number;
  clocks: Record<Season, SeasonClock>;
  catalog: Catalog;
  yearsAgo(day: number): number;
}

export function createWorld(seed: number, asOfDay: number, firstDay: number): World {
  const clock = (season: Season): SeasonClock => seasonClock(season, firstDay - 1000, asOfDay + 120);
  return {
    seed,
    firstDay,
    asOfDay,
    clocks: { mowing: clock('mowing'), snow: clock('snow'), allYear: clock('allYear') },
    catalog: createCatalog(Math.round((firstDay + asOfDay) / 2)),
    yearsAgo: (day) => Math.max(0, asOfDay - day) / 365.25,
  };
}
