import { useSuspenseInfiniteQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '../../components/ui/button';
import { DataTable, type Column } from '../../components/ui/data-table';
import { Dialog } from '../../components/ui/dialog';
import { Sheet } from '../../components/ui/sheet';
import { EmptyState } from '../../components/ui/states';
import { useFormats } from '../../lib/session';
import { outboxQuery, type OutboxMail } from './queries';

const STATE_WORDS: Record<OutboxMail['state'], string> = {
  queued: 'waits to be sent',
  sending: 'is being sent',
  sent: 'sent',
  failed: 'could not be sent',
  unknown: 'may have been sent; it is not sent twice',
};

/** Every message that went out, or should have. */
export function Mail() {
  const { data, hasNextPage, isFetchingNextPage, fetchNextPage } = useSuspenseInfiniteQuery(outboxQuery);
  const formats = useFormats();
  const [read, setRead] = useState<OutboxMail | null>(null);
  const columns: Column<OutboxMail>[] = [
    {
      id: 'subject',
      header: 'Subject',
      value: (row) => row.subject,
      cell: (row) => (
        <Button look="text" className="text-left" onClick={() => setRead(row)}>
          {row.subject}
        </Button>
      ),
      isRowHeader: true,
      isSortable: false,
    },
    { id: 'to', header: 'To', value: (row) => row.to, isSortable: false },
    {
      id: 'at',
      header: 'Written',
      value: (row) => row.createdAt,
      cell: (row) => formats.instant(row.createdAt),
      isSortable: false,
    },
    {
      id: 'state',
      header: 'State',
      value: (row) => STATE_WORDS[row.state],
      cell: (row) => (
        <span className={row.state === 'failed' ? 'text-oxide' : row.state === 'unknown' ? 'text-brass' : ''}>
          {STATE_WORDS[row.state]}
          {row.sentAt && `, ${formats.instant(row.sentAt)}`}
        </span>
      ),
      isSortable: false,
    },
  ];
  return (
    <Sheet title="E-mail" sub="Latest first.">
      <DataTable
        caption="Messages"
        rows={data}
        columns={columns}
        rowId={(row) => row.id}
        empty={<EmptyState title="No message has been written yet." />}
        more={{ hasMore: hasNextPage, isLoading: isFetchingNextPage, onMore: () => void fetchNextPage() }}
      />
      <Dialog
        isOpen={read !== null}
        onClose={() => setRead(null)}
        title={read?.subject ?? ''}
        description={read ? `To ${read.to}` : undefined}
      >
        <p className="break-words whitespace-pre-wrap">{read?.text}</p>
      </Dialog>
    </Sheet>
  );
}
