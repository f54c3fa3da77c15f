/** A year of use: full in season, `winterUse` of it from November to March. Days are counted from 1 January. */
export type Usage = { hoursAt: (day: number) => number; dayAt: (hours: number) => number };

const YEAR = 365;
const seasonal = (winterUse: number) => (day: number) => {
  const dayOfYear = day % YEAR;
  return dayOfYear < 90 || dayOfYear >= 305 ? winterUse : 1;
};

/** Share-of-year clock up to `days`, made once a shop and scaled by each unit's hours a year. */
export const yearClock = (days: number, winterUse: number): Float64Array => {
  const weight = seasonal(winterUse);
  const perYear = Array.from({ length: YEAR }, (_, day) => weight(day)).reduce((sum, w) => sum + w, 0);
  const clock = new Float64Array(days + 1);
  for (let day = 0; day < days; day += 1) clock[day + 1] = (clock[day] ?? 0) + weight(day) / perYear;
  return clock;
};

export const unitUsage = (clock: Float64Array, startDay: number, hoursPerYear: number): Usage => {
  const origin = clock[startDay] ?? 0;
  const hoursAt = (day: number) => ((clock[Math.min(day, clock.length - 1)] ?? 0) - origin) * hoursPerYear;
  const dayAt = (hours: number) => {
    const target = origin + hours / hoursPerYear;
    let low = startDay;
    let high = clock.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if ((clock[middle] ?? Infinity) >= target) high = middle;
      else low = middle + 1;
    }
    return low;
  };
  return { hoursAt, dayAt };
};
