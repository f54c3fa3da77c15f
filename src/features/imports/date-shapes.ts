import type { FilePreview } from '../../../shared/imports';

export type DateFormat = NonNullable<FilePreview['dateFormat']>;

const MONTH = '(?:0?[1-9]|1[0-2])';
const DAY = '(?:0?[1-9]|[12]\\d|3[01])';
const LONG_YEAR = '\\d{4}';
const YEAR = '(?:\\d{4}|\\d{2})';
const NAME = '[A-Za-z]{3,9}\\.?';
/** A time of day may stand behind. */
const REST = '(?:[T ].*)?$';

const shape = (pattern: string) => new RegExp(`^${pattern}${REST}`);

/** Each way of writing a day, with an example for those who do not read patterns. */
export const DATE_SHAPES: Record<DateFormat, { pattern: RegExp; words: string }> = {
  'yyyy-MM-dd': { pattern: shape(`${LONG_YEAR}-${MONTH}-${DAY}`), words: 'year-month-day, 2026-04-28' },
  'M/d/yyyy': { pattern: shape(`${MONTH}/${DAY}/${YEAR}`), words: 'month/day/year, 4/28/2026' },
  'd/M/yyyy': { pattern: shape(`${DAY}/${MONTH}/${YEAR}`), words: 'day/month/year, 28/4/2026' },
  'd.M.yyyy': { pattern: shape(`${DAY}\\.${MONTH}\\.${YEAR}`), words: 'day.month.year, 28.4.2026' },
  'M-d-yyyy': { pattern: shape(`${MONTH}-${DAY}-${YEAR}`), words: 'month-day-year, 4-28-2026' },
  'd-M-yyyy': { pattern: shape(`${DAY}-${MONTH}-${YEAR}`), words: 'day-month-year, 28-4-2026' },
  'yyyy/M/d': { pattern: shape(`${LONG_YEAR}/${MONTH}/${DAY}`), words: 'year/month/day, 2026/4/28' },
  yyyyMMdd: { pattern: shape('\\d{8}'), words: 'eight digits, 20260428' },
  'd-MMM-yyyy': { pattern: shape(`${DAY}[- ]${NAME}[- ]${YEAR}`), words: 'day-name-year, 28-Apr-2026' },
  'MMM d, yyyy': { pattern: shape(`${NAME} ${DAY},? ${YEAR}`), words: 'name day, year, Apr 28, 2026' },
};

const FORMATS = Object.keys(DATE_SHAPES) as DateFormat[];

export const isDateFormat = (value: string): value is DateFormat => value in DATE_SHAPES;

/** The ways in which most of these are written, so that one slip does not hide it; every way where they fit none. */
export function formatsFor(samples: readonly string[]): DateFormat[] {
  const fitting = (format: DateFormat) =>
    samples.filter((sample) => DATE_SHAPES[format].pattern.test(sample.trim())).length;
  const most = Math.max(...FORMATS.map(fitting));
  return most === 0 ? FORMATS : FORMATS.filter((format) => fitting(format) === most);
}

/** The server reads year-month-day beside whatever is said, since it can mean nothing else. */
export const areWritten = (samples: readonly string[], format: DateFormat): boolean =>
  samples.every((sample) =>
    [format, 'yyyy-MM-dd' as const].some((one) => DATE_SHAPES[one].pattern.test(sample.trim())),
  );
