import { lazy, useMemo, type ReactNode } from 'react';
import type { PartLife } from '../../../shared/parts';
import { ChartFrame } from '../../components/charts/chart-frame';
import { DataTable } from '../../components/ui/data-table';
import type { Ages } from '../../lib/ages';
import type { Formats } from '../../lib/format';
import { lifeColumns, type LifeTableRow } from './life-columns';
import { curveOf, lineOf, marksOf, ticksOf } from './life-curves';
import { isLineDrawn, oldestSeen } from './life-words';

const LifeChart = lazy(() =>
  import('../../components/charts/life-chart').then((module) => ({ default: module.LifeChart })),
);

const HEIGHT_PX = 340;

type Props = {
  life: PartLife;
  /** Lives of single part numbers, where they are to be told apart. */
  apart: readonly { name: string; life: PartLife }[];
  formats: Formats;
  ages: Ages;
  foot?: ReactNode;
};

/** Share still running by age: as observed, as fitted, with how many it rests on. */
export function LifePicture({ life, apart, formats, ages, foot }: Props) {
  const title = `Share still running, by ${ages.unit} since fitted`;
  const isApart = apart.length > 0;
  const shown = useMemo(
    () => (isApart ? apart : [{ name: life.component.name, life }]),
    [apart, isApart, life],
  );
  const rows = useMemo(
    () =>
      shown.flatMap(({ name, life: of }) =>
        of.kaplanMeier.map((row): LifeTableRow => ({ ...row, number: isApart ? name : null })),
      ),
    [shown, isApart],
  );
  const columns = useMemo(() => lifeColumns(ages, formats, isApart), [ages, formats, isApart]);
  const isLine = !isApart && isLineDrawn(life);
  const half = isLine ? marksOf(life, ages).at(-1)?.at : undefined;
  const oldest = Math.max(...shown.map(({ life: of }) => oldestSeen(of)));
  // The half-way point is shown where it lies not far beyond what was seen.
  const end = half !== undefined && half > oldest && half <= oldest * 1.3 ? half * 1.03 : oldest;
  const title2 = shown.map(({ name, life: of }) => `${name}: ${counts(of, formats)}`).join(' · ');
  return (
    <ChartFrame
      title={title}
      sub={isApart ? `steps: as observed, with 95\u202f% band · ${title2}` : describe(life, formats)}
      how="part-life"
      heightPx={HEIGHT_PX}
      foot={foot}
      chart={
        <LifeChart
          curves={shown.map(({ name, life: of }) => curveOf(name, of, ages, formats, isApart))}
          line={isLine ? lineOf(life, end) : []}
          marks={isLine ? marksOf(life, ages).filter(({ at }) => at <= end) : []}
          end={end}
          ticks={ticksOf(life, ages, formats)}
          yTickText={(share) => formats.percent(share, 0)}
          heightPx={HEIGHT_PX}
          label={title}
        />
      }
      table={
        <DataTable
          caption={title}
          rows={rows}
          columns={columns}
          rowId={(row) => `${row.number ?? ''} ${row.time}`}
          spreadsheet="share-still-running"
          empty={<p className="text-dim">Nothing failed: there is no step to list.</p>}
        />
      }
    />
  );
}

const counts = (life: PartLife, formats: Formats) =>
  `${formats.count(life.failures)} of ${formats.count(life.lives)} failed`;

function describe(life: PartLife, formats: Formats): string {
  const { weibull } = life;
  const parts = ['steps: as observed, with 95\u202f% band'];
  if (weibull.kind === 'estimate' && isLineDrawn(life)) {
    parts.push(
      `line: fitted, shape ${formats.number(weibull.shape, 1)} (${formats.range(weibull.shapeInterval, 1)})`,
    );
  }
  parts.push(counts(life, formats));
  if (life.unknown > 0) parts.push(`${formats.counted(life.unknown, 'reason')} not known`);
  return parts.join(' · ');
}
