import { Link } from 'react-router';
import type { RepairLine } from '../../../shared/repairs';
import type { Column } from '../../components/ui/data-table';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { originWords, reasonWords, workWords } from '../../lib/record-words';

/** The lines of one repair, each with what it is understood as, and who says so. */
export function lineColumns(formats: Formats, mayAnalyze: boolean): Column<RepairLine>[] {
  const columns: Column<RepairLine>[] = [
    {
      id: 'line',
      header: 'Line',
      value: (line) => line.partNumber ?? line.description ?? line.laborOp ?? line.kind,
      cell: (line) => <LineName line={line} />,
      isRowHeader: true,
      className: 'min-w-[11rem]',
    },
    {
      id: 'component',
      header: 'What it is',
      value: ({ component }) => component?.name ?? null,
      cell: ({ component, componentOrigin, kind }) =>
        component ? (
          <>
            {mayAnalyze ? <Link to={paths.part(component.id)}>{component.name}</Link> : component.name}
            <Origin origin={componentOrigin} />
          </>
        ) : (
          <span className="text-dim">{kind === 'part' ? 'not known' : '–'}</span>
        ),
      className: 'min-w-[9rem]',
    },
    {
      id: 'reason',
      header: 'Why',
      value: ({ workDone, reason, kind }) =>
        workDone ? workWords(workDone) : kind === 'part' ? reasonWords(reason) : null,
      cell: ({ workDone, reason, reasonOrigin, kind }) => {
        if (workDone) return workWords(workDone);
        if (kind !== 'part') return <span className="text-dim">–</span>;
        if (reason === 'unknown') return <span className="text-brass">not known</span>;
        return (
          <>
            {reasonWords(reason)}
            <Origin origin={reasonOrigin} />
          </>
        );
      },
      className: 'min-w-[8rem]',
    },
    {
      id: 'quantity',
      header: 'Quantity',
      value: ({ quantity }) => quantity,
      cell: ({ quantity }) =>
        quantity === null ? '–' : formats.number(quantity, Number.isInteger(quantity) ? 0 : 2),
      align: 'right',
    },
    {
      id: 'laborHours',
      header: 'Labor',
      value: ({ laborHours }) => laborHours,
      cell: ({ laborHours }) => formats.hours(laborHours),
      align: 'right',
    },
    {
      id: 'amount',
      header: 'Amount',
      value: (line) => {
        const cents = billedCents(line);
        return cents === null ? null : cents / 100;
      },
      cell: (line) => formats.money(billedCents(line)),
      align: 'right',
    },
  ];
  return columns.map((column) => ({ ...column, isSortable: false }));
}

const billedCents = ({ amountCents, laborAmountCents }: RepairLine): number | null =>
  amountCents === null && laborAmountCents === null ? null : (amountCents ?? 0) + (laborAmountCents ?? 0);

function LineName({ line }: { line: RepairLine }) {
  const name = line.partNumber ?? line.description ?? line.laborOp ?? KIND_WORDS[line.kind];
  const more = [
    line.partNumber ? line.description : null,
    line.supplier && `from ${line.supplier}`,
    line.technician,
  ].filter(Boolean);
  return (
    <>
      {name}
      {more.length > 0 && <span className="block text-sm text-dim">{more.join(' · ')}</span>}
    </>
  );
}

const KIND_WORDS: Record<RepairLine['kind'], string> = {
  part: 'Part without a number',
  labor: 'Labor',
  work: 'Work',
  fee: 'Fee',
  note: 'Note',
};

function Origin({ origin }: { origin: string }) {
  return <span className="block text-sm text-dim">{originWords(origin)}</span>;
}
