import { useMemo, useState } from 'react';
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

const SHOWN_FIRST = 12;

/** The repairs, for and against: whoever doubts the finding reads them. */
export function Cases({ finding, formats }: Props) {
  if (finding.kind === 'together') {
    return <Group title="Troubles with both" file="both" cases={finding.cases} formats={formats} />;
  }
  return (['against', 'for', 'neutral'] as const).map((kind) => {
    const cases = finding.cases.filter((episode) => episode.speaks === kind);
    if (cases.length === 0 && kind === 'neutral') return null;
    return <Group key={kind} title={TITLES[kind]} file={FILES[kind]} cases={cases} formats={formats} />;
  });
}

type GroupProps = { title: string; file: string; cases: FindingWhole['cases']; formats: Formats };

function Group({ title, file, cases, formats }: GroupProps) {
  const [isAll, setAll] = useState(false);
  const columns = useMemo(() => caseColumns(formats), [formats]);
  const latest = [...cases].sort((a, b) => (b.visits[0]?.on ?? '').localeCompare(a.visits[0]?.on ?? ''));
  return (
    <Sheet title={`${title} (${formats.count(cases.length)})`}>
      <DataTable
        caption={title}
        rows={isAll ? latest : latest.slice(0, SHOWN_FIRST)}
        columns={columns}
        rowId={(row) => `${row.unit.id} ${row.visits[0]?.repair.id ?? ''}`}
        spreadsheet={file}
        more={{
          hasMore: !isAll && latest.length > SHOWN_FIRST,
          isLoading: false,
          onMore: () => setAll(true),
        }}
        empty={<p className="text-dim">None.</p>}
      />
    </Sheet>
  );
}
