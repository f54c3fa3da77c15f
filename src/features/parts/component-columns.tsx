import { Link } from 'react-router';
import type { ComponentListed } from '../../../shared/parts';
import type { Column } from '../../components/ui/data-table';
import { IntervalBar } from '../../components/ui/interval-bar';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { KindSelect, kindLabel } from './component-kinds';

type Options = {
  rows: readonly ComponentListed[];
  modelId: string | undefined;
  mayChange: boolean;
  formats: Formats;
};

/** Components with what is known of each. */
export function componentColumns({ rows, modelId, mayChange, formats }: Options): Column<ComponentListed>[] {
  // A component with three jobs would stretch the scale for all.
  const judged = rows.filter(({ comebackSize }) => comebackSize >= 10);
  const max = Math.max(0.1, ...judged.map(({ comebackInterval }) => comebackInterval.upper ?? 0));
  const count = (
    id: string,
    header: string,
    of: (row: ComponentListed) => number,
  ): Column<ComponentListed> => ({
    id,
    header,
    value: of,
    cell: (row) => formats.count(of(row)),
    align: 'right',
  });
  return [
    {
      id: 'component',
      header: 'Component',
      value: ({ name }) => name,
      cell: ({ id, name }) => <Link to={paths.part(id, { model: modelId })}>{name}</Link>,
      isRowHeader: true,
    },
    {
      id: 'system',
      header: 'System',
      value: ({ system }) => system,
      className: 'text-dim',
    },
    count('fitted', 'Replaced', ({ fitted }) => fitted),
    count('failures', 'Failed', ({ failures }) => failures),
    count('unknown', 'Not said', ({ unknown }) => unknown),
    count('machines', 'Machines', ({ machines }) => machines),
    {
      id: 'back',
      header: 'Came back',
      value: ({ comebackRate }) => comebackRate,
      cell: (row) => <CameBack row={row} max={max} formats={formats} />,
      className: 'desk:pl-4',
    },
    {
      id: 'spent',
      header: 'Billed',
      value: ({ spentCents }) => spentCents / 100,
      cell: ({ spentCents }) => formats.wholeMoney(spentCents),
      align: 'right',
    },
    {
      id: 'kind',
      header: 'How it is replaced',
      value: ({ kind }) => kindLabel(kind),
      cell: (row) => (mayChange ? <KindSelect component={row} /> : kindLabel(row.kind)),
      className: 'desk:pl-4 whitespace-nowrap',
    },
  ];
}

function CameBack({ row, max, formats }: { row: ComponentListed; max: number; formats: Formats }) {
  const { comebackRate, comebackCount, comebackSize, comebackInterval } = row;
  if (comebackRate === null) return <span className="text-dim">none judged</span>;
  const text = `${formats.count(comebackCount)} of ${formats.count(comebackSize)}`;
  return (
    <IntervalBar
      estimate={comebackRate}
      lower={comebackInterval.lower ?? 0}
      upper={comebackInterval.upper ?? 1}
      max={max}
      text={text}
      label={`${text}, ${formats.percent(comebackRate, 0)} (${formats.percentRange(comebackInterval, 0)})`}
    />
  );
}
