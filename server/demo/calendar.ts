const MS_PER_DAY = 86_400_000;

/** Days since 1970-01-01 of a business date. */
export function dayOf(date: string): number {
  const ms = Date.parse(`${date}T00:00:00Z`);
  if (!/^\d{4}-\d{2}-\d{2}$/.test(date) || Number.isNaN(ms))
    throw new Error(`dayOf requires a date, got ${date}`);
  return Math.round(ms / MS_PER_DAY);
}

const known = new Map<number, string>();

export function dateOf(day: number): string {
  let date = known.get(day);
  if (date === undefined) {
    date = new Date(day * MS_PER_DAY).toISOString().slice(0, 10);
    known.set(day, date);
  }
  return date;
}

export const monthOf = (day: number): string => dateOf(day).slice(0, 7);

/** The shop is shut on Sundays: the next day on which somebody is there. */
export const openDay = (day: number): number => ((day + 4) % 7 === 0 ? day + 1 : day);

/** First and last day of the latest whole month that ended at least `matureDays` before `asOfDay`. */
export function latestMatureMonth(
  asOfDay: number,
  matureDays: number,
): { firstDay: number; lastDay: number } {
  const limit = new Date((asOfDay - matureDays + 1) * MS_PER_DAY);
  const lastDay = Math.round(Date.UTC(limit.getUTCFullYear(), limit.getUTCMonth(), 0) / MS_PER_DAY);
  const last = new Date(lastDay * MS_PER_DAY);
  return { firstDay: lastDay - last.getUTCDate() + 1, lastDay };
}
