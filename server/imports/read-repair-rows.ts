import { COLUMNS } from './columns';
import type { TableRow } from './csv-parser';
import type { Layout } from './layout';
import { parseCell, type CellRules, type Fault } from './parse-cell';
import {
  bitsOf,
  LINE_FIELDS,
  LINE_MAKING,
  REPAIR_FIELDS,
  type LineValues,
  type RepairValues,
} from './repair-fields';
import { isReturned, restoreCells } from './rejected-cells';
import type { Brought, RepairRow } from './stage-repairs';

// Rows of one shape are what the engine is quick with.
const NO_REPAIR: RepairValues = Object.fromEntries(REPAIR_FIELDS.map((field) => [field, null]));
const NO_LINE: LineValues = Object.fromEntries(LINE_FIELDS.map((field) => [field, null]));

/** Makes the reader of a file of repairs: what it brings, and one row after the other. */
export function repairReader(layout: Layout, rules: CellRules) {
  const columns = COLUMNS.repairs.flatMap(({ name, type }) => {
    const at = layout.columns[name];
    const repairField = REPAIR_FIELDS.find((field) => field === name);
    const lineField = LINE_FIELDS.find((field) => field === name);
    return at === undefined ? [] : [{ name, type, at, repairField, lineField }];
  });
  const has = (name: string) => layout.columns[name] !== undefined;
  const brought: Brought = {
    given: bitsOf(REPAIR_FIELDS.filter(has)),
    hasLines: LINE_MAKING.some(has),
  };
  const givenLineFields = LINE_FIELDS.filter(has);
  const wasReturned = isReturned(layout.headers);

  const read = (tableRow: TableRow, row: number): RepairRow => {
    const cells = wasReturned ? restoreCells(tableRow.cells) : tableRow.cells;
    const faults = rowFaults(tableRow, layout);
    const repair: RepairValues = { ...NO_REPAIR };
    const line: LineValues = { ...NO_LINE };
    for (const { name, type, at, repairField, lineField } of columns) {
      const cell = cells[at];
      if (cell === undefined || cell === '') continue;
      const parsed = parseCell(cell, type, rules);
      if ('fault' in parsed) faults.push({ column: name, value: cell, ...parsed.fault });
      else if (parsed.value !== null) {
        if (lineField) line[lineField] = parsed.value;
        if (repairField) repair[repairField] = parsed.value;
      }
    }
    const isLine = LINE_MAKING.some((field) => (line[field] ?? null) !== null);
    return { row, repair, line: isLine ? line : undefined, faults };
  };
  return { brought, givenLineFields, read };
}

/** A row with more or fewer cells than the header has lost or gained a delimiter, so no cell can be trusted. */
export function rowFaults({ cells, isBroken }: TableRow, { headers, format }: Layout): Fault[] {
  if (isBroken) {
    return [
      {
        column: null,
        value: null,
        message: 'A quote mark stands within a text that is in quote marks.',
        mend: 'Double the quote marks that stand within a text: 5"" belt.',
      },
    ];
  }
  const isTooWide = cells.length > headers.length && cells.slice(headers.length).some((cell) => cell !== '');
  const isTooNarrow = format === 'csv' && cells.length < headers.length;
  if (!isTooWide && !isTooNarrow) return [];
  return [
    {
      column: null,
      value: `${cells.length} cells`,
      message: `The row has ${cells.length} cells where the header row has ${headers.length}.`,
      mend: 'Check for a delimiter or a quote mark that is missing or too many in this row.',
    },
  ];
}
