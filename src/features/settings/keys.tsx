import { useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '../../components/ui/button';
import { ConfirmDialog } from '../../components/ui/confirm-dialog';
import { DataTable, type Column } from '../../components/ui/data-table';
import { Sheet } from '../../components/ui/sheet';
import { EmptyState } from '../../components/ui/states';
import { useFormats } from '../../lib/session';
import { useChange } from '../../lib/use-change';
import { KeyDialog } from './key-dialog';
import { keysQuery, revokeKey, type ApiKey } from './queries';

const SCOPE_WORDS = { read: 'read figures', import: 'bring in records' } as const;

/** For programs that bring in records or read figures. */
export function Keys() {
  const { data } = useSuspenseQuery(keysQuery);
  const formats = useFormats();
  const [isMaking, setMaking] = useState(false);
  const [revoked, setRevoked] = useState<ApiKey | null>(null);
  const revoke = useChange(revokeKey, { stale: ['keys'], said: 'The key no longer works.' });
  const columns: Column<ApiKey>[] = [
    {
      id: 'name',
      header: 'Name',
      value: (row) => row.name,
      cell: (row) => (
        <>
          {row.name}
          <span className="block text-sm text-dim">ends in {row.hint}</span>
        </>
      ),
      isRowHeader: true,
    },
    { id: 'scopes', header: 'May', value: (row) => row.scopes.map((scope) => SCOPE_WORDS[scope]).join(', ') },
    {
      id: 'made',
      header: 'Made',
      value: (row) => row.createdAt,
      cell: (row) => formats.instant(row.createdAt),
    },
    {
      id: 'used',
      header: 'Last used',
      value: (row) => row.lastUsedAt,
      cell: (row) => (row.lastUsedAt ? formats.instant(row.lastUsedAt) : 'never'),
    },
    {
      id: 'revoke',
      header: 'Standing',
      value: (row) => (row.isRevoked ? 'revoked' : 'works'),
      cell: (row) =>
        row.isRevoked ? (
          <span className="text-dim">revoked</span>
        ) : (
          <Button look="text" aria-label={`Revoke ${row.name}`} onClick={() => setRevoked(row)}>
            Revoke
          </Button>
        ),
    },
  ];
  return (
    <Sheet
      title="Keys"
      sub="For programs: sent as “Authorization: Bearer …”. What the API offers is at /api/docs."
      actions={<Button onClick={() => setMaking(true)}>Make a key</Button>}
    >
      <DataTable
        caption="Keys for programs"
        rows={data.data}
        columns={columns}
        rowId={(row) => row.id}
        empty={
          <EmptyState title="No keys yet.">
            A program that brings in records or reads figures needs one of its own.
          </EmptyState>
        }
      />
      <KeyDialog isOpen={isMaking} onClose={() => setMaking(false)} />
      <ConfirmDialog
        isOpen={revoked !== null}
        onClose={() => setRevoked(null)}
        title={`Revoke ${revoked?.name ?? 'the key'}`}
        confirm="Revoke"
        isBusy={revoke.isPending}
        onConfirm={() => revoked && revoke.mutate(revoked.id, { onSettled: () => setRevoked(null) })}
      >
        The program that uses it stops at once. What it brought in stays.
      </ConfirmDialog>
    </Sheet>
  );
}
