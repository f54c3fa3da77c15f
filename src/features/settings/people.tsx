import { useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Member } from '../../../shared/administration';
import { ROLE_NAMES, ROLES, type Role } from '../../../shared/roles';
import { Button } from '../../components/ui/button';
import { DataTable, type Column } from '../../components/ui/data-table';
import { Select } from '../../components/ui/select';
import { Sheet } from '../../components/ui/sheet';
import { useSession } from '../../lib/session';
import { useChange } from '../../lib/use-change';
import { InviteDialog } from './invite-dialog';
import { changePerson, inviteAgain, peopleQuery, techniciansQuery } from './queries';

const ROLE_CHOICES = ROLES.map((role) => ({ value: role, label: ROLE_NAMES[role] }));

/** Who may come in, and as what. */
export function People() {
  const { data: people } = useSuspenseQuery(peopleQuery);
  const { data: technicians } = useSuspenseQuery(techniciansQuery);
  const { user } = useSession();
  const [isInviting, setInviting] = useState(false);
  const change = useChange(changePerson, { stale: ['people'], said: 'Saved.' });
  const again = useChange(inviteAgain, { stale: ['people'], said: 'The invitation is on its way again.' });
  const isSelf = (row: Member) => row.userId === user.id;

  const columns: Column<Member>[] = [
    {
      id: 'name',
      header: 'Name',
      value: (row) => row.displayName,
      cell: (row) => (
        <>
          {row.displayName}
          <span className="block text-sm text-dim">{row.email}</span>
        </>
      ),
      isRowHeader: true,
    },
    {
      id: 'role',
      header: 'Role',
      value: (row) => ROLE_NAMES[row.role],
      cell: (row) =>
        isSelf(row) ? (
          ROLE_NAMES[row.role]
        ) : (
          <Select
            label={`Role of ${row.displayName}`}
            value={row.role}
            options={ROLE_CHOICES}
            onChange={(role) => change.mutate({ id: row.id, role: role as Role })}
          />
        ),
    },
    {
      id: 'technician',
      header: 'In the records as',
      value: (row) => technicians.data.find(({ id }) => id === row.technicianId)?.displayName ?? null,
      cell: (row) => (
        <Select
          label={`Technician that ${row.displayName} is`}
          value={row.technicianId ?? ''}
          options={[
            { value: '', label: 'nobody' },
            ...technicians.data.map(({ id, displayName }) => ({ value: id, label: displayName })),
          ]}
          onChange={(id) => change.mutate({ id: row.id, technicianId: id === '' ? null : id })}
        />
      ),
    },
    { id: 'standing', header: 'Standing', value: standing },
    {
      id: 'actions',
      header: 'Change',
      value: () => null,
      isSortable: false,
      cell: (row) => (
        <span className="flex flex-wrap gap-x-4">
          {!row.hasPassword && !row.isDisabled && (
            <Button
              look="text"
              aria-label={`Invite ${row.displayName} again`}
              onClick={() => again.mutate(row.id)}
            >
              Invite again
            </Button>
          )}
          {!isSelf(row) && (
            <Button
              look="text"
              aria-label={`${row.isDisabled ? 'Let in' : 'Shut out'} ${row.displayName}`}
              onClick={() => change.mutate({ id: row.id, isDisabled: !row.isDisabled })}
            >
              {row.isDisabled ? 'Let in' : 'Shut out'}
            </Button>
          )}
        </span>
      ),
    },
  ];
  return (
    <Sheet title="People" actions={<Button onClick={() => setInviting(true)}>Invite someone</Button>}>
      <DataTable caption="People of this shop" rows={people.data} columns={columns} rowId={(row) => row.id} />
      <InviteDialog isOpen={isInviting} onClose={() => setInviting(false)} />
    </Sheet>
  );
}

function standing({ isDisabled, hasPassword }: Member): string {
  if (isDisabled) return 'shut out';
  return hasPassword ? 'may sign in' : 'invited, no password yet';
}
