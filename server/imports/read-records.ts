import type { ImportKind } from '../../shared/imports';
import { COLUMNS } from './columns';
import type { TableRow } from './csv-parser';
import type { Layout } from './layout';
import { parseCell, type CellRules, type Fault } from './parse-cell';
import { rowFaults } from './read-repair-rows';
import { isReturned, restoreCells } from './rejected-cells';

/** The reader of a file with one record in each row: the values by column, and what is wrong with them. */
export function recordReader(kind: ImportKind, layout: Layout, rules: CellRules) {
  const wasReturned = isReturned(layout.headers);
  return (row: TableRow) => {
    const cells = wasReturned ? restoreCells(row.cells) : row.cells;
    const faults: Fault[] = rowFaults(row, layout);
    const values: Record<string, string | null> = {};
    for (const { name, type } of COLUMNS[kind]) {
      const at = layout.columns[name];
      const cell = at === undefined ? '' : (cells[at] ?? '');
      const parsed = parseCell(cell, type, rules);
      if ('fault' in parsed) faults.push({ column: name, value: cell, ...parsed.fault });
      else values[name] = parsed.value;
    }
    return { values, faults };
  };
}

/** How a record's fault is staged. */
export const faultCells = (number: number, { column, value, message, mend }: Fault) => [
  number,
  number,
  column,
  value?.replaceAll('\0', '\u2400').slice(0, 200) ?? null,
  message,
  mend,
];
