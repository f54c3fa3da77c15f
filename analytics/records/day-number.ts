import { requireThat } from '../requirement';

const MILLISECONDS_A_DAY = 86_400_000;
const DAY = /^\d{4}-\d{2}-\d{2}$/;

/**
 * Days since 1970-01-01 of a business date; `dayNumber('2024-03-01')` is 19783.
 *
 * @throws {RequirementError} unless the text is a day of the calendar as YYYY-MM-DD
 */
export function dayNumber(date: string): number {
  const at = DAY.test(date) ? Date.parse(`${date}T00:00:00Z`) : NaN;
  const day = at / MILLISECONDS_A_DAY;
  requireThat(
    Number.isInteger(day) && dayText(day) === date,
    'dayNumber',
    `a date as YYYY-MM-DD, not "${date}"`,
  );
  return day;
}

/** The business date, as YYYY-MM-DD, of a day number. */
export function dayText(day: number): string {
  return new Date(day * MILLISECONDS_A_DAY).toISOString().slice(0, 10);
}

/** The month, as YYYY-MM, that a day lies in. */
export function monthOf(day: number): string {
  return dayText(day).slice(0, 7);
}

/** First and last day of a month written as YYYY-MM. */
export function monthBounds(month: string): { firstDay: number; lastDay: number } {
  const firstDay = dayNumber(`${month}-01`);
  return { firstDay, lastDay: dayNumber(`${monthAfter(month)}-01`) - 1 };
}

/** The month that follows; `monthAfter('2025-12')` is '2026-01'. */
export function monthAfter(month: string): string {
  return monthOf(dayNumber(`${month}-01`) + 31);
}

/** The month before; `monthBefore('2026-01')` is '2025-12'. */
export function monthBefore(month: string): string {
  return monthOf(dayNumber(`${month}-01`) - 1);
}
