/** Narrow and unbreakable, so that a figure never parts from its unit at the end of a line. */
const THIN = '\u202f';
const DASH = '\u2013';
const NONE = '\u2013';

type Limits = { lower: number | null; upper: number | null };
export type Formats = ReturnType<typeof formatsFor>;

/** How this shop writes figures: made once for a locale, currency and zone. */
export function formatsFor(shop: { locale: string; currency: string; timeZone: string }) {
  const { locale, currency, timeZone } = shop;
  const plain = (digits: number) =>
    new Intl.NumberFormat(locale, { minimumFractionDigits: digits, maximumFractionDigits: digits });
  const fixed = [plain(0), plain(1), plain(2), plain(3)] as const;
  const number = (value: number, digits: 0 | 1 | 2 | 3 = 0) => fixed[digits].format(value);
  const money = new Intl.NumberFormat(locale, { style: 'currency', currency });
  const wholeMoney = new Intl.NumberFormat(locale, { style: 'currency', currency, maximumFractionDigits: 0 });
  const minorUnits = 10 ** (money.resolvedOptions().maximumFractionDigits ?? 2);
  // A business date has no zone: it is read and written as if the world were on UTC.
  const dayText = new Intl.DateTimeFormat(locale, { dateStyle: 'medium', timeZone: 'UTC' });
  const monthText = new Intl.DateTimeFormat(locale, { month: 'long', year: 'numeric', timeZone: 'UTC' });
  const monthName = new Intl.DateTimeFormat(locale, { month: 'long', timeZone: 'UTC' });
  const monthLetter = new Intl.DateTimeFormat(locale, { month: 'narrow', timeZone: 'UTC' });
  const instantText = new Intl.DateTimeFormat(locale, { dateStyle: 'medium', timeStyle: 'short', timeZone });

  const percentNumber = (share: number, digits: 0 | 1 | 2) => number(share * 100, digits);
  const bounds = ({ lower, upper }: Limits, write: (value: number) => string) =>
    `${lower === null ? '0' : write(lower)}${DASH}${upper === null ? '∞' : write(upper)}`;

  return {
    number,
    count: (value: number) => number(value),
    /** "1 repair", "1,204 repairs" */
    counted: (value: number, one: string, many = `${one}s`) => `${number(value)} ${value === 1 ? one : many}`,
    /** "9.4 %" */
    percent: (share: number | null, digits: 0 | 1 | 2 = 1) =>
      share === null ? NONE : `${percentNumber(share, digits)}${THIN}%`,
    /** "6.2–14.1 %" */
    percentRange: (limits: Limits, digits: 0 | 1 | 2 = 1) =>
      `${bounds(limits, (value) => percentNumber(value, digits))}${THIN}%`,
    /** "214.0 h" */
    hours: (hours: number | null, digits: 0 | 1 = 1) =>
      hours === null ? NONE : `${number(hours, digits)}${THIN}h`,
    hoursRange: (limits: Limits, digits: 0 | 1 = 0) =>
      `${bounds(limits, (value) => number(value, digits))}${THIN}h`,
    /** "34 days" */
    days: (days: number | null) =>
      days === null ? NONE : `${number(Math.round(days))} ${Math.round(days) === 1 ? 'day' : 'days'}`,
    range: (limits: Limits, digits: 0 | 1 | 2 | 3 = 1) => bounds(limits, (value) => number(value, digits)),
    /** "$1,204.50" */
    money: (cents: number | null) => (cents === null ? NONE : money.format(cents / minorUnits)),
    /** "$1,205": where cents would only be noise. */
    wholeMoney: (cents: number | null) => (cents === null ? NONE : wholeMoney.format(cents / minorUnits)),
    /** 'YYYY-MM-DD' → "Apr 3, 2026" */
    day: (day: string | null) => (day === null ? NONE : dayText.format(utcDay(day))),
    /** 'YYYY-MM' → "April 2026" */
    month: (month: string) => monthText.format(utcDay(`${month}-01`)),
    monthName: (month: string) => monthName.format(utcDay(`${month}-01`)),
    monthLetter: (month: string) => monthLetter.format(utcDay(`${month}-01`)),
    /** An instant in the shop's zone. */
    instant: (instant: string | null) => (instant === null ? NONE : instantText.format(new Date(instant))),
  };
}

function utcDay(day: string): Date {
  const date = new Date(`${day}T00:00:00Z`);
  if (Number.isNaN(date.getTime())) throw new Error(`utcDay requires a date as YYYY-MM-DD, got "${day}"`);
  return date;
}
