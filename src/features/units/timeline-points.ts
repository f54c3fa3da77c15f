import type { UnitEvent } from '../../../shared/machines';

const DAY_MS = 86_400_000;
export const dayOf = (on: string): number => Math.round(Date.parse(`${on}T00:00:00Z`) / DAY_MS);

export type TimelinePoint = {
  event: UnitEvent;
  /** Where it stands, in hours or days; `isPlaced` false where that is only reckoned from its neighbors. */
  at: number;
  isPlaced: boolean;
  /** The meter began anew before this reading, and what it showed last is not known. */
  isRestart: boolean;
};

export type Timeline = { points: TimelinePoint[]; start: number; end: number };

/** Stops by calendar day. */
export function byDays(events: readonly UnitEvent[], inServiceOn: string | null): Timeline {
  const restarts = restartsOf(events);
  const points = events.map((event, index) => ({
    event,
    at: dayOf(event.on),
    isPlaced: true,
    isRestart: restarts.has(index),
  }));
  const first = points[0]?.at ?? 0;
  const start = inServiceOn === null ? first : Math.min(first, dayOf(inServiceOn));
  return { points, start, end: Math.max(points.at(-1)?.at ?? start, start + 1) };
}

/**
 * Stops by hours run, or null where fewer than two readings can be used. A meter that restarted unrecorded goes on from
 * where the old one was last read; a stop without a usable reading stands between its neighbors, by its day.
 */
export function byHours(events: readonly UnitEvent[]): Timeline | null {
  const restarts = restartsOf(events);
  let before = 0;
  let last = 0;
  const known = events.map((event, index) => {
    if (event.cumulativeHours === null) return null;
    if (restarts.has(index)) before = last;
    last = before + event.cumulativeHours;
    return last;
  });
  const readings = known.filter((at) => at !== null);
  if (readings.length < 2) return null;
  const points = events.map((event, index) => ({
    event,
    at: known[index] ?? between(events, known, index),
    isPlaced: known[index] !== null,
    isRestart: restarts.has(index),
  }));
  return { points, start: 0, end: Math.max(...readings, 1) };
}

/** Where the running total falls, a meter that nobody read out was replaced. */
function restartsOf(events: readonly UnitEvent[]): ReadonlySet<number> {
  const restarts = new Set<number>();
  let last: number | null = null;
  events.forEach(({ cumulativeHours }, index) => {
    if (cumulativeHours === null) return;
    if (last !== null && cumulativeHours < last) restarts.add(index);
    last = cumulativeHours;
  });
  return restarts;
}

function between(events: readonly UnitEvent[], known: readonly (number | null)[], index: number): number {
  const before = known.findLastIndex((at, other) => at !== null && other < index);
  const after = known.findIndex((at, other) => at !== null && other > index);
  const low = known[before] ?? null;
  const high = known[after] ?? null;
  if (low === null) return high ?? 0;
  if (high === null) return low;
  const [from, here, to] = [events[before], events[index], events[after]].map((event) =>
    dayOf(event?.on ?? ''),
  );
  if (from === undefined || here === undefined || to === undefined || to === from) return low;
  return low + ((high - low) * (here - from)) / (to - from);
}
