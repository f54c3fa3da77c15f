import { lazy } from 'react';
import type { RateRow } from '../../../shared/reports';
import { ChartFrame } from '../../components/charts/chart-frame';
import { DataTable, type Column } from '../../components/ui/data-table';
import { TooFew } from '../../components/ui/states';
import type { Formats } from '../../lib/format';
import { shareOfAll, standsOut } from './model-words';

const FunnelChart = lazy(() =>
  import('../../components/charts/funnel-chart').then((module) => ({ default: module.FunnelChart })),
);

const HEIGHT_PX = 320;

type Props = { rates: readonly RateRow[]; windowDays: number; formats: Formats };

/** Every model's share against its number of jobs: small numbers may wander, large ones may not. */
export function ModelsPicture({ rates, windowDays, formats }: Props) {
  const title = `Came back within ${windowDays} days, by how many jobs a model had`;
  const shown = rates.filter((row) => row.size > 0);
  const center = shareOfAll(shown);
  return (
    <ChartFrame
      title={title}
      sub="dot: a model · between the curves: what chance allows for so many jobs · diamond: outside of it"
      how="limits"
      heightPx={HEIGHT_PX}
      chart={
        shown.length < 2 ? (
          <TooFew what="Too few models to compare." />
        ) : (
          <FunnelChart
            points={shown.map((row) => point(row, formats))}
            center={center}
            centerText={formats.percent(center)}
            xLabel="repairs that could come back"
            tickText={(share) => formats.percent(share, 0)}
            heightPx={HEIGHT_PX}
            label={title}
          />
        )
      }
      table={
        <DataTable
          caption={title}
          rows={shown}
          columns={rateColumns(formats)}
          rowId={(row) => row.key}
          initialSort={{ id: 'size', desc: true }}
          spreadsheet="came-back-by-model"
        />
      }
    />
  );
}

function point(row: RateRow, formats: Formats) {
  return {
    id: row.key,
    name: row.label,
    size: row.size,
    rate: row.rate ?? 0,
    limitLower: row.limits?.lower ?? null,
    limitUpper: row.limits?.upper ?? null,
    tip: {
      heading: row.label,
      lines: [
        `${formats.count(row.count)} of ${formats.counted(row.size, 'repair')} came back: ${formats.percent(row.rate)} (${formats.percentRange(row.interval)})`,
        ...(row.shrunken === null ? [] : [`after allowing for few jobs ${formats.percent(row.shrunken)}`]),
        ...(row.limits ? [`by chance ${formats.percentRange(row.limits)} for so many`] : []),
      ],
    },
  };
}

function rateColumns(formats: Formats): Column<RateRow>[] {
  return [
    { id: 'model', header: 'Model', value: (row) => row.label, isRowHeader: true },
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
      cell: (row) => `${formats.percent(row.rate)} (${formats.percentRange(row.interval)})`,
      align: 'right',
    },
    {
      id: 'chance',
      header: 'Chance allows',
      value: (row) => row.limits?.upper ?? null,
      cell: (row) => (row.limits ? formats.percentRange(row.limits) : '–'),
      align: 'right',
    },
    {
      id: 'standing',
      header: 'Standing',
      value: (row) =>
        ({ over: 'more than chance', under: 'less than chance', none: 'within chance' })[
          standsOut(row) ?? 'none'
        ],
      className: 'whitespace-nowrap',
    },
  ];
}
