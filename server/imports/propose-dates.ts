import { DATE_FORMATS } from '../../shared/imports';
import { parseDay, type DateFormat } from './parse-date';

export type DateProposal = { dateFormat: DateFormat | null; reason: string };

const AMBIGUOUS: readonly (readonly [DateFormat, DateFormat])[] = [
  ['M/d/yyyy', 'd/M/yyyy'],
  ['M-d-yyyy', 'd-M-yyyy'],
];

/** How a file writes its dates, from samples of its date columns; day and month are never guessed apart. */
export function proposeDateFormat(samples: readonly string[]): DateProposal {
  const days = samples.map((sample) => sample.trim()).filter((sample) => sample !== '');
  if (days.length === 0)
    return { dateFormat: 'yyyy-MM-dd', reason: 'No dates were found in the first rows.' };
  const fitting = DATE_FORMATS.filter((format) => days.every((day) => parseDay(day, format) !== undefined));
  if (fitting.includes('yyyy-MM-dd'))
    return { dateFormat: 'yyyy-MM-dd', reason: `Dates such as ${days[0]} are year, month, day.` };
  const pair = AMBIGUOUS.find((formats) => formats.every((format) => fitting.includes(format)));
  if (pair) {
    return {
      dateFormat: null,
      reason: `Dates such as ${days[0]} can be read as ${pair[0]} or as ${pair[1]}: no day above 12 tells them apart. Say which it is.`,
    };
  }
  const [only] = fitting;
  if (!only)
    return {
      dateFormat: null,
      reason: `Dates such as ${days[0]} are written in no way that is known here, or in several.`,
    };
  const telling = days.find(
    (day) => AMBIGUOUS.flat().includes(only) && /\b(1[3-9]|2\d|3[01])\b/.test(day.slice(0, 5)),
  );
  return {
    dateFormat: only,
    reason: telling
      ? `${telling} can only be read as ${only}.`
      : `Dates such as ${days[0]} are written as ${only}.`,
  };
}
