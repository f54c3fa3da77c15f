import { useInfiniteQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { ImportState } from '../../../shared/imports';
import { DataTable, type Column } from '../../components/ui/data-table';
import { ErrorPanel } from '../../components/ui/error-panel';
import { RowsSkeleton } from '../../components/ui/skeleton';
import { rejectedCsvUrl, rejectionsQuery, type Rejection } from './queries';

type Fault = Rejection['errors'][number] & { id: string; line: number; record: string | null };

const COLUMNS: Column<Fault>[] = [
  { id: 'line', header: 'Line', value: ({ line }) => line, align: 'right', isSortable: false },
  {
    id: 'record',
    header: 'Number',
    value: ({ record }) => record,
    cell: ({ record }) => record ?? '–',
    isRowHeader: true,
    isSortable: false,
  },
  {
    id: 'column',
    header: 'Column',
    value: ({ column }) => column,
    cell: ({ column }) => column ?? 'the row',
    isSortable: false,
  },
  {
    id: 'value',
    header: 'It says',
    value: ({ value }) => value,
    cell: ({ value }) =>
      value === null || value === '' ? <span className="text-dim">nothing</span> : `“${value}”`,
    isSortable: false,
    className: 'break-words max-w-[14rem]',
  },
  {
    id: 'message',
    header: 'What is wrong',
    value: ({ message }) => message,
    isSortable: false,
    className: 'min-w-[13rem]',
  },
  {
    id: 'mend',
    header: 'How to mend it',
    value: ({ mend }) => mend,
    isSortable: false,
    className: 'min-w-[13rem]',
  },
];

/** The rows that did not go in, each with its mend, and the file to correct them in. */
export function Rejected({ importState }: { importState: ImportState }) {
  const { id } = importState;
  const { data, error, hasNextPage, isFetchingNextPage, fetchNextPage } = useInfiniteQuery(
    rejectionsQuery(id),
  );
  const rows = useMemo(() => (data ?? []).flatMap(faultsOf), [data]);
  if (error) return <ErrorPanel error={error} />;
  if (!data) return <RowsSkeleton rows={3} />;
  return (
    <div>
      <p className="mb-2 text-sm text-dim">
        <a href={rejectedCsvUrl(id)} download>
          Take these rows as a file
        </a>
        , mend them there, and bring that file: what is wrong stands beside each row, and the rest is not
        taken in twice.
      </p>
      <DataTable
        caption="Rejected rows"
        rows={rows}
        columns={COLUMNS}
        rowId={(fault) => fault.id}
        more={{ hasMore: hasNextPage, isLoading: isFetchingNextPage, onMore: () => void fetchNextPage() }}
      />
    </div>
  );
}

const faultsOf = ({ line, repairNumber, errors }: Rejection): Fault[] =>
  errors.map((error, index) => ({ ...error, id: `${line}-${index}`, line, record: repairNumber }));
