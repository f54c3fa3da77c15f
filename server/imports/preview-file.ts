import type { FilePreview, ImportKind } from '../../shared/imports';
import { withShop } from '../db/tenancy';
import type { Deps } from '../deps';
import { COLUMNS } from './columns';
import { findDecimal } from './layout';
import { dataRows, openTable } from './open-table';
import { proposeColumns } from './propose-columns';
import { proposeDateFormat } from './propose-dates';
import { recallMapping } from './remember-mapping';
import type { Spooled } from './spool';

const SHOWN_ROWS = 10;
const SAMPLED_ROWS = 1000;
const SHOWN_CHARACTERS = 300;

/** The first look at a spooled file: how it is written, and what its columns seem to be. Nothing is imported. */
export async function previewFile(
  deps: Deps,
  shopId: string,
  kind: ImportKind,
  spooled: Spooled,
): Promise<FilePreview> {
  const shape = await openTable(spooled.filePath, undefined);
  const remembered = await withShop(deps.database, shopId, (tx) => recallMapping(tx, kind, shape.headers));
  const rows = await sampleRows(spooled.filePath, shape);
  const proposals = proposeColumns(kind, shape.headers, rows, remembered);
  const places = Object.fromEntries(
    proposals.flatMap(({ column }, at) => (column === null ? [] : [[column, at] as const])),
  );
  const dateSamples = COLUMNS[kind].flatMap(({ name, type }) => {
    const at = places[name];
    return type === 'date' && at !== undefined ? rows.map((row) => row[at] ?? '') : [];
  });
  const dates = remembered?.dateFormat
    ? { dateFormat: remembered.dateFormat, reason: 'Confirmed earlier for a file with this header row.' }
    : proposeDateFormat(dateSamples);
  return {
    spoolId: spooled.spoolId,
    fileName: spooled.fileName,
    bytes: spooled.bytes,
    format: shape.format,
    encoding: shape.encoding,
    delimiter: shape.delimiter,
    decimal: remembered?.decimal ?? (await findDecimal(kind, spooled.filePath, shape, places)),
    dateFormat: dates.dateFormat,
    dateFormatReason: dates.reason,
    isRemembered: remembered !== undefined,
    headers: shape.headers,
    rows: rows
      .slice(0, SHOWN_ROWS)
      .map((row) => shape.headers.map((_, at) => (row[at] ?? '').slice(0, SHOWN_CHARACTERS))),
    proposals,
    columns: COLUMNS[kind].map(({ name, label, about, isRequired }) => ({ name, label, about, isRequired })),
    problems: problemsOf(kind, shape.headers, rows, places, dates),
  };
}

async function sampleRows(
  filePath: string,
  shape: Awaited<ReturnType<typeof openTable>>,
): Promise<string[][]> {
  const sample: string[][] = [];
  for await (const rows of dataRows(filePath, shape, '.')) {
    sample.push(...rows.slice(0, SAMPLED_ROWS - sample.length).map(({ cells }) => cells));
    if (sample.length >= SAMPLED_ROWS) break;
  }
  return sample;
}

function problemsOf(
  kind: ImportKind,
  headers: readonly string[],
  rows: readonly string[][],
  places: Readonly<Record<string, number>>,
  dates: { dateFormat: string | null; reason: string },
): string[] {
  const repeated = headers.filter((header, at) => header !== '' && headers.indexOf(header) !== at);
  const lacking = COLUMNS[kind].filter(({ isRequired, name }) => isRequired && places[name] === undefined);
  return [
    ...(rows.length === 0 ? ['The file has a header row and nothing below it.'] : []),
    ...(headers.length === 1 ? ['Only one column was found: the delimiter may be another one.'] : []),
    ...[...new Set(repeated)].map(
      (header) => `Several columns are headed “${header.slice(0, 60)}”; only one of them can be read.`,
    ),
    ...lacking.map(
      ({ label, about }) =>
        `No column was recognized as “${label}”: ${about.toLowerCase()}. Say which it is.`,
    ),
    ...(kind === 'units' && places['unit_serial'] === undefined && places['unit_ref'] === undefined
      ? ['No column was recognized as the machine’s serial or your tag. Say which it is.']
      : []),
    ...(dates.dateFormat === null ? [dates.reason] : []),
  ];
}
