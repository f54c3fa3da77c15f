import type { RateRow } from '../../../shared/reports';
import type { Column } from '../../components/ui/data-table';
import type { Formats } from '../../lib/format';

/** The picture's figures, month by month. */
export function monthColumns(formats: Formats): Column<RateRow>[] {
  return [
    {
      id: 'month',
      header: 'Work done in',
      value: (row) => row.month,
      cell: (row) => (row.month ? formats.month(row.month) : row.label),
      isRowHeader: true,
      className: 'whitespace-nowrap',
    },
    {
      id: 'size',
      header: 'Repairs',
      value: (row) => row.size,
      cell: (row) => formats.count(row.size),
      align: 'right',
    },
    {
      id: 'count',
      header: 'Came back',
      value: (row) => row.count,
      cell: (row) => formats.count(row.count),
      align: 'right',
    },
    {
      id: 'rate',
      header: 'Share',
      value: (row) => row.rate,
      cell: (row) => formats.percent(row.rate),
      align: 'right',
    },
    {
      id: 'interval',
      header: '95\u202f% interval',
      value: (row) => row.interval.upper,
      cell: (row) => formats.percentRange(row.interval),
      align: 'right',
      only: 'screen',
      isSortable: false,
    },
    { id: 'lower', header: 'Interval from', value: (row) => row.interval.lower, only: 'spreadsheet' },
    { id: 'upper', header: 'Interval to', value: (row) => row.interval.upper, only: 'spreadsheet' },
    {
      id: 'limit',
      header: 'Limit by chance',
      value: (row) => row.limits?.upper ?? null,
      cell: (row) => formats.percent(row.limits?.upper ?? null),
      align: 'right',
    },
    {
      id: 'ours',
      header: 'Of them ours',
      value: (row) => row.oursCount,
      cell: (row) => `${formats.count(row.oursCount)} (${formats.percent(row.oursRate)})`,
      align: 'right',
    },
    {
      id: 'standing',
      header: 'Standing',
      value: (row) => standing(row),
      cell: (row) =>
        row.maturing && row.projected !== null
          ? `days not over; ${formats.percent(row.projected)} expected`
          : standing(row),
      className: 'whitespace-nowrap',
    },
    { id: 'projected', header: 'Expected in the end', value: (row) => row.projected, only: 'spreadsheet' },
  ];
}

function standing({ maturing, rate, limits }: RateRow): string {
  if (maturing) return 'days not over';
  if (rate === null || limits === null) return 'no limit yet';
  if (limits.upper !== null && rate > limits.upper) return 'over the limit';
  if (limits.lower !== null && rate < limits.lower) return 'below the limit';
  return 'within chance';
}
