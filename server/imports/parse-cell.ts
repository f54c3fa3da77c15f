import type { ColumnType } from './columns';
import { dayFault, parseDay, type DateFormat } from './parse-date';
import { parseDecimal, toCents, type Decimal } from './parse-number';
import { parseWord, WORDS } from './parse-word';

export type Fault = { column: string | null; value: string | null; message: string; mend: string };

export type CellRules = {
  decimal: Decimal;
  dateFormat: DateFormat;
  /** The last day that a record may state: the shop's today and one for the time zone. */
  lastDay: string;
};

/** A value as the database takes it, or what is wrong with it and how it is mended. */
export type Parsed = { value: string | null } | { fault: Pick<Fault, 'message' | 'mend'> };

export const LONGEST: Partial<Record<ColumnType, number>> = { text: 200, line: 2000, longText: 20_000 };
const MOST_HOURS = 1_000_000;
const MOST_QUANTITY = 1_000_000;
export const MOST_CENTS = 2_000_000_000;
const MOST_DAYS = 36_500;
// Below space, what is not a tab or a kind of line end.
const CONTROL = /(?![\t\n\v\f\r\u007f-\u009f])\p{Cc}/u;
const NO_VALUE = { value: null } as const;

const wrong = (message: string, mend: string): Parsed => ({ fault: { message, mend } });

/** Reads one cell by its column's type. Texts stay as they stand; an empty cell is null. */
export function parseCell(cell: string, type: ColumnType, rules: CellRules): Parsed {
  const longest = LONGEST[type];
  if (longest !== undefined) return parseText(cell, longest);
  const text = cell.trim();
  if (text === '') return NO_VALUE;
  if (text.length > 200)
    return wrong(
      'is far too long for this column',
      'Check that quote marks and delimiters stand where they should.',
    );
  switch (type) {
    case 'date':
      return parseDate(text, rules);
    case 'hours':
      return parseBounded(text, rules.decimal, 0, MOST_HOURS, 'hours');
    case 'quantity':
      return parseBounded(text, rules.decimal, -MOST_QUANTITY, MOST_QUANTITY, 'a number');
    case 'money':
      return parseMoney(text, rules.decimal);
    case 'days':
      return parseDays(text);
    default: {
      const word = parseWord(text, type);
      return word
        ? { value: word }
        : wrong(
            'is not a word that is known here',
            `Use one of: ${(WORDS[type] ?? []).join(', ')}; or leave it empty.`,
          );
    }
  }
}

export function parseText(cell: string, longest: number): Parsed {
  if (cell === '') return NO_VALUE;
  if (cell.length > longest)
    return wrong(
      `is longer than ${longest.toLocaleString('en-US')} characters`,
      'Shorten it, or check that every quote mark is closed.',
    );
  if (CONTROL.test(cell)) {
    return wrong(
      'holds a control character, such as NUL',
      'Take it out, or save the file again as plain text.',
    );
  }
  return cell.trim() === '' ? NO_VALUE : { value: cell };
}

function parseDate(text: string, { dateFormat, lastDay }: CellRules): Parsed {
  const day = parseDay(text, dateFormat);
  if (!day)
    return wrong(
      `is not a day written as ${dateFormat}`,
      `Write it as ${dateFormat}, or say in the mapping how the file writes dates.`,
    );
  return checkDay(day, lastDay);
}

export function checkDay(day: string, lastDay: string): Parsed {
  const fault = dayFault(day, lastDay);
  if (fault === 'future') return wrong('lies in the future', `Write a day up to ${lastDay}.`);
  if (fault === 'tooEarly') return wrong('lies before 1950', 'Write the year in full.');
  return { value: day };
}

function parseBounded(text: string, decimal: Decimal, least: number, most: number, what: string): Parsed {
  const plain = parseDecimal(text, decimal);
  if (plain === undefined) return notANumber(what, decimal);
  const number = Number(plain);
  if (number < least || number > most) {
    return wrong(
      `is outside ${least.toLocaleString('en-US')} to ${most.toLocaleString('en-US')}`,
      'Correct it, or leave it empty.',
    );
  }
  return { value: plain };
}

function parseMoney(text: string, decimal: Decimal): Parsed {
  const plain = parseDecimal(text, decimal);
  if (plain === undefined) return notANumber('an amount', decimal);
  const cents = toCents(plain);
  return Math.abs(cents) > MOST_CENTS
    ? wrong('is larger than any amount taken here', 'Correct it, or leave it empty.')
    : { value: String(cents) };
}

function parseDays(text: string): Parsed {
  return /^\d{1,6}$/.test(text) && Number(text) <= MOST_DAYS
    ? { value: text }
    : wrong('is not a number of days', 'Write whole days, such as 90.');
}

const notANumber = (what: string, decimal: Decimal): Parsed =>
  wrong(
    `is not ${what} with decimal ${decimal === '.' ? 'point' : 'comma'}`,
    `Write it as 1234${decimal}50, or say in the mapping that the file writes a decimal ${decimal === '.' ? 'comma' : 'point'}.`,
  );
