import { Link } from 'react-router';
import type { ModelListed } from '../../../shared/machines';
import type { RateRow } from '../../../shared/reports';
import type { Column } from '../../components/ui/data-table';
import { IntervalBar } from '../../components/ui/interval-bar';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { shareOfAll } from './model-words';
import { nameOf } from './queries';

/** Models with what fails on them and what comes back: the raw share first, then after allowing for few jobs. */
export function modelColumns(rates: readonly RateRow[] | null, formats: Formats): Column<ModelListed>[] {
  const byModel = new Map(rates?.map((row) => [row.key, row]));
  const center = rates ? shareOfAll(rates) : null;
  const max = Math.max(0.1, ...(rates ?? []).map((row) => row.shrunkenInterval?.upper ?? 0));
  const returned: Column<ModelListed>[] = [
    {
      id: 'back',
      header: 'Came back',
      value: (row) => row.comebackRate,
      cell: (row) =>
        row.comebackSize === 0
          ? '–'
          : `${formats.count(row.comebackCount)} of ${formats.count(row.comebackSize)} (${formats.percent(row.comebackRate, 0)})`,
      align: 'right',
    },
    {
      id: 'shrunken',
      header: 'After allowing for few jobs',
      value: (row) => byModel.get(row.id)?.shrunken ?? null,
      cell: (row) => <Shrunken row={byModel.get(row.id)} center={center} max={max} formats={formats} />,
      className: 'desk:pl-6',
    },
  ];
  return [
    {
      id: 'model',
      header: 'Model',
      value: nameOf,
      cell: (row) => (
        <>
          <Link to={paths.model(row.id)}>{nameOf(row)}</Link>
          <span className="block text-xs text-dim">
            {[row.productType?.replace('_', ' '), ...row.families.map(({ name }) => name)]
              .filter(Boolean)
              .join(' · ')}
          </span>
        </>
      ),
      isRowHeader: true,
    },
    count('units', 'Machines', (row) => row.units, formats),
    count('repairs', 'Repairs', (row) => row.repairs, formats),
    count('failures', 'Failures', (row) => row.failures, formats),
    {
      id: 'top',
      header: 'Most often',
      value: (row) => row.topComponent?.name ?? null,
      cell: (row) =>
        row.topComponent ? (
          <Link to={paths.part(row.topComponent.id, { model: row.id })}>{row.topComponent.name}</Link>
        ) : (
          '–'
        ),
    },
    ...(rates ? returned : []),
    {
      id: 'findings',
      header: 'Cascades',
      value: (row) => row.findings,
      cell: (row) =>
        row.findings === 0 ? (
          <span className="text-dim">0</span>
        ) : (
          <Link to={paths.cascades({ model: row.id })}>{formats.count(row.findings)}</Link>
        ),
      align: 'right',
    },
  ];
}

function count(
  id: string,
  header: string,
  of: (row: ModelListed) => number,
  formats: Formats,
): Column<ModelListed> {
  return { id, header, value: of, cell: (row) => formats.count(of(row)), align: 'right' };
}

type ShrunkenProps = { row: RateRow | undefined; center: number | null; max: number; formats: Formats };

function Shrunken({ row, center, max, formats }: ShrunkenProps) {
  if (!row || row.shrunken === null || row.shrunkenInterval === null)
    return <span className="text-dim">–</span>;
  const text = formats.percent(row.shrunken, 0);
  return (
    <IntervalBar
      estimate={row.shrunken}
      lower={row.shrunkenInterval.lower ?? 0}
      upper={row.shrunkenInterval.upper ?? 1}
      max={max}
      center={center}
      text={text}
      label={`${text} (${formats.percentRange(row.shrunkenInterval, 0)})`}
    />
  );
}
