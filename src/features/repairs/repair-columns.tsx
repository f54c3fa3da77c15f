import { Link } from 'react-router';
import type { RepairListed } from '../../../shared/repairs';
import type { Column } from '../../components/ui/data-table';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { TICKET_WORDS } from '../../lib/record-words';

/** Repairs as the server sorts them, the newest work first. */
export function repairColumns(formats: Formats): Column<RepairListed>[] {
  const columns: Column<RepairListed>[] = [
    {
      id: 'number',
      header: 'Number',
      value: ({ number }) => number,
      cell: (row) => (
        <>
          <Link to={paths.repair(row.id)}>{row.number}</Link>
          {row.ticketType !== 'repair' && (
            <span className="block text-sm text-dim">{TICKET_WORDS[row.ticketType]}</span>
          )}
          {row.location && <span className="block text-sm text-dim">{row.location}</span>}
        </>
      ),
      isRowHeader: true,
      className: 'whitespace-nowrap',
    },
    {
      id: 'done',
      header: 'Done',
      value: ({ workOn }) => workOn,
      cell: ({ workOn }) => formats.day(workOn),
      className: 'whitespace-nowrap',
    },
    {
      id: 'machine',
      header: 'Machine',
      value: ({ unit, model }) => [model?.name, unit?.name].filter(Boolean).join(' '),
      cell: ({ unit, model }) => (
        <>
          {unit ? (
            <Link to={paths.unit(unit.id)}>{unit.name}</Link>
          ) : (
            <span className="text-dim">not identified</span>
          )}
          {model && <span className="block text-sm whitespace-nowrap text-dim">{model.name}</span>}
        </>
      ),
    },
    {
      id: 'hours',
      header: 'Hours',
      value: ({ meterHours }) => meterHours,
      cell: ({ meterHours }) => formats.hours(meterHours),
      align: 'right',
    },
    {
      id: 'complaint',
      header: 'Complaint',
      value: ({ complaint }) => complaint,
      cell: ({ complaint }) =>
        complaint ? (
          <span className="line-clamp-2">{complaint}</span>
        ) : (
          <span className="text-dim">none written</span>
        ),
      className: 'min-w-[15rem] desk:pl-3',
    },
    {
      id: 'components',
      header: 'Replaced or worked on',
      value: ({ components }) => components.map(({ name }) => name).join(', '),
      cell: ({ components }) => <span className="line-clamp-2">{listed(components)}</span>,
      className: 'min-w-[9rem]',
    },
    {
      id: 'total',
      header: 'Total',
      value: ({ totalCents }) => totalCents / 100,
      cell: ({ totalCents }) => formats.money(totalCents),
      align: 'right',
    },
    {
      id: 'back',
      header: 'Came back',
      value: ({ cameBackAfterDays }) => cameBackAfterDays,
      cell: (row) => <CameBack row={row} formats={formats} />,
      className: 'desk:pl-3 whitespace-nowrap',
    },
  ];
  return columns.map((column) => ({ ...column, isSortable: false }));
}

const listed = (components: RepairListed['components']) =>
  components.length === 0 ? '–' : components.map(({ name }) => name).join(', ');

function CameBack({ row, formats }: { row: RepairListed; formats: Formats }) {
  const { cameBackAfterDays, isComebackOf } = row;
  return (
    <>
      {cameBackAfterDays !== null && (
        <span className="font-label text-oxide">after {formats.days(cameBackAfterDays)}</span>
      )}
      {isComebackOf && (
        <span className="block text-sm text-dim">
          return of{' '}
          <Link className="underline" to={paths.repair(isComebackOf.id)}>
            {isComebackOf.name}
          </Link>
        </span>
      )}
    </>
  );
}
