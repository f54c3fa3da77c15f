import { isUtf8 } from 'node:buffer';
import { createReadStream } from 'node:fs';
import { open } from 'node:fs/promises';
import type { Mapping } from '../../shared/imports';
import { invalid } from '../http/errors';

export type Encoding = NonNullable<Mapping['encoding']>;
export type Delimiter = NonNullable<Mapping['delimiter']>;

export const DELIMITERS: readonly Delimiter[] = [',', ';', '\t', '|'];
const HEAD_BYTES = 64 * 1024;
const QUOTE = 0x22;
const NEWLINE = 0x0a;

/** The beginning of a file, enough to tell what it is. */
export async function readHead(filePath: string): Promise<Buffer> {
  const file = await open(filePath);
  try {
    const { buffer, bytesRead } = await file.read(Buffer.alloc(HEAD_BYTES), 0, HEAD_BYTES, 0);
    return buffer.subarray(0, bytesRead);
  } finally {
    await file.close();
  }
}

/**
 * Whether a file is a table of text or a workbook.
 * @throws invalid with what it seems to be instead.
 */
export function formatOf(head: Buffer): 'csv' | 'xlsx' {
  if (head.length === 0) throw invalid('The file is empty.');
  if (head.readUInt16BE(0) === 0x504b && head[2] === 3) return 'xlsx';
  const start = head.subarray(0, 8).toString('latin1');
  if (start.startsWith('\xd0\xcf\x11\xe0')) {
    throw invalid('This is an old .xls workbook. Save it as .xlsx or CSV and send that.');
  }
  if (start.startsWith('%PDF'))
    throw invalid('This is a PDF. Export the records as CSV or XLSX and send that.');
  if (!bomOf(head) && looksBinary(head)) {
    throw invalid(
      'This is neither CSV nor XLSX: it holds bytes that no text has. (UTF-16 text needs its byte order mark.)',
    );
  }
  return 'csv';
}

function looksBinary(head: Buffer): boolean {
  const odd = head.reduce(
    (count, byte) => (byte < 9 || (byte > 13 && byte < 32 && byte !== 27) ? count + 1 : count),
    0,
  );
  return odd > 4 && odd > head.length / 100;
}

export function bomOf(head: Buffer): Encoding | undefined {
  if (head[0] === 0xef && head[1] === 0xbb && head[2] === 0xbf) return 'utf-8';
  if (head[0] === 0xff && head[1] === 0xfe) return 'utf-16le';
  if (head[0] === 0xfe && head[1] === 0xff) return 'utf-16be';
  return undefined;
}

/** One pass over the bytes: whether they are UTF-8, and how many lines they hold outside quote marks. */
export async function scanBytes(
  filePath: string,
  said?: Encoding,
): Promise<{ encoding: Encoding; lines: number | null }> {
  const marked = said ?? bomOf(await readHead(filePath));
  if (marked?.startsWith('utf-16')) return { encoding: marked, lines: null };
  let areUtf8 = true;
  let rest: Buffer = Buffer.alloc(0);
  let quotes = 0;
  let lines = 0;
  let last = NEWLINE;
  for await (const piece of createReadStream(filePath, { highWaterMark: 1024 * 1024 })) {
    const bytes: Buffer = piece;
    const joined = rest.length > 0 ? Buffer.concat([rest, bytes]) : bytes;
    const whole = wholeCharacters(joined);
    areUtf8 &&= isUtf8(joined.subarray(0, whole));
    rest = joined.subarray(whole);
    let quote = bytes.indexOf(QUOTE);
    for (let end = bytes.indexOf(NEWLINE); end >= 0; end = bytes.indexOf(NEWLINE, end + 1)) {
      for (; quote >= 0 && quote < end; quote = bytes.indexOf(QUOTE, quote + 1)) quotes += 1;
      if (quotes % 2 === 0) lines += 1;
    }
    for (; quote >= 0; quote = bytes.indexOf(QUOTE, quote + 1)) quotes += 1;
    last = bytes.at(-1) ?? last;
  }
  const encoding = marked ?? (areUtf8 && isUtf8(rest) ? 'utf-8' : 'windows-1252');
  return { encoding, lines: last === NEWLINE ? lines : lines + 1 };
}

/** Where the last character that may be cut off begins: up to three bytes before the end. */
function wholeCharacters(bytes: Buffer): number {
  for (let back = 1; back <= Math.min(3, bytes.length); back += 1) {
    const byte = bytes[bytes.length - back] ?? 0;
    if (byte >= 0xc0) return bytes.length - back;
    if (byte < 0x80) break;
  }
  return bytes.length;
}

/** The delimiter that cuts the first lines into the most columns, alike in each. */
export function sniffDelimiter(text: string): Delimiter {
  const counts = DELIMITERS.map((delimiter) => ({
    delimiter,
    score: scoreOf(columnCounts(text, delimiter)),
  }));
  return counts.reduce((best, next) => (next.score > best.score ? next : best)).delimiter;
}

function scoreOf(counts: readonly number[]): number {
  const header = counts[0] ?? 0;
  if (header < 2) return 0;
  return header * (counts.filter((count) => count === header).length / counts.length);
}

/** How many columns each of the first lines has; a line cut off at the end of the text is left out. */
function columnCounts(text: string, delimiter: string): number[] {
  const counts: number[] = [];
  let columns = 1;
  let isQuoted = false;
  for (const mark of text) {
    if (mark === '"') isQuoted = !isQuoted;
    else if (!isQuoted && mark === delimiter) columns += 1;
    else if (!isQuoted && mark === '\n') {
      counts.push(columns);
      columns = 1;
      if (counts.length === 20) break;
    }
  }
  return counts.length === 0 ? [columns] : counts;
}
