import { useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '../../components/ui/button';
import { ConfirmDialog } from '../../components/ui/confirm-dialog';
import { DataTable, type Column } from '../../components/ui/data-table';
import { Sheet } from '../../components/ui/sheet';
import { EmptyState } from '../../components/ui/states';
import { useCan } from '../../lib/session';
import { useChange } from '../../lib/use-change';
import { FamilyDialog } from './family-dialog';
import { familiesQuery, removeFamily, type Family } from './queries';

/** Models that share a deck, an engine or a clutch. */
export function Families() {
  const { data } = useSuspenseQuery(familiesQuery);
  const { can } = useCan();
  const mayWrite = can('dictionary', 'write');
  const [edited, setEdited] = useState<Family | 'new' | null>(null);
  const [removed, setRemoved] = useState<Family | null>(null);
  const remove = useChange(removeFamily, {
    stale: ['families'],
    said: 'The family is gone; its models stay.',
  });
  const columns: Column<Family>[] = [
    { id: 'name', header: 'Family', value: (row) => row.name, isRowHeader: true },
    { id: 'models', header: 'Models', value: (row) => row.models.map(({ name }) => name).join(', ') },
    {
      id: 'change',
      header: 'Change',
      value: () => null,
      isSortable: false,
      cell: (row) =>
        mayWrite && (
          <span className="flex flex-wrap gap-x-4">
            <Button look="text" aria-label={`Change ${row.name}`} onClick={() => setEdited(row)}>
              Change
            </Button>
            <Button look="text" aria-label={`Remove ${row.name}`} onClick={() => setRemoved(row)}>
              Remove
            </Button>
          </span>
        ),
    },
  ];
  return (
    <Sheet
      title="Families"
      sub="Models that share a deck, an engine or a clutch: their figures can be pooled."
      actions={mayWrite && <Button onClick={() => setEdited('new')}>Make a family</Button>}
    >
      <DataTable
        caption="Families of models"
        rows={data.data}
        columns={columns}
        rowId={(row) => row.id}
        empty={
          <EmptyState title="No families yet.">
            Where each model has few machines, a family lets what they share be judged together.
          </EmptyState>
        }
      />
      {edited && <FamilyDialog family={edited === 'new' ? null : edited} onClose={() => setEdited(null)} />}
      <ConfirmDialog
        isOpen={removed !== null}
        onClose={() => setRemoved(null)}
        title={`Remove ${removed?.name ?? 'the family'}`}
        confirm="Remove"
        isBusy={remove.isPending}
        onConfirm={() => removed && remove.mutate(removed.id, { onSettled: () => setRemoved(null) })}
      >
        Figures are no longer pooled over it. The models and their repairs stay.
      </ConfirmDialog>
    </Sheet>
  );
}
