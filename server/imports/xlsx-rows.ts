import ExcelJS from 'exceljs';
import { invalid } from '../http/errors';
import type { TableRow } from './csv-parser';
import type { Decimal } from './parse-number';

const ROWS_AT_ONCE = 500;
const MOST_COLUMNS = 1000;

/** The rows of a workbook's first sheet that has any; typed cells are written as the mapping reads them. */
export async function* xlsxRows(
  filePath: string,
  decimal: Decimal,
): AsyncGenerator<TableRow[], void, undefined> {
  const reader = new ExcelJS.stream.xlsx.WorkbookReader(filePath, {
    worksheets: 'emit',
    sharedStrings: 'cache',
    styles: 'cache',
    hyperlinks: 'ignore',
    entries: 'ignore',
  });
  try {
    for await (const sheet of reader) {
      let rows: TableRow[] = [];
      let isEmpty = true;
      for await (const row of sheet) {
        const cells = cellsOf(row, decimal);
        if (cells.every((cell) => cell === '')) continue;
        isEmpty = false;
        rows.push({ line: row.number, cells });
        if (rows.length < ROWS_AT_ONCE) continue;
        yield rows;
        rows = [];
      }
      if (rows.length > 0) yield rows;
      if (!isEmpty) return;
    }
  } catch (error) {
    throw error instanceof Error && error.constructor.name === 'AppError'
      ? error
      : invalid('The workbook cannot be read. Open it, save it again as .xlsx and send that.');
  }
}

function cellsOf(row: ExcelJS.Row, decimal: Decimal): string[] {
  const width = Math.min(row.cellCount, MOST_COLUMNS);
  return Array.from({ length: width }, (_, at) => textOf(row.getCell(at + 1).value, decimal));
}

function textOf(value: ExcelJS.CellValue | undefined, decimal: Decimal): string {
  if (value === null || value === undefined) return '';
  if (typeof value === 'string') return value;
  if (typeof value === 'number') return numberText(value, decimal);
  if (typeof value === 'boolean') return value ? 'TRUE' : 'FALSE';
  if (value instanceof Date) return Number.isNaN(value.getTime()) ? '' : value.toISOString().slice(0, 10);
  if ('richText' in value) return value.richText.map(({ text }) => text).join('');
  if ('result' in value || 'formula' in value || 'sharedFormula' in value)
    return textOf(value.result, decimal);
  if ('text' in value) return textOf(value.text, decimal);
  return 'error' in value ? value.error : '';
}

/** Fifteen digits are what a sheet shows; more would be the noise of binary fractions. */
function numberText(value: number, decimal: Decimal): string {
  return String(Number(value.toPrecision(15))).replace('.', decimal);
}
