import type { Histories, ModelHistory, UnitHistory } from './histories';

/** Age of a unit at a day, on the clock that the shop's records allow. */
export type UnitClock = (day: number) => number;

type Point = { day: number; hours: number };

/** Longest non-decreasing run of readings: a mistyped or restarted meter drops out, not all that follows it. */
const trusted = (points: readonly Point[]): Point[] => {
  const length: number[] = [];
  const previous: number[] = [];
  let best = -1;
  points.forEach((point, at) => {
    let longest = 0;
    let from = -1;
    for (let before = Math.max(0, at - 40); before < at; before += 1) {
      if ((points[before]?.hours ?? Infinity) > point.hours) continue;
      if ((length[before] ?? 0) > longest) {
        longest = length[before] ?? 0;
        from = before;
      }
    }
    length.push(longest + 1);
    previous.push(from);
    if (best < 0 || longest + 1 > (length[best] ?? 0)) best = at;
  });
  const kept: Point[] = [];
  for (let at = best; at >= 0; at = previous[at] ?? -1) {
    const point = points[at];
    if (point) kept.push(point);
  }
  return kept.reverse();
};

const readings = (unit: UnitHistory): Point[] => {
  const points: Point[] = [];
  if (unit.fromHours !== null) points.push({ day: unit.fromDay, hours: unit.fromHours });
  for (const { day, hours } of unit.occasions) if (hours !== null) points.push({ day, hours });
  if (unit.toHours !== null) points.push({ day: unit.toDay, hours: unit.toHours });
  return trusted(points);
};

const rateOf = (lists: readonly Point[][]): number => {
  let hours = 0;
  let days = 0;
  for (const points of lists) {
    const first = points[0];
    const last = points.at(-1);
    if (!first || !last) continue;
    hours += last.hours - first.hours;
    days += last.day - first.day;
  }
  return days > 0 && hours > 0 ? hours / days : 0;
};

/** Hours by straight lines between readings, at the model's mean rate outside of them. */
const hourClock = (unit: UnitHistory, points: readonly Point[], rate: number): UnitClock => {
  const first = points[0];
  const last = points.at(-1);
  if (!first || !last) return (day) => (day - unit.fromDay) * rate;
  const origin = Math.max(0, first.hours - rate * (first.day - unit.fromDay));
  const anchored: readonly Point[] =
    first.day > unit.fromDay ? [{ day: unit.fromDay, hours: origin }, ...points] : points;
  return (day) => {
    if (day >= last.day) return last.hours + rate * (day - last.day);
    for (let at = anchored.length - 2; at >= 0; at -= 1) {
      const low = anchored[at];
      const high = anchored[at + 1];
      if (!low || !high || day < low.day || high.day === low.day) continue;
      return low.hours + ((high.hours - low.hours) * (day - low.day)) / (high.day - low.day);
    }
    return Math.max(0, (anchored[0]?.hours ?? 0) - rate * ((anchored[0]?.day ?? day) - day));
  };
};

const HOURS_FLOOR = 0.6;

/** Hours where at least 60 % of the visits were read, else calendar days: never a mixture of the two. */
export const chooseClock = (histories: Histories): 'hours' | 'days' => {
  let read = 0;
  let all = 0;
  for (const { units } of histories.models)
    for (const { occasions } of units)
      for (const { hours } of occasions) {
        all += 1;
        if (hours !== null) read += 1;
      }
  return all > 0 && read >= HOURS_FLOOR * all ? 'hours' : 'days';
};

export const unitClocks = (model: ModelHistory, clock: 'hours' | 'days'): UnitClock[] => {
  if (clock === 'days') return model.units.map((unit) => (day: number) => day - unit.fromDay);
  const points = model.units.map(readings);
  const rate = rateOf(points);
  return model.units.map((unit, at) => hourClock(unit, points[at] ?? [], rate));
};
