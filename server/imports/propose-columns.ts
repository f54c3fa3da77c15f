import type { FilePreview, ImportKind, Mapping } from '../../shared/imports';
import { COLUMNS, foldHeader, REPORT_HEADERS, type Column } from './columns';
import { nativeColumn } from './layout';
import { parseDay } from './parse-date';
import { parseWord, WORDS } from './parse-word';
import { DATE_FORMATS } from '../../shared/imports';

type Proposal = FilePreview['proposals'][number];
type Found = Pick<Proposal, 'column' | 'reason' | 'certainty'>;

const NOTHING: Found = {
  column: null,
  reason: 'Nothing here says what this column is; it would not be read.',
  certainty: 'none',
};
const MOST_SAMPLES = 5;

/** What each column of a file seems to be, and why; each column of ours is proposed once, to the surest claim. */
export function proposeColumns(
  kind: ImportKind,
  headers: readonly string[],
  rows: readonly (readonly string[])[],
  remembered: Mapping | undefined,
): Proposal[] {
  const contents = headers.map((_, at) =>
    rows.map((row) => row[at]?.trim() ?? '').filter((cell) => cell !== ''),
  );
  const found: Found[] = headers.map(() => NOTHING);
  const taken = new Set<string>();
  const steps: ((header: string, at: number) => Found | undefined)[] = [
    (header) =>
      isReport(header)
        ? { column: null, reason: 'Added by the list of rejected rows; not read.', certainty: 'native' }
        : undefined,
    (header) => byMemory(header, remembered),
    (header) => byName(kind, header),
    (header) => byHeaderWords(kind, header),
    (header) => byPartOfHeader(kind, header),
    (_, at) => byContent(kind, contents[at] ?? []),
  ];
  for (const step of steps) {
    headers.forEach((header, at) => {
      if (found[at] !== NOTHING) return;
      const next = step(header, at);
      if (!next || (next.column !== null && taken.has(next.column))) return;
      found[at] = next;
      if (next.column !== null) taken.add(next.column);
    });
  }
  return headers.map((header, at) => ({
    header,
    ...(found[at] ?? NOTHING),
    samples: [...new Set(contents[at])].slice(0, MOST_SAMPLES).map((cell) => cell.slice(0, 120)),
  }));
}

const isReport = (header: string): boolean => (REPORT_HEADERS as readonly string[]).includes(header);

function byMemory(header: string, remembered: Mapping | undefined): Found | undefined {
  const entry = Object.entries(remembered?.columns ?? {}).find(
    ([, theirs]) => foldHeader(theirs) === foldHeader(header),
  );
  return (
    entry && {
      column: entry[0],
      reason: 'Confirmed earlier for a file with this header row.',
      certainty: 'remembered',
    }
  );
}

function byName(kind: ImportKind, header: string): Found | undefined {
  const column = nativeColumn(kind, header);
  return (
    column && { column: column.name, reason: 'The header is this column’s own name.', certainty: 'native' }
  );
}

function byHeaderWords(kind: ImportKind, header: string): Found | undefined {
  const words = foldHeader(header);
  const column = COLUMNS[kind].find((one) => one.headers.includes(words) || foldHeader(one.label) === words);
  return (
    column && {
      column: column.name,
      reason: `“${header}” is a usual name for ${column.label.toLowerCase()}.`,
      certainty: 'likely',
    }
  );
}

/** A usual name of two words or more that stands within a longer header. */
function byPartOfHeader(kind: ImportKind, header: string): Found | undefined {
  const words = ` ${foldHeader(header)} `;
  let best: { column: Column; name: string } | undefined;
  for (const column of COLUMNS[kind]) {
    for (const name of column.headers) {
      if (name.includes(' ') && words.includes(` ${name} `) && name.length > (best?.name.length ?? 0))
        best = { column, name };
    }
  }
  return (
    best && {
      column: best.column.name,
      reason: `“${header}” has the words “${best.name}” in it.`,
      certainty: 'guess',
    }
  );
}

/** Only what the cells themselves can show: our own words, or days where one column of days is still wanted. */
function byContent(kind: ImportKind, cells: readonly string[]): Found | undefined {
  if (cells.length < 3) return undefined;
  const distinct = [...new Set(cells)];
  const byWords = COLUMNS[kind].find(
    ({ type }) =>
      WORDS[type] && distinct.length > 1 && distinct.every((cell) => parseWord(cell, type) !== undefined),
  );
  if (byWords) {
    return {
      column: byWords.name,
      reason: `Its cells are words of ${byWords.label.toLowerCase()}: ${distinct.slice(0, 3).join(', ')}.`,
      certainty: 'guess',
    };
  }
  const areDays = DATE_FORMATS.some(
    (format) => format !== 'yyyyMMdd' && cells.every((cell) => parseDay(cell, format) !== undefined),
  );
  const day = COLUMNS[kind].find(({ type, isRequired }) => type === 'date' && isRequired);
  return areDays && day ? { column: day.name, reason: 'Its cells are days.', certainty: 'guess' } : undefined;
}
