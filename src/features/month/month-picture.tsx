import { lazy } from 'react';
import type { MonthReview, RateRow } from '../../../shared/reports';
import { ChartFrame } from '../../components/charts/chart-frame';
import type { MonthPoint } from '../../components/charts/month-chart';
import { DataTable } from '../../components/ui/data-table';
import type { Formats } from '../../lib/format';
import { monthColumns } from './month-columns';

const MonthChart = lazy(() =>
  import('../../components/charts/month-chart').then((module) => ({ default: module.MonthChart })),
);

const HEIGHT_PX = 360;

type Props = { review: MonthReview; formats: Formats };

/** Two years by month: what came back, what chance allows, what is still open. */
export function MonthPicture({ review, formats }: Props) {
  const { center, windowDays, unidentified, repairsInAll } = review;
  const rows = shownRows(review);
  const title = `Came back within ${windowDays} days, by month the work was done`;
  const hasLimits = rows.some((row) => row.limits !== null);
  const hasMaturing = rows.some((row) => row.maturing);
  const sub = [
    'dot: share, with 95\u202f% interval',
    hasLimits ? 'gray step: limit for a month of that size' : 'no limits before six settled months',
    hasMaturing ? 'hatched: days not over, ring: expected in the end' : '',
  ];
  return (
    <ChartFrame
      title={title}
      sub={sub.filter(Boolean).join(' · ')}
      how="comeback-rate"
      heightPx={HEIGHT_PX}
      chart={
        <MonthChart
          points={rows.flatMap((row) => (row.month === null ? [] : [point(row, row.month, review, formats)]))}
          center={center}
          centerText={formats.percent(center)}
          tickText={(share) => formats.percent(share, 0)}
          heightPx={HEIGHT_PX}
          label={title}
        />
      }
      table={
        <DataTable
          caption={title}
          rows={rows}
          columns={monthColumns(formats)}
          rowId={(row) => row.key}
          spreadsheet="came-back-by-month"
        />
      }
      foot={
        unidentified > 0 ? (
          <span className="text-sm text-dim">
            {formats.count(unidentified)} of {formats.counted(repairsInAll, 'repair')} name no machine and are
            not in it
          </span>
        ) : undefined
      }
    />
  );
}

const MONTHS_SHOWN = 24;
const AFTER_AN_OLD_ONE = 6;

/** Two years and what is still open; for a month before them, two years that end a little after it. */
function shownRows({ rows, month }: MonthReview): readonly RateRow[] {
  const open = rows.filter((row) => row.maturing).length;
  const start = Math.max(0, rows.length - open - MONTHS_SHOWN);
  const chosen = rows.findIndex((row) => row.month === month);
  if (chosen === -1 || chosen >= start) return rows.slice(start);
  const end = Math.min(rows.length, chosen + AFTER_AN_OLD_ONE);
  return rows.slice(Math.max(0, end - MONTHS_SHOWN), end);
}

function point(row: RateRow, month: string, review: MonthReview, formats: Formats): MonthPoint {
  const counts = `${formats.count(row.count)} of ${formats.counted(row.size, 'repair')}`;
  const lines = row.maturing
    ? [
        `${counts} so far; the ${review.windowDays} days are not over`,
        ...(row.projected === null ? [] : [`expected in the end: ${formats.percent(row.projected)}`]),
      ]
    : [
        `${counts} came back: ${formats.percent(row.rate)} (${formats.percentRange(row.interval)})`,
        ...(row.limits
          ? [`by chance ${formats.percentRange(row.limits)} for a month of this size`]
          : ['no limit yet: too few earlier months']),
      ];
  return {
    month,
    letter: formats.monthLetter(month),
    rate: row.rate,
    lower: row.interval.lower,
    upper: row.interval.upper,
    limitLower: row.limits?.lower ?? null,
    limitUpper: row.limits?.upper ?? null,
    isMaturing: row.maturing,
    projected: row.projected,
    isChosen: month === review.month,
    rateText: formats.percent(row.rate),
    tip: { heading: formats.month(month), lines },
  };
}
