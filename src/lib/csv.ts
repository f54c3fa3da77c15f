export type CsvCell = string | number | null;

/** Writes RFC 4180 with a byte order mark, which spreadsheets need to read the text as UTF-8. */
export function toCsv(header: readonly string[], rows: readonly (readonly CsvCell[])[]): string {
  return `\ufeff${[header, ...rows].map((row) => row.map(csvCell).join(',')).join('\r\n')}\r\n`;
}

/** A text that a spreadsheet would run as a formula is written with a leading apostrophe. */
function csvCell(value: CsvCell): string {
  if (value === null) return '';
  if (typeof value === 'number') return String(value);
  const guarded = /^[=+\-@\t\r]/.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(guarded) ? `"${guarded.replaceAll('"', '""')}"` : guarded;
}
