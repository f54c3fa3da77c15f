import { useMemo } from 'react';
import type { FindingWhole } from '../../../shared/findings';
import { DataTable } from '../../components/ui/data-table';
import { Sheet } from '../../components/ui/sheet';
import type { Formats } from '../../lib/format';
import { caseColumns } from './case-columns';

const TITLES = {
  for: 'Troubles that speak for it',
  against: 'Troubles that speak against it',
  neutral: 'Troubles that say neither',
} as const;

const FILES = { for: 'speak-for', against: 'speak-against', neutral: 'say-neither' } as const;

type Props = { finding: FindingWhole; formats: Formats };

/** The repairs, for and against: whoever doubts the finding reads them. */
export function Cases({ finding, formats }: Props) {
  const columns = useMemo(() => caseColumns(formats), [formats]);
  const speaks =
    finding.kind === 'cascade' ? (['against', 'for', 'neutral'] as const) : (['neutral'] as const);
  return speaks.map((kind) => {
    const rows = finding.cases.filter((episode) => episode.speaks === kind);
    if (rows.length === 0 && kind === 'neutral') return null;
    const title = finding.kind === 'together' ? 'Troubles with both' : TITLES[kind];
    return (
      <Sheet key={kind} title={`${title} (${formats.count(rows.length)})`}>
        <DataTable
          caption={title}
          rows={rows}
          columns={columns}
          rowId={(row) => `${row.unit.id} ${row.visits[0]?.repair.id ?? ''}`}
          initialSort={{ id: 'first', desc: true }}
          spreadsheet={FILES[kind]}
          empty={<p className="text-dim">None.</p>}
        />
      </Sheet>
    );
  });
}
