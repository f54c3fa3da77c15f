import type { MonthReview } from '../../../shared/reports';
import type { Formats } from '../../lib/format';

/** "April"; with its year where another April could be meant. */
export function monthInWords(review: Pick<MonthReview, 'month' | 'asOf'>, formats: Formats): string {
  if (review.month === null) return '';
  const isWithinTheYear = monthsBetween(review.month, review.asOf.slice(0, 7)) < 11;
  return isWithinTheYear ? formats.monthName(review.month) : formats.month(review.month);
}

/** The day on which the window of a month's last work is over. */
export function settledOn(month: string, windowDays: number): string {
  const [year = 0, number = 1] = month.split('-').map(Number);
  return new Date(Date.UTC(year, number, windowDays)).toISOString().slice(0, 10);
}

function monthsBetween(from: string, to: string): number {
  const [fromYear = 0, fromMonth = 0] = from.split('-').map(Number);
  const [toYear = 0, toMonth = 0] = to.split('-').map(Number);
  return (toYear - fromYear) * 12 + toMonth - fromMonth;
}
