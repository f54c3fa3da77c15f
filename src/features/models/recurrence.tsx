import { lazy } from 'react';
import type { ModelWhole } from '../../../shared/machines';
import { ChartFrame } from '../../components/charts/chart-frame';
import { DataTable, type Column } from '../../components/ui/data-table';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import { TooFew } from '../../components/ui/states';
import type { Formats } from '../../lib/format';

const MeanCumulativeChart = lazy(() =>
  import('../../components/charts/mean-cumulative-chart').then((module) => ({
    default: module.MeanCumulativeChart,
  })),
);

const HEIGHT_PX = 280;
const DAYS_PER_YEAR = 365.25;

type Recurrence = ModelWhole['recurrence'];
type Row = Recurrence['rows'][number];
type Props = { recurrence: Recurrence; formats: Formats };

/** How many repairs a machine has needed by each age, and what may be said of the pace. */
export function RecurrencePicture({ recurrence, formats }: Props) {
  const { rows, machines, repairs } = recurrence;
  const title = 'Repairs a machine has needed, by its age in years';
  const last = rows.at(-1);
  if (recurrence.kind === 'notEstimable' || !last) {
    return (
      <Sheet title={title}>
        <TooFew what="Too little to draw.">
          It takes machines whose first day of use is known, and some repairs of them.
        </TooFew>
      </Sheet>
    );
  }
  const among = recurrence.amongThoseThatCameIn ? ' among machines that came in ·' : '';
  return (
    <ChartFrame
      title={title}
      sub={`steps: average so far, with 95\u202f% band ·${among} ${formats.counted(repairs, 'repair')} of ${formats.counted(machines, 'machine')}`}
      how="mean-cumulative"
      heightPx={HEIGHT_PX}
      chart={
        <MeanCumulativeChart
          curves={[
            {
              name: 'all',
              end: last.days,
              points: rows.map((row) => ({
                at: row.days,
                value: row.mean,
                lower: row.lower,
                upper: row.upper,
                tip: {
                  heading: `${years(row, formats)} years old`,
                  lines: [
                    `${formats.number(row.mean, 2)} repairs a machine${limits(row, formats)}`,
                    `${formats.counted(row.atRisk, 'machine')} watched at this age`,
                  ],
                },
              })),
            },
          ]}
          end={last.days}
          highest={Math.max(
            last.mean,
            ...rows.slice(0, Math.ceil(rows.length * 0.9)).map(({ upper }) => upper ?? 0),
          )}
          ticks={yearTicks(last.days).map((at) => ({
            at: at * DAYS_PER_YEAR,
            text: formats.number(at),
            under: formats.count(watchedAt(rows, at * DAYS_PER_YEAR)),
          }))}
          yTickText={(value) => formats.number(value, Number.isInteger(value) ? 0 : 1)}
          heightPx={HEIGHT_PX}
          label={title}
        />
      }
      table={
        <DataTable
          caption={title}
          rows={rows}
          columns={columns(formats)}
          rowId={(row) => String(row.days)}
          spreadsheet="repairs-by-age"
        />
      }
    />
  );
}

/** The pace in words; a mean only where the rate does not change with age. */
export function Pace({ recurrence, formats }: Props) {
  const { meanDaysBetween, meanDaysBetweenInterval, trend } = recurrence;
  return (
    <Sheet title="Do repairs come faster with age?" actions={<HowComputed anchor="trend">how</HowComputed>}>
      <p>{TREND_WORDS[trend]}</p>
      {meanDaysBetween !== null && (
        <p className="mt-2">
          One repair in <strong className="font-heading">{formats.days(meanDaysBetween)}</strong> of a machine
          on average ({formats.range(meanDaysBetweenInterval, 0)} days).{' '}
          <HowComputed anchor="mtbf">how</HowComputed>
        </p>
      )}
      {recurrence.amongThoseThatCameIn && (
        <p className="mt-2 text-sm text-dim">
          Only machines that came in are known, each seen because something failed: no mean time is given.{' '}
          <HowComputed anchor="machines">why</HowComputed>
        </p>
      )}
    </Sheet>
  );
}

const TREND_WORDS: Record<Recurrence['trend'], string> = {
  rising: 'Yes: the curve bends upward, and more than chance explains.',
  falling: 'No: they come slower as the machine ages.',
  no_trend: 'Not that the records can show: they come at a steady pace, or the change is too small to see.',
  too_few: 'Too few repairs to tell.',
};

const years = ({ days }: Row, formats: Formats) => formats.number(days / DAYS_PER_YEAR, 1);

const limits = ({ lower, upper }: Row, formats: Formats) =>
  lower === null || upper === null ? '' : ` (${formats.range({ lower, upper }, 2)})`;

const watchedAt = (rows: readonly Row[], days: number) =>
  (rows.find((row) => row.days >= days) ?? rows.at(-1))?.atRisk ?? 0;

function yearTicks(lastDays: number): number[] {
  const most = lastDays / DAYS_PER_YEAR;
  const step = [0.5, 1, 2, 5, 10].find((size) => most / size <= 7) ?? 20;
  return Array.from({ length: Math.floor(most / step) + 1 }, (_, index) => index * step);
}

function columns(formats: Formats): Column<Row>[] {
  return [
    {
      id: 'age',
      header: 'Age, years',
      value: (row) => row.days / DAYS_PER_YEAR,
      cell: (row) => years(row, formats),
      align: 'right',
      isRowHeader: true,
    },
    {
      id: 'watched',
      header: 'Machines watched',
      value: (row) => row.atRisk,
      cell: (row) => formats.count(row.atRisk),
      align: 'right',
    },
    {
      id: 'mean',
      header: 'Repairs a machine',
      value: (row) => row.mean,
      cell: (row) => `${formats.number(row.mean, 2)}${limits(row, formats)}`,
      align: 'right',
    },
    { id: 'lower', header: 'Limit below', value: (row) => row.lower, only: 'spreadsheet' },
    { id: 'upper', header: 'Limit above', value: (row) => row.upper, only: 'spreadsheet' },
  ];
}
