import { lazy } from 'react';
import type { PartLife } from '../../../shared/parts';
import { ChartFrame } from '../../components/charts/chart-frame';
import { DataTable, type Column } from '../../components/ui/data-table';
import type { Ages } from '../../lib/ages';
import type { Formats } from '../../lib/format';
import { lineFit, paperY, type FitPoint, type LineFit } from './line-fit';

const ProbabilityChart = lazy(() =>
  import('../../components/charts/probability-chart').then((module) => ({
    default: module.ProbabilityChart,
  })),
);

const HEIGHT_PX = 300;
const SHARES = [0.001, 0.01, 0.05, 0.1, 0.2, 0.5, 0.8, 0.95, 0.99];

type Props = { life: PartLife; formats: Formats; ages: Ages };

/** Does the fitted line describe what was seen? */
export function FitPicture({ life, formats, ages }: Props) {
  const fit = lineFit(life);
  if (!fit || fit.points.length < 2) return null;
  const { points } = fit;
  const times = points.map(({ time }) => time);
  const from = Math.min(...times);
  const to = Math.max(...times);
  const title = 'Does the line fit?';
  return (
    <ChartFrame
      title={title}
      sub={verdict(fit, formats)}
      how="weibull"
      heightPx={HEIGHT_PX}
      chart={
        <ProbabilityChart
          points={points.map((point) => ({
            x: point.x,
            y: point.y,
            lowerY: point.lowerY,
            upperY: point.upperY,
            isMissed: point.isMissed,
            tip: {
              heading: ages.of(point.time),
              lines: [
                `${formats.percent(point.failedShare)} failed by then; the line says ${formats.percent(point.fittedShare)}`,
                `${formats.count(point.failures)} failed here, of ${formats.count(point.atRisk)} running`,
                point.isMissed ? 'the line is outside of the limits' : '',
              ].filter(Boolean),
            },
          }))}
          line={[
            { x: Math.log(from), y: fit.yAt(from) },
            { x: Math.log(to), y: fit.yAt(to) },
          ]}
          xTicks={ageTicks(ages.inUnit(from), ages.inUnit(to)).map((age) => ({
            at: Math.log(age * (to / ages.inUnit(to))),
            text: formats.number(age, age < 1 ? 1 : 0),
          }))}
          yTicks={shareTicks(points).map((share) => ({
            at: paperY(share),
            text: formats.percent(share, share < 0.01 ? 1 : 0),
          }))}
          xLabel={`${ages.unit} since fitted; share failed on the left, both stretched so that the line is straight`}
          heightPx={HEIGHT_PX}
          label={title}
        />
      }
      table={
        <DataTable
          caption={title}
          rows={points}
          columns={fitColumns(ages, formats)}
          rowId={(point) => String(point.time)}
          spreadsheet="does-the-line-fit"
        />
      }
    />
  );
}

function verdict({ points, missed, judged }: LineFit, formats: Formats): string {
  const read = 'dot: share failed by that age, with 95\u202f% limits · line: the fit';
  if (judged === 0) return `${read}. Too few failures to judge it.`;
  const kept = `${formats.count(judged - missed)} of ${formats.count(judged)}`;
  if (missed <= judged * 0.05) return `${read}. It runs within the limits of ${kept}: it describes them.`;
  const isYoung = points.slice(0, Math.ceil(points.length / 3)).some(({ isMissed }) => isMissed);
  return `${read}. It runs within the limits of only ${kept}: ${
    isYoung
      ? 'early failures do not follow it, perhaps two kinds of failure in one curve'
      : 'it does not describe all of them'
  }. Trust the steps more than the line.`;
}

/** 1, 2 and 5 of each power of ten within the ages seen. */
function ageTicks(from: number, to: number): number[] {
  const ticks: number[] = [];
  for (let power = Math.floor(Math.log10(from)); power <= Math.log10(to); power++) {
    ticks.push(...[1, 2, 5].map((factor) => factor * 10 ** power));
  }
  const within = ticks.filter((tick) => tick >= from * 0.8 && tick <= to * 1.25);
  return within.length > 7 ? within.filter((tick) => Math.abs(Math.log10(tick) % 1) < 1e-9) : within;
}

/** From the step below the lowest point to the one above the highest. */
function shareTicks(points: readonly FitPoint[]): number[] {
  const shares = points.map(({ failedShare }) => failedShare);
  const low = SHARES.filter((share) => share <= Math.min(...shares)).at(-1) ?? 0.001;
  const high = SHARES.find((share) => share >= Math.max(...shares)) ?? 0.99;
  return SHARES.filter((share) => share >= low && share <= high);
}

function fitColumns(ages: Ages, formats: Formats): Column<FitPoint>[] {
  return [
    {
      id: 'age',
      header: `Age, ${ages.unit}`,
      value: (point) => ages.inUnit(point.time),
      cell: (point) => ages.of(point.time),
      align: 'right',
      isRowHeader: true,
    },
    {
      id: 'failed',
      header: 'Failed by then',
      value: (point) => point.failedShare,
      cell: (point) => formats.percent(point.failedShare),
      align: 'right',
    },
    {
      id: 'line',
      header: 'The line says',
      value: (point) => point.fittedShare,
      cell: (point) => formats.percent(point.fittedShare),
      align: 'right',
    },
    {
      id: 'verdict',
      header: 'Within the limits',
      value: (point) => (point.isMissed ? 'no' : 'yes'),
    },
  ];
}
