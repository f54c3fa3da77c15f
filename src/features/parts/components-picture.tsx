import type { ReactNode } from 'react';
import { Link } from 'react-router';
import type { ComponentListed } from '../../../shared/parts';
import { BarList } from '../../components/charts/bar-list';
import { ChartFrame } from '../../components/charts/chart-frame';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';

const MOST_BARS = 12;

type Props = {
  components: readonly ComponentListed[];
  modelId: string | undefined;
  table: ReactNode;
  formats: Formats;
};

/** What fails most; what the lines without a reason could add is hatched. */
export function ComponentsPicture({ components, modelId, table, formats }: Props) {
  const bars = [...components]
    .filter(({ failures, unknown }) => failures + unknown > 0)
    .sort((a, b) => b.failures - a.failures || b.unknown - a.unknown)
    .slice(0, MOST_BARS);
  if (bars.length === 0) return null;
  return (
    <ChartFrame
      title="What fails most"
      sub={`full: failed · hatched: replaced with no reason written down, which may or may not have failed${
        components.length > bars.length
          ? ` · the first ${formats.count(bars.length)} of ${formats.count(components.length)}`
          : ''
      }`}
      how="unknown-reasons"
      heightPx={200}
      chart={
        <BarList
          rows={bars.map((row) => ({
            id: row.id,
            name: <Link to={paths.part(row.id, { model: modelId })}>{row.name}</Link>,
            solid: row.failures,
            faint: row.unknown,
            text: `${formats.count(row.failures)} failed${row.unknown > 0 ? `, ${formats.count(row.unknown)} not said` : ''}`,
          }))}
        />
      }
      table={table}
    />
  );
}
