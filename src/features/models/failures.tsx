import { useMemo } from 'react';
import { Link } from 'react-router';
import type { ModelWhole } from '../../../shared/machines';
import { BarList } from '../../components/charts/bar-list';
import { ChartFrame } from '../../components/charts/chart-frame';
import { DataTable, type Column } from '../../components/ui/data-table';
import { agesOn } from '../../lib/ages';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { patternWords } from './model-words';

type Row = ModelWhole['components'][number];
type Props = { model: ModelWhole; formats: Formats };

const MOST_BARS = 12;
/** Below so many failures an age by which half are gone is a guess. */
const FEW_FAILURES = 6;

/** What fails on the model: as bars, and as a table with how long each lasts. */
export function Failures({ model, formats }: Props) {
  const columns = useMemo(() => columnsOf(model, formats), [model, formats]);
  const ranked = [...model.components].sort(
    (a, b) => b.failures + b.unknown / 1e6 - (a.failures + a.unknown / 1e6),
  );
  const bars = ranked.filter((row) => row.failures + row.damage + row.unknown > 0).slice(0, MOST_BARS);
  const rest = ranked.length - bars.length;
  return (
    <ChartFrame
      title="What fails"
      sub={`full: failed · hatched: replaced with no reason written down${rest > 0 ? ` · ${formats.counted(rest, 'more component')} in the table` : ''}`}
      how="unknown-reasons"
      heightPx={160}
      chart={
        bars.length === 0 ? (
          <p className="text-dim">No part has been replaced on it.</p>
        ) : (
          <BarList
            rows={bars.map((row) => ({
              id: row.component.id,
              name: <Link to={paths.part(row.component.id, { model: model.id })}>{row.component.name}</Link>,
              solid: row.failures,
              faint: row.unknown,
              text: `${formats.count(row.failures)} failed${row.unknown > 0 ? `, ${formats.count(row.unknown)} not said` : ''}`,
            }))}
          />
        )
      }
      table={
        <DataTable
          caption="What fails"
          rows={ranked}
          columns={columns}
          rowId={(row) => row.component.id}
          initialSort={{ id: 'failures', desc: true }}
          spreadsheet="what-fails"
        />
      }
    />
  );
}

/** How long each component lasts on this model, in words. */
export function Lives({ model, formats }: Props) {
  const columns = useMemo(() => columnsOf(model, formats), [model, formats]);
  const rows = model.components.filter((row) => row.failures > 0);
  return (
    <DataTable
      caption="How long they last"
      rows={rows}
      columns={columns}
      rowId={(row) => row.component.id}
      sortKey="sort"
      initialSort={{ id: 'failures', desc: true }}
      spreadsheet="how-long-they-last"
      empty={<p className="text-dim">Nothing failed whose reason is known.</p>}
    />
  );
}

function columnsOf(model: ModelWhole, formats: Formats): Column<Row>[] {
  const count = (id: string, header: string, of: (row: Row) => number): Column<Row> => ({
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
      value: (row) => row.component.name,
      cell: (row) => (
        <>
          <Link to={paths.part(row.component.id, { model: model.id })}>{row.component.name}</Link>
          {row.system !== 'unassigned' && <span className="block text-xs text-dim">{row.system}</span>}
        </>
      ),
      isRowHeader: true,
    },
    count('failures', 'Failed', (row) => row.failures),
    count('damage', 'Broken by another', (row) => row.damage),
    count('unknown', 'Not said', (row) => row.unknown),
    count('maintenance', 'At a service', (row) => row.maintenance),
    count('machines', 'Machines', (row) => row.machines),
    {
      id: 'half',
      header: 'Half gone by',
      value: (row) => (row.failures < FEW_FAILURES ? null : row.halfBy),
      align: 'right',
      cell: (row) => {
        if (row.halfBy === null || row.failures < FEW_FAILURES)
          return <span className="text-dim">too few</span>;
        const ages = agesOn(row.clock, formats);
        return `${ages.of(row.halfBy)} (${ages.range(row.halfByInterval, row.halfBy)})`;
      },
    },
    {
      id: 'pattern',
      header: 'With age',
      value: (row) => patternWords(row.pattern),
      className: 'desk:pl-4 whitespace-nowrap',
    },
  ];
}
