import type { Mapping } from '../../shared/imports';

export type DateFormat = NonNullable<Mapping['dateFormat']>;

const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];
const EARLIEST_YEAR = 1950;

type Order = readonly ('y' | 'm' | 'd' | 'name')[];
const SHAPES: Record<DateFormat, { pattern: RegExp; order: Order }> = {
  'yyyy-MM-dd': { pattern: /^(\d{4})-(\d{1,2})-(\d{1,2})$/, order: ['y', 'm', 'd'] },
  'M/d/yyyy': { pattern: /^(\d{1,2})\/(\d{1,2})\/(\d{4}|\d{2})$/, order: ['m', 'd', 'y'] },
  'd/M/yyyy': { pattern: /^(\d{1,2})\/(\d{1,2})\/(\d{4}|\d{2})$/, order: ['d', 'm', 'y'] },
  'd.M.yyyy': { pattern: /^(\d{1,2})\.\s?(\d{1,2})\.\s?(\d{4}|\d{2})$/, order: ['d', 'm', 'y'] },
  'M-d-yyyy': { pattern: /^(\d{1,2})-(\d{1,2})-(\d{4}|\d{2})$/, order: ['m', 'd', 'y'] },
  'd-M-yyyy': { pattern: /^(\d{1,2})-(\d{1,2})-(\d{4}|\d{2})$/, order: ['d', 'm', 'y'] },
  'yyyy/M/d': { pattern: /^(\d{4})\/(\d{1,2})\/(\d{1,2})$/, order: ['y', 'm', 'd'] },
  yyyyMMdd: { pattern: /^(\d{4})(\d{2})(\d{2})$/, order: ['y', 'm', 'd'] },
  'd-MMM-yyyy': {
    pattern: /^(\d{1,2})[- ]([a-z]{3})[a-z]*\.?[- ](\d{4}|\d{2})$/i,
    order: ['d', 'name', 'y'],
  },
  'MMM d, yyyy': { pattern: /^([a-z]{3})[a-z]*\.? (\d{1,2}),? (\d{4}|\d{2})$/i, order: ['name', 'd', 'y'] },
};
const WITH_TIME = /[T ]\d{1,2}:\d{2}(:\d{2}(\.\d+)?)?( ?[ap]m)?(Z|[+-]\d{2}:?\d{2})?$/i;

/**
 * The day that a cell states in a format, as `yyyy-MM-dd`; undefined where it is not a day of the calendar. ISO 8601
 * is always understood beside the format, since it can mean nothing else; a time of day is left off.
 */
export function parseDay(text: string, dateFormat: DateFormat): string | undefined {
  if (text.length === 10 && text.charCodeAt(4) === 45) return isoDay(text);
  const bare = text.replace(WITH_TIME, '');
  return inFormat(bare, dateFormat) ?? inFormat(bare, 'yyyy-MM-dd');
}

function inFormat(text: string, dateFormat: DateFormat): string | undefined {
  const { pattern, order } = SHAPES[dateFormat];
  const found = pattern.exec(text);
  if (!found) return undefined;
  let [year, month, day] = [0, 0, 0];
  order.forEach((part, at) => {
    const piece = found[at + 1] ?? '';
    if (part === 'y') year = piece.length === 2 ? fullYear(Number(piece)) : Number(piece);
    else if (part === 'm') month = Number(piece);
    else if (part === 'name') month = MONTHS.indexOf(piece.toLowerCase()) + 1;
    else day = Number(piece);
  });
  return isoDay(`${year}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`);
}

/** Two digits: 70 and above are of the last century. */
const fullYear = (short: number): number => (short >= 70 ? 1900 : 2000) + short;

const DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];

function isoDay(text: string): string | undefined {
  if (!/^\d{4}-\d\d-\d\d$/.test(text)) return undefined;
  const year = Number(text.slice(0, 4));
  const month = Number(text.slice(5, 7));
  const day = Number(text.slice(8));
  const isLeap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  const length = month === 2 && isLeap ? 29 : (DAYS[month - 1] ?? 0);
  return day >= 1 && day <= length ? text : undefined;
}

/** What is wrong with a day of the past: `tooEarly`, `future`, or nothing. */
export function dayFault(day: string, lastDay: string): 'tooEarly' | 'future' | undefined {
  if (Number(day.slice(0, 4)) < EARLIEST_YEAR) return 'tooEarly';
  return day > lastDay ? 'future' : undefined;
}

/** The day after a day. */
export function dayAfter(day: string): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + 86_400_000).toISOString().slice(0, 10);
}
