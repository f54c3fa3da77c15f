import { Link } from 'react-router';
import type { UnitEvent } from '../../../shared/machines';
import type { Column } from '../../components/ui/data-table';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { readingOf, titleOf, workOf } from './unit-words';

/** A machine's visits and readings, each with its complaint and what was done. */
export function eventColumns(formats: Formats): Column<UnitEvent>[] {
  return [
    {
      id: 'what',
      header: 'Visit',
      value: titleOf,
      cell: (event) => (
        <>
          {event.repair ? <Link to={paths.repair(event.repair.id)}>{titleOf(event)}</Link> : titleOf(event)}
          {event.isComebackOf && (
            <span className="block text-sm text-dim">
              return of{' '}
              <Link className="underline" to={paths.repair(event.isComebackOf.id)}>
                {event.isComebackOf.name}
              </Link>
            </span>
          )}
        </>
      ),
      isRowHeader: true,
      className: 'min-w-[9rem]',
    },
    {
      id: 'on',
      header: 'Done',
      value: ({ on }) => on,
      cell: ({ on }) => formats.day(on),
      className: 'whitespace-nowrap',
    },
    {
      id: 'hours',
      header: 'Hours',
      value: ({ meterHours }) => meterHours,
      cell: (event) =>
        event.meterFault ? (
          <>
            <span className="text-dim line-through">{formats.hours(event.meterHours)}</span>
            <span className="block text-sm text-dim">
              {readingOf(event, formats).split(', ').slice(1).join(', ')}
            </span>
          </>
        ) : (
          <span className={event.meterHours === null ? 'text-dim' : ''}>{readingOf(event, formats)}</span>
        ),
      className: 'min-w-[7rem]',
    },
    {
      id: 'complaint',
      header: 'Complaint',
      value: ({ complaint }) => complaint,
      cell: ({ complaint }) => <span className="line-clamp-3">{complaint ?? '–'}</span>,
      className: 'min-w-[13rem]',
    },
    {
      id: 'work',
      header: 'Replaced or worked on',
      value: workOf,
      cell: (event) => workOf(event) || '–',
      className: 'min-w-[11rem]',
    },
    {
      id: 'total',
      header: 'Total',
      value: ({ kind, totalCents }) => (kind === 'repair' ? totalCents / 100 : null),
      cell: ({ kind, totalCents }) => formats.money(kind === 'repair' ? totalCents : null),
      align: 'right',
    },
  ];
}
