import { REPORT_HEADERS } from './columns';

const FORMULA = /^'*[=+\-@\t\r]/;
const PLAIN_NUMBER = /^[+-]?[\d.,\s]*$/;
const GUARDED = /^'+[=+\-@\t\r]/;

/** A text that a spreadsheet would take for a formula gets an apostrophe before it; numbers stay numbers. */
export const guardCell = (cell: string): string =>
  FORMULA.test(cell) && !PLAIN_NUMBER.test(cell) ? `'${cell}` : cell;

/** Whether a file is one of our own lists of rejected rows that comes back. */
export const isReturned = (headers: readonly string[]): boolean =>
  REPORT_HEADERS.every((header) => headers.includes(header));

/** Takes off what `guardCell` put on. */
export const restoreCells = (cells: readonly string[]): string[] =>
  cells.map((cell) => (GUARDED.test(cell) ? cell.slice(1) : cell));
