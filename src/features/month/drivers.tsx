import { useMemo } from 'react';
import { Link } from 'react-router';
import type { MonthReview } from '../../../shared/reports';
import { DataTable, type Column } from '../../components/ui/data-table';
import { HowComputed } from '../../components/ui/how-computed';
import { IntervalBar } from '../../components/ui/interval-bar';
import { Sheet } from '../../components/ui/sheet';
import { TooFew } from '../../components/ui/states';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';

type Driver = MonthReview['drivers'][number];
type Props = { review: MonthReview; formats: Formats };

/** Which work comes back more than the shop's own average would give: the raw count first. */
export function Drivers({ review, formats }: Props) {
  const columns = useMemo(() => driverColumns(review, formats), [review, formats]);
  return (
    <Sheet
      title="What drives it"
      sub="Last 12 months, by what was replaced the first time; ranked by what came back beyond this shop’s own average. Each comeback counts once."
      actions={<HowComputed anchor="few-jobs" />}
    >
      <DataTable
        caption="What drives it: components and models whose repairs came back"
        rows={review.drivers}
        columns={columns}
        rowId={(row) => `${row.component.id} ${row.model?.id ?? ''}`}
        spreadsheet="what-drives-it"
        empty={
          <TooFew what="Nothing stands out.">
            No component came back often enough in the last 12 months to be told apart from the shop’s
            average.
          </TooFew>
        }
      />
    </Sheet>
  );
}

function driverColumns(review: MonthReview, formats: Formats): Column<Driver>[] {
  const max = Math.max(0.1, ...review.drivers.map((row) => row.shrunkenInterval.upper ?? row.shrunken));
  return [
    {
      id: 'component',
      header: 'Component, model',
      value: (row) => `${row.component.name}${row.model ? `, ${row.model.name}` : ''}`,
      cell: (row) => (
        <>
          <Link to={paths.part(row.component.id, { model: row.model?.id })}>{row.component.name}</Link>
          <span className="block text-sm text-dim">{row.model?.name ?? 'all models'}</span>
        </>
      ),
      isRowHeader: true,
    },
    {
      id: 'size',
      header: 'Done',
      value: (row) => row.size,
      cell: (row) => formats.count(row.size),
      align: 'right',
    },
    {
      id: 'count',
      header: 'Came back',
      value: (row) => row.count,
      cell: (row) => `${formats.count(row.count)} (${formats.percent(row.rate, 0)})`,
      align: 'right',
    },
    {
      id: 'shrunken',
      header: 'After allowing for few jobs',
      value: (row) => row.shrunken,
      cell: (row) => (
        <IntervalBar
          estimate={row.shrunken}
          lower={row.shrunkenInterval.lower ?? 0}
          upper={row.shrunkenInterval.upper ?? 1}
          max={max}
          center={review.center}
          text={formats.percent(row.shrunken, 0)}
          label={`${formats.percent(row.shrunken, 0)} (${formats.percentRange(row.shrunkenInterval, 0)})`}
        />
      ),
      className: 'desk:pl-6',
    },
    {
      id: 'beyond',
      header: 'Beyond average',
      value: (row) => row.beyondAverage,
      cell: (row) => `${row.beyondAverage >= 0 ? '+' : '−'}${formats.number(Math.abs(row.beyondAverage), 1)}`,
      align: 'right',
    },
    {
      id: 'cost',
      header: 'Cost',
      value: (row) => row.costCents / 100,
      cell: (row) => formats.wholeMoney(row.costCents),
      align: 'right',
    },
    {
      id: 'why',
      header: 'Why, most often',
      value: (row) => row.oftenWhy,
      cell: (row) => row.oftenWhy ?? <span className="text-dim">not said</span>,
      className: 'desk:pl-6',
    },
  ];
}
