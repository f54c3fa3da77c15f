import type { Mapping } from '../../shared/imports';
import { invalid } from '../http/errors';
import type { TableRow } from './csv-parser';
import { csvRows } from './csv-rows';
import type { Decimal } from './parse-number';
import { formatOf, readHead, scanBytes, sniffDelimiter, type Delimiter, type Encoding } from './sniff';
import { guardWorkbook } from './xlsx-guard';
import { xlsxRows } from './xlsx-rows';

/** How a file is to be read; found by one scan, then kept with the import. */
export type Shape = {
  format: 'csv' | 'xlsx';
  encoding: Encoding;
  delimiter: Delimiter | null;
  headers: string[];
  /** Data rows, as far as line ends outside quote marks tell; null where only reading tells. */
  rowsExpected: number | null;
};

/** What a person said of the file comes first, then what it shows itself. */
export async function openTable(filePath: string, said: Mapping | undefined): Promise<Shape> {
  const head = await readHead(filePath);
  if (formatOf(head) === 'xlsx') {
    await guardWorkbook(filePath);
    const shape: Shape = {
      format: 'xlsx',
      encoding: 'utf-8',
      delimiter: null,
      headers: [],
      rowsExpected: null,
    };
    return { ...shape, headers: await readHeaders(filePath, shape) };
  }
  const { encoding, lines } = await scanBytes(filePath, said?.encoding);
  const text = new TextDecoder(encoding).decode(head);
  const delimiter = said?.delimiter ?? sniffDelimiter(text);
  const shape: Shape = {
    format: 'csv',
    encoding,
    delimiter,
    headers: [],
    rowsExpected: lines === null ? null : Math.max(0, lines - 1),
  };
  return { ...shape, headers: await readHeaders(filePath, shape) };
}

/** All rows of a file, header first. */
export function rowsOf(
  filePath: string,
  shape: Shape,
  decimal: Decimal,
): AsyncGenerator<TableRow[], void, undefined> {
  return shape.format === 'xlsx'
    ? xlsxRows(filePath, decimal)
    : csvRows(filePath, { encoding: shape.encoding, delimiter: shape.delimiter ?? ',' });
}

/** The rows below the header; rows of nothing but empty cells are left out. */
export async function* dataRows(
  filePath: string,
  shape: Shape,
  decimal: Decimal,
): AsyncGenerator<TableRow[], void, undefined> {
  let isHeader = true;
  for await (const rows of rowsOf(filePath, shape, decimal)) {
    const data = isHeader ? rows.slice(1) : rows;
    isHeader = false;
    yield data.filter(({ cells }) => cells.some((cell) => cell !== ''));
  }
}

async function readHeaders(filePath: string, shape: Shape): Promise<string[]> {
  for await (const rows of rowsOf(filePath, shape, '.')) {
    const headers = rows[0]?.cells.map((cell) => cell.trim()) ?? [];
    while (headers.at(-1) === '') headers.pop();
    if (headers.length > 0) return headers;
  }
  throw invalid('The file has no header row: its first row names the columns.');
}
