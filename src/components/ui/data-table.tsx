import {
  createColumnHelper,
  createSortedRowModel,
  rowSortingFeature,
  tableFeatures,
  useTable,
  type Row as TableRow,
  type SortingState,
} from '@tanstack/react-table';
import { useMemo, type ReactNode } from 'react';
import { toCsv, type CsvCell } from '../../lib/csv';
import { downloadText } from '../../lib/download';
import { classNames } from '../../lib/class-names';
import { Button } from './button';
import { Ascending, Descending } from './icons';
import { useSorting } from './use-sorting';

export type Column<Row> = {
  /** Unique in the table; also what the address says where the sort is kept there. */
  id: string;
  header: string;
  /** What is sorted by and written to the spreadsheet. */
  value: (row: Row) => CsvCell;
  /** What is shown; the value where absent. */
  cell?: (row: Row) => ReactNode;
  align?: 'left' | 'right';
  isSortable?: boolean;
  /** The cell that names its row. */
  isRowHeader?: boolean;
  /** Shown on screen alone, or in the spreadsheet alone. */
  only?: 'screen' | 'spreadsheet';
  className?: string;
};

type Props<Row> = {
  /** Says what the table holds; read out, and shown where `isCaptionShown`. */
  caption: string;
  isCaptionShown?: boolean;
  rows: readonly Row[];
  columns: readonly Column<Row>[];
  rowId: (row: Row) => string;
  /** What stands in place of no rows. */
  empty?: ReactNode;
  /** Name of the search parameter that keeps the sort; without it the sort lasts as long as the table. */
  sortKey?: string;
  initialSort?: { id: string; desc: boolean };
  /** File name without ending: gives a "Spreadsheet" button that saves the rows as shown. */
  spreadsheet?: string;
  /** More rows are to be had from the server. */
  more?: { hasMore: boolean; isLoading: boolean; onMore: () => void };
};

const features = tableFeatures({ rowSortingFeature, sortedRowModel: createSortedRowModel() });

/** Sortable rows with a caption, a spreadsheet and an empty state. */
export function DataTable<Row extends object>(props: Props<Row>) {
  const {
    caption,
    isCaptionShown = false,
    rows,
    columns,
    rowId,
    empty,
    sortKey,
    initialSort,
    spreadsheet,
    more,
  } = props;
  const [sorting, setSorting] = useSorting(sortKey, initialSort);
  const shown = useMemo(() => columns.filter((column) => column.only !== 'spreadsheet'), [columns]);
  const table = useTable({
    features,
    data: rows,
    columns: useMemo(() => tableColumns(shown), [shown]),
    getRowId: rowId,
    state: { sorting },
    onSortingChange: (next: SortingState | ((old: SortingState) => SortingState)) =>
      setSorting(typeof next === 'function' ? next(sorting) : next),
  });
  if (rows.length === 0)
    return <div className="py-2">{empty ?? <p className="text-dim">Nothing to show.</p>}</div>;
  const sorted = table.getRowModel().rows.map((row) => row.original);

  return (
    <div>
      <div className="overflow-x-auto" tabIndex={0} role="group" aria-label={caption}>
        <table className="w-full border-collapse text-table">
          <caption className={isCaptionShown ? 'pb-2 text-left text-sm text-dim' : 'sr-only'}>
            {caption}
          </caption>
          <thead>
            <tr>
              {table.getFlatHeaders().map((header, index) => {
                const column = shown[index];
                const direction = header.column.getIsSorted();
                return (
                  <th
                    key={header.id}
                    scope="col"
                    aria-sort={
                      direction === false ? undefined : direction === 'asc' ? 'ascending' : 'descending'
                    }
                    className={classNames(
                      'border-b border-rule py-1.5 pr-3 font-label whitespace-nowrap text-dim last:pr-0',
                      column?.align === 'right' ? 'text-right' : 'text-left',
                      column?.className,
                    )}
                  >
                    {header.column.getCanSort() ? (
                      <button
                        type="button"
                        className="inline-flex min-h-11 items-center gap-0.5 rounded-bench hover:text-ink desk:min-h-6"
                        onClick={header.column.getToggleSortingHandler()}
                      >
                        {column?.header}
                        {direction === 'asc' && <Ascending />}
                        {direction === 'desc' && <Descending />}
                      </button>
                    ) : (
                      column?.header
                    )}
                  </th>
                );
              })}
            </tr>
          </thead>
          <tbody>
            {sorted.map((row) => (
              <tr key={rowId(row)} className="hover:bg-wash/60 last:*:border-b-0">
                {shown.map((column) => (
                  <Cell key={column.id} column={column} row={row} />
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {(spreadsheet || more?.hasMore) && (
        <div className="mt-2 flex flex-wrap items-center gap-4 text-sm" data-screen-only>
          {more?.hasMore && (
            <Button isBusy={more.isLoading} onClick={more.onMore}>
              {more.isLoading ? 'Fetching more rows' : 'Show more rows'}
            </Button>
          )}
          {spreadsheet && (
            <Button
              look="text"
              onClick={() => downloadText(`${spreadsheet}.csv`, spreadsheetOf(columns, sorted))}
            >
              Spreadsheet
            </Button>
          )}
        </div>
      )}
    </div>
  );
}

function Cell<Row>({ column, row }: { column: Column<Row>; row: Row }) {
  const Tag = column.isRowHeader ? 'th' : 'td';
  return (
    <Tag
      scope={column.isRowHeader ? 'row' : undefined}
      className={classNames(
        'border-b border-rule py-2 pr-3 align-middle font-text last:pr-0',
        column.align === 'right' ? 'text-right whitespace-nowrap' : 'text-left',
        // A table that scrolls sideways on a phone need not squeeze its names.
        column.isRowHeader && 'max-desk:min-w-28',
        column.className,
      )}
    >
      {column.cell ? column.cell(row) : column.value(row)}
    </Tag>
  );
}

function spreadsheetOf<Row>(columns: readonly Column<Row>[], rows: readonly Row[]): string {
  const written = columns.filter((column) => column.only !== 'screen');
  return toCsv(
    written.map((column) => column.header),
    rows.map((row) => written.map((column) => column.value(row))),
  );
}

function tableColumns<Row extends object>(columns: readonly Column<Row>[]) {
  const helper = createColumnHelper<typeof features, Row>();
  return helper.columns(
    columns.map((column) =>
      helper.accessor((row) => column.value(row), {
        id: column.id,
        header: column.header,
        enableSorting: column.isSortable ?? true,
        sortDescFirst: column.align === 'right',
        sortFn: (a: TableRow<typeof features, Row>, b: TableRow<typeof features, Row>) =>
          compare(column.value(a.original), column.value(b.original)),
      }),
    ),
  );
}

/** Numbers by size, texts as people sort them, what is missing first. */
function compare(a: CsvCell, b: CsvCell): number {
  if (a === b) return 0;
  if (a === null) return -1;
  if (b === null) return 1;
  if (typeof a === 'number' && typeof b === 'number') return a - b;
  return String(a).localeCompare(String(b), undefined, { numeric: true, sensitivity: 'base' });
}
