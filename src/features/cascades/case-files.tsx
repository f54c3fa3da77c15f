import { useState } from 'react';
import { Link } from 'react-router';
import type { FindingSummary } from '../../../shared/findings';
import { Button } from '../../components/ui/button';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { lowered } from './finding-words';

type Props = { caseFiles: FindingSummary['caseFiles']; formats: Formats };

const MOST_REPAIRS = 8;
const SHOWN_FIRST = 10;

/** Seen a few times and not proven: the repairs, for whoever wants to read them. */
export function CaseFiles({ caseFiles, formats }: Props) {
  const [isAll, setAll] = useState(false);
  const ranked = [...caseFiles].sort((a, b) => b.times - a.times);
  const shown = isAll ? ranked : ranked.slice(0, SHOWN_FIRST);
  return (
    <Sheet
      title={`Case files (${formats.count(caseFiles.length)})`}
      sub="Seen near each other a few times. Nothing is claimed of them."
      actions={<HowComputed anchor="case-file">what is that</HowComputed>}
    >
      <ul className="-my-2">
        {shown.map(({ model, first, second, times, repairs }) => (
          <li
            key={`${model.id} ${first.id} ${second.id}`}
            className="border-t border-rule py-2 first:border-t-0"
          >
            <span className="font-label">
              {first.name} and {lowered(second.name)}
            </span>
            ,{' '}
            <Link to={paths.model(model.id)} className="underline">
              {model.name}
            </Link>
            : {formats.count(times)} {times === 1 ? 'time' : 'times'} here; not proof.
            <span className="flex flex-wrap gap-x-3 text-sm text-dim">
              {repairs.slice(0, MOST_REPAIRS).map((repair) => (
                <Link
                  key={repair.id}
                  to={paths.repair(repair.id)}
                  className="inline-flex min-h-11 min-w-6 items-center desk:min-h-6"
                >
                  {repair.name}
                </Link>
              ))}
              {repairs.length > MOST_REPAIRS && <>and {formats.count(repairs.length - MOST_REPAIRS)} more</>}
            </span>
          </li>
        ))}
      </ul>
      {shown.length < ranked.length && (
        <Button look="text" className="mt-2 text-sm" onClick={() => setAll(true)}>
          Show all {formats.count(ranked.length)}, those seen fewer times last
        </Button>
      )}
    </Sheet>
  );
}
