import { useSuspenseQuery } from '@tanstack/react-query';
import type { Technician } from '../../../shared/administration';
import { Button } from '../../components/ui/button';
import { DataTable, type Column } from '../../components/ui/data-table';
import { Select } from '../../components/ui/select';
import { Sheet } from '../../components/ui/sheet';
import { EmptyState } from '../../components/ui/states';
import { useFormats } from '../../lib/session';
import { useChange } from '../../lib/use-change';
import { giveSpelling, techniciansQuery } from './queries';
import { TechnicianPeople } from './technician-people';

type Spelling = Technician['spellings'][number] & { technicianId: string };

/** "JIM", "Jim K." and "jk" are one person: someone who knows says so. */
export function Technicians() {
  const { data } = useSuspenseQuery(techniciansQuery);
  const formats = useFormats();
  const give = useChange(giveSpelling, {
    stale: ['technicians'],
    said: 'Saved. Figures by technician follow.',
  });
  const people = data.data.map(({ id, displayName }) => ({ value: id, label: displayName }));
  const spellings = data.data.flatMap((technician) =>
    technician.spellings.map((spelling) => ({ ...spelling, technicianId: technician.id })),
  );
  const columns: Column<Spelling>[] = [
    {
      id: 'spelling',
      header: 'Written in the records',
      value: (row) => row.spelling,
      cell: (row) => `“${row.spelling}”`,
      isRowHeader: true,
    },
    {
      id: 'repairs',
      header: 'Repairs',
      value: (row) => row.repairs,
      cell: (row) => formats.count(row.repairs),
      align: 'right',
    },
    {
      id: 'means',
      header: 'Means',
      value: (row) => people.find(({ value }) => value === row.technicianId)?.label ?? null,
      cell: (row) => (
        <Select
          label={`Who “${row.spelling}” is`}
          value={row.technicianId}
          options={people}
          onChange={(technicianId) => give.mutate({ id: row.id, technicianId })}
        />
      ),
      className: 'min-w-48',
    },
    {
      id: 'confirmed',
      header: 'Confirmed',
      value: (row) => (row.isConfirmed ? 'yes' : 'not yet'),
      cell: (row) =>
        row.isConfirmed ? (
          'yes'
        ) : (
          <Button
            look="text"
            aria-label={`Confirm “${row.spelling}”`}
            onClick={() => give.mutate({ id: row.id, technicianId: row.technicianId })}
          >
            Confirm
          </Button>
        ),
    },
  ];
  if (data.data.length === 0) {
    return (
      <EmptyState title="No technician is named in the records yet.">
        Their names appear here once a file with a technician column is brought in.
      </EmptyState>
    );
  }
  return (
    <>
      <Sheet title="Names in the records" sub="Several spellings can mean one person.">
        <DataTable
          caption="Spellings of technicians’ names"
          rows={spellings}
          columns={columns}
          rowId={(row) => row.id}
          initialSort={{ id: 'repairs', desc: true }}
        />
      </Sheet>
      <TechnicianPeople technicians={data.data} />
    </>
  );
}
