type Row<Column extends string> = Readonly<Record<Column, string>>;

const cell = (value: string): string => (/[",\r\n]/.test(value) ? `"${value.replaceAll('"', '""')}"` : value);

const line = (cells: readonly string[]): string => `${cells.map(cell).join(',')}\r\n`;

/** RFC 4180, header first, in pieces of about a thousand rows: for files that should not stand in memory whole. */
export function* csvPieces<Column extends string>(
  rows: Iterable<Row<Column>>,
  columns: readonly Column[],
): Generator<string, void, undefined> {
  let piece = line(columns);
  let held = 0;
  for (const row of rows) {
    piece += line(columns.map((column) => row[column]));
    held += 1;
    if (held % 1000 === 0) {
      yield piece;
      piece = '';
    }
  }
  if (piece !== '') yield piece;
}

export function toCsv<Column extends string>(
  rows: Iterable<Row<Column>>,
  columns: readonly Column[],
): string {
  return [...csvPieces(rows, columns)].join('');
}
