import type { Formats } from './format';

type Limits = { lower: number | null; upper: number | null };
export type AgeClock = 'hours' | 'days';
export type Ages = ReturnType<typeof agesOn>;

const DAYS_PER_MONTH = 365.25 / 12;
/** A limit so many times the estimate bounds nothing that matters. */
const FAR = 20;

/** How ages are written: on the calendar clock the API counts days, and people count months. */
export function agesOn(clock: AgeClock, formats: Formats) {
  const isHours = clock === 'hours';
  const inUnit = (age: number) => (isHours ? age : age / DAYS_PER_MONTH);
  /** An estimate and its limits show the same digits. */
  const digitsFor = (age: number) => (inUnit(age) < 10 ? 1 : 0);
  return {
    unit: isHours ? 'hours' : 'months',
    inUnit,
    /** "298 h", "14 months" */
    of: (age: number): string =>
      isHours
        ? formats.hours(age, digitsFor(age))
        : `${formats.number(inUnit(age), digitsFor(age))}\u202fmonths`,
    /** "262–339", to stand after an estimate that has its unit; a limit far beyond it says no more than "or more". */
    range: ({ lower, upper }: Limits, estimate: number): string => {
      const digits = digitsFor(estimate);
      const isOpen = upper === null || upper > estimate * FAR;
      if (isOpen && lower !== null) return `${formats.number(inUnit(lower), digits)} or more`;
      const edges = {
        lower: lower === null ? null : inUnit(lower),
        upper: upper === null ? null : inUnit(upper),
      };
      return formats.range(edges, digits);
    },
    /** "298", for an axis. */
    tick: (age: number): string => {
      const shown = inUnit(age);
      return formats.number(
        shown,
        shown > 0 && shown < 10 && !Number.isInteger(Math.round(shown * 100) / 100) ? 1 : 0,
      );
    },
  };
}
