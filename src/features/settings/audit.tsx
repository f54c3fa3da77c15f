import { useSuspenseInfiniteQuery } from '@tanstack/react-query';
import { DataTable, type Column } from '../../components/ui/data-table';
import { Sheet } from '../../components/ui/sheet';
import { EmptyState } from '../../components/ui/states';
import { useFormats } from '../../lib/session';
import { auditQuery, type AuditEntry } from './queries';

/** Who changed what, and when. */
export function Audit() {
  const { data, hasNextPage, isFetchingNextPage, fetchNextPage } = useSuspenseInfiniteQuery(auditQuery);
  const formats = useFormats();
  const columns: Column<AuditEntry>[] = [
    {
      id: 'at',
      header: 'When',
      value: (row) => row.at,
      cell: (row) => formats.instant(row.at),
      isSortable: false,
      className: 'whitespace-nowrap',
    },
    { id: 'who', header: 'Who', value: (row) => row.who, isSortable: false },
    {
      id: 'what',
      header: 'What',
      value: (row) => inWords(row),
      isRowHeader: true,
      isSortable: false,
    },
    {
      id: 'detail',
      header: 'Detail',
      value: (row) => detailOf(row.detail),
      cell: (row) => <span className="text-dim">{detailOf(row.detail)}</span>,
      isSortable: false,
      className: 'max-w-[28rem] break-words',
    },
  ];
  return (
    <Sheet title="What was changed" sub="Latest first.">
      <DataTable
        caption="What was changed"
        rows={data}
        columns={columns}
        rowId={(row) => row.id}
        spreadsheet="what-was-changed"
        empty={<EmptyState title="Nothing has been changed yet." />}
        more={{ hasMore: hasNextPage, isLoading: isFetchingNextPage, onMore: () => void fetchNextPage() }}
      />
    </Sheet>
  );
}

const inWords = ({ action, subject }: AuditEntry) => `${spaced(action)} ${spaced(subject)}`;
const spaced = (name: string) => name.replaceAll(/[._-]/g, ' ');

/** "role: owner, name: Ines": the fields of the change, one after another. */
function detailOf(detail: unknown): string {
  if (detail === null || detail === undefined) return '';
  if (typeof detail !== 'object') return String(detail);
  return Object.entries(detail)
    .map(([name, value]) => `${name}: ${typeof value === 'object' ? JSON.stringify(value) : String(value)}`)
    .join(', ');
}
