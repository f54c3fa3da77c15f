import { Link } from 'react-router';
import type { FindingWhole } from '../../../shared/findings';
import type { Column } from '../../components/ui/data-table';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';

type Episode = FindingWhole['cases'][number];

const daysOf = ({ visits }: Episode) => visits.at(-1)?.daysIn ?? 0;

/** Troubles with their repairs and what each says. */
export function caseColumns(formats: Formats): Column<Episode>[] {
  return [
    {
      id: 'machine',
      header: 'Machine',
      value: ({ unit }) => unit.name,
      cell: ({ unit }) => (
        <Link to={paths.unit(unit.id)} className="whitespace-nowrap">
          {unit.name}
        </Link>
      ),
      isRowHeader: true,
    },
    {
      id: 'first',
      header: 'First visit',
      value: ({ visits }) => visits[0]?.on ?? null,
      cell: ({ visits }) => formats.day(visits[0]?.on ?? null),
      className: 'whitespace-nowrap',
    },
    {
      id: 'repairs',
      header: 'Repairs',
      value: ({ visits }) => visits.map(({ repair }) => repair.name).join(', '),
      cell: ({ visits }) => (
        <span className="flex flex-wrap gap-x-3">
          {visits.map(({ repair }) => (
            <Link key={repair.id} to={paths.repair(repair.id)} className="inline-flex min-h-6 items-center">
              {repair.name}
            </Link>
          ))}
        </span>
      ),
    },
    {
      id: 'days',
      header: 'Over',
      value: daysOf,
      cell: (row) => (row.visits.length > 1 ? formats.days(daysOf(row)) : 'one visit'),
      align: 'right',
    },
    {
      id: 'spent',
      header: 'Billed',
      value: ({ visits }) => visits.reduce((sum, { spentCents }) => sum + spentCents, 0) / 100,
      cell: ({ visits }) => formats.wholeMoney(visits.reduce((sum, { spentCents }) => sum + spentCents, 0)),
      align: 'right',
    },
    { id: 'why', header: 'What it says', value: ({ why }) => why, className: 'desk:pl-4 min-w-[14rem]' },
  ];
}
