import { createHash } from 'node:crypto';
import { z } from 'zod';
import { DATE_FORMATS, type ImportKind, type Mapping } from '../../shared/imports';
import { invalid, type FieldError } from '../http/errors';
import { COLUMNS, foldHeader, REPORT_HEADERS, type Column } from './columns';
import { dataRows, type Shape } from './open-table';
import type { Decimal } from './parse-number';

/** Everything that reading a file needs to know of it; kept with the import. */
export const layout = z.object({
  format: z.enum(['csv', 'xlsx']),
  encoding: z.enum(['utf-8', 'utf-16le', 'utf-16be', 'windows-1252']),
  delimiter: z.enum([',', ';', '\t', '|']).nullable(),
  headers: z.array(z.string()),
  rowsExpected: z.number().nullable(),
  /** Our column → its place in a row. */
  columns: z.record(z.string(), z.number().int()),
  decimal: z.enum(['.', ',']),
  dateFormat: z.enum(DATE_FORMATS),
});
export type Layout = z.infer<typeof layout>;

/** The same for every file with the same header row. */
export const headerKey = (headers: readonly string[]): string =>
  createHash('sha256').update(headers.map(foldHeader).join('\u001f')).digest('hex');

/** A native header, whatever its case, spaces and hyphens. */
export const nativeColumn = (kind: ImportKind, header: string): Column | undefined => {
  const name = foldHeader(header).replaceAll(' ', '_');
  return COLUMNS[kind].find((column) => column.name === name);
};

/** Where each column of ours stands in the file: as the mapping says, and natively where it says nothing. */
export function placeColumns(
  kind: ImportKind,
  headers: readonly string[],
  mapping?: Mapping,
): Record<string, number> {
  const said = mapping?.columns ?? {};
  const places: Record<string, number> = {};
  const errors: FieldError[] = [];
  for (const [name, header] of Object.entries(said)) {
    const path = `/mapping/columns/${name.replaceAll('~', '~0').replaceAll('/', '~1')}`;
    if (!COLUMNS[kind].some((column) => column.name === name)) {
      errors.push({ path, message: `A file of ${kind} has no column named ${name}.` });
    } else if (header !== '') {
      const found = findHeader(headers, header);
      if (found.length === 1 && found[0] !== undefined) places[name] = found[0];
      else
        errors.push({
          path,
          message:
            found.length > 1
              ? `The file has ${found.length} columns headed “${header}”.`
              : `The file has no column headed “${header}”.`,
        });
    }
  }
  const taken = new Set(Object.values(places));
  headers.forEach((header, at) => {
    const column = nativeColumn(kind, header);
    if (!column || taken.has(at) || column.name in said) return;
    if (column.name in places)
      errors.push({
        path: `/mapping/columns/${column.name}`,
        message: `The file has two columns headed “${header}”. Rename one.`,
      });
    else places[column.name] = at;
  });
  if (errors.length > 0) throw invalid('The columns of this file cannot be told apart as asked.', errors);
  requireColumns(kind, headers, places);
  return places;
}

function findHeader(headers: readonly string[], wanted: string): number[] {
  const matching = (same: (header: string) => boolean) =>
    headers.flatMap((header, at) => (same(header) ? [at] : []));
  const exact = matching((header) => header === wanted.trim());
  return exact.length > 0 ? exact : matching((header) => foldHeader(header) === foldHeader(wanted));
}

function requireColumns(kind: ImportKind, headers: readonly string[], places: Record<string, number>): void {
  const lacking = COLUMNS[kind].filter((column) => column.isRequired && !(column.name in places));
  const errors = lacking.map((column) => ({
    path: `/mapping/columns/${column.name}`,
    message: `Say which column is “${column.label}” (${column.name}): ${column.about.toLowerCase()}.`,
  }));
  if (kind === 'units' && !('unit_serial' in places) && !('unit_ref' in places)) {
    errors.push({
      path: '/mapping/columns/unit_serial',
      message: 'Say which column is the machine’s serial (unit_serial) or your tag (unit_ref).',
    });
  }
  if (errors.length === 0) return;
  const shown = headers
    .slice(0, 12)
    .map((header) => `“${header.slice(0, 60)}”`)
    .join(', ');
  throw invalid(
    `Some columns are missing. The header row reads ${shown}${headers.length > 12 ? ' …' : ''}.`,
    errors,
  );
}

/** Headers that nothing is read from, apart from what `rejected.csv` added. */
export const unusedHeaders = ({ headers, columns }: Pick<Layout, 'headers' | 'columns'>): string[] => {
  const used = new Set(Object.values(columns));
  const ours: readonly string[] = REPORT_HEADERS;
  return headers.filter((header, at) => !used.has(at) && header !== '' && !ours.includes(header));
};

/** @throws invalid where the file and its mapping do not go together. */
export async function resolveLayout(
  kind: ImportKind,
  filePath: string,
  shape: Shape,
  mapping?: Mapping,
): Promise<Layout> {
  const columns = placeColumns(kind, shape.headers, mapping);
  return {
    ...shape,
    columns,
    decimal: mapping?.decimal ?? (await findDecimal(kind, filePath, shape, columns)),
    dateFormat: mapping?.dateFormat ?? 'yyyy-MM-dd',
  };
}

const NUMERIC = new Set(['hours', 'quantity', 'money']);

/** A comma only where the delimiter is a semicolon and no number has a decimal point. */
export async function findDecimal(
  kind: ImportKind,
  filePath: string,
  shape: Shape,
  columns: Readonly<Record<string, number>>,
): Promise<Decimal> {
  if (shape.delimiter !== ';') return '.';
  const places = COLUMNS[kind].flatMap(({ name, type }) =>
    NUMERIC.has(type) && columns[name] !== undefined ? [columns[name]] : [],
  );
  for await (const rows of dataRows(filePath, shape, ',')) {
    if (rows.some(({ cells }) => places.some((at) => /^[^,]*\.\d+\s*$/.test(cells[at] ?? '')))) return '.';
  }
  return ',';
}
