import { useMemo, useState } from 'react';
import { Link } from 'react-router';
import type { PartLife } from '../../../shared/parts';
import { Button } from '../../components/ui/button';
import { DataTable, type Column } from '../../components/ui/data-table';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import type { Ages } from '../../lib/ages';
import type { Formats } from '../../lib/format';
import { bLifeOf } from './life-words';

type OfNumber = PartLife['numbers'][number];
type Props = {
  numbers: PartLife['numbers'];
  /** The number that the page is narrowed to. */
  only: string | undefined;
  /** The page with one number alone; without a name, with all. */
  linkTo: (number?: string) => string;
  formats: Formats;
  ages: Ages;
};

const SHOWN_FIRST = 5;

/** The part numbers side by side, and what changes when the newer is put on. */
export function Numbers({ numbers, only, linkTo, formats, ages }: Props) {
  const columns = useMemo(() => numberColumns(linkTo, formats, ages), [linkTo, formats, ages]);
  const [isAll, setAll] = useState(false);
  const ranked = [...numbers].sort((a, b) => b.failures - a.failures || b.lives - a.lives);
  const notes = numbers.filter(({ fitmentNote }) => fitmentNote !== null);
  return (
    <Sheet title="Numbers" actions={<HowComputed anchor="old-and-new-numbers">how</HowComputed>}>
      <DataTable
        caption="Part numbers"
        rows={isAll ? ranked : ranked.slice(0, SHOWN_FIRST)}
        columns={columns}
        rowId={({ part }) => part.id}
        empty={<p className="text-dim">No part number was written down.</p>}
      />
      {numbers.length > SHOWN_FIRST && !isAll && (
        <Button look="text" className="text-sm" onClick={() => setAll(true)}>
          {formats.count(numbers.length - SHOWN_FIRST)} more
        </Button>
      )}
      {only !== undefined && (
        <p className="mt-2 text-sm">
          Only {only} is shown. <Link to={linkTo()}>Show all numbers</Link>
        </p>
      )}
      {notes.length > 0 && (
        <dl className="mt-3 flex flex-col gap-2 text-sm text-dim">
          {notes.map(({ part, fitmentNote }) => (
            <div key={part.id}>
              <dt className="font-label text-ink">Fitting {part.name}</dt>
              <dd>{fitmentNote}</dd>
            </div>
          ))}
        </dl>
      )}
    </Sheet>
  );
}

function numberColumns(linkTo: Props['linkTo'], formats: Formats, ages: Ages): Column<OfNumber>[] {
  return [
    {
      id: 'part',
      header: 'Part',
      value: ({ part }) => part.name,
      isSortable: false,
      isRowHeader: true,
      cell: ({ part, supersededBy, firstFittedOn }) => (
        <>
          <Link to={linkTo(part.name)} className="whitespace-nowrap">
            {part.name}
          </Link>
          {firstFittedOn && <span className="block text-xs text-dim">since {firstFittedOn.slice(0, 4)}</span>}
          {supersededBy && <span className="block text-xs text-dim">now {supersededBy.name}</span>}
        </>
      ),
    },
    {
      id: 'lives',
      header: 'Followed',
      value: ({ lives }) => lives,
      cell: ({ lives }) => formats.count(lives),
      align: 'right',
      isSortable: false,
    },
    {
      id: 'failures',
      header: 'Failed',
      value: ({ failures }) => failures,
      cell: ({ failures }) => formats.count(failures),
      align: 'right',
      isSortable: false,
    },
    {
      id: 'half',
      header: 'Half by',
      value: ({ weibull }) => bLifeOf(weibull, 50)?.estimate ?? null,
      align: 'right',
      isSortable: false,
      cell: ({ weibull, failures }) => {
        const half = failures < 2 ? null : bLifeOf(weibull, 50);
        return half ? (
          <>
            {ages.of(half.estimate)}
            <span className="block text-xs whitespace-normal text-dim">
              {ages.range(half, half.estimate)}
            </span>
          </>
        ) : (
          <span className="text-xs text-dim">too few</span>
        );
      },
    },
  ];
}
