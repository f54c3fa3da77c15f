import { createReadStream } from 'node:fs';
import { invalid } from '../http/errors';
import { CsvParser, UnclosedQuote, type TableRow } from './csv-parser';
import type { Encoding } from './sniff';

/** The rows of a CSV file, header first, some hundreds at a time; blank lines are left out. */
export async function* csvRows(
  filePath: string,
  options: { encoding: Encoding; delimiter: string },
): AsyncGenerator<TableRow[], void, undefined> {
  const parser = new CsvParser(options.delimiter);
  // It takes the byte order mark off, and keeps half characters for the next piece.
  const decoder = new TextDecoder(options.encoding);
  try {
    for await (const piece of createReadStream(filePath, { highWaterMark: 256 * 1024 })) {
      const rows = parser.push(decoder.decode(piece as Buffer, { stream: true }));
      if (rows.length > 0) yield rows;
    }
    const rest = [...parser.push(decoder.decode()), ...parser.end()];
    if (rest.length > 0) yield rest;
  } catch (error) {
    if (!(error instanceof UnclosedQuote)) throw error;
    throw invalid(
      `A quote mark is opened near line ${error.line.toLocaleString('en-US')} and never closed. Close it, or double quote marks that stand within a text.`,
    );
  }
}
