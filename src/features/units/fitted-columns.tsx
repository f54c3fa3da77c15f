import { Link } from 'react-router';
import type { UnitWhole } from '../../../shared/machines';
import type { Column } from '../../components/ui/data-table';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';

type Fitted = UnitWhole['fitted'][number];

export function fittedColumns(formats: Formats, mayAnalyze: boolean): Column<Fitted>[] {
  return [
    {
      id: 'component',
      header: 'Component',
      value: ({ component }) => component.name,
      cell: ({ component }) =>
        mayAnalyze ? <Link to={paths.part(component.id)}>{component.name}</Link> : component.name,
      isRowHeader: true,
    },
    {
      id: 'part',
      header: 'Number',
      value: ({ part }) => part?.name ?? null,
      cell: ({ part }) => part?.name ?? '–',
    },
    {
      id: 'on',
      header: 'Fitted',
      value: ({ on }) => on,
      cell: ({ on }) => formats.day(on),
      className: 'whitespace-nowrap',
    },
    {
      id: 'hours',
      header: 'Has run',
      value: ({ hoursSince }) => hoursSince,
      cell: ({ hoursSince }) => formats.hours(hoursSince),
      align: 'right',
    },
  ];
}
