import { Link } from 'react-router';
import type { RepairWhole } from '../../../shared/repairs';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import type { LinkedRepair } from './queries';

type Props = { repair: RepairWhole; formats: Formats };

/** The same trouble before and after, with what speaks for it. */
export function RepairLinks({ repair, formats }: Props) {
  const { isComebackOf, cameBackAs } = repair;
  if (!isComebackOf && cameBackAs.length === 0) return null;
  return (
    <Sheet
      title="The same trouble"
      actions={<HowComputed anchor="comeback-reasons">how it is told</HowComputed>}
    >
      <ul className="flex flex-col gap-3">
        {isComebackOf && (
          <Linked
            link={isComebackOf}
            words={`back ${formats.days(isComebackOf.days)} after`}
            formats={formats}
          />
        )}
        {cameBackAs.map((link) => (
          <Linked
            key={link.id}
            link={link}
            words={`came back after ${formats.days(link.days)}, as`}
            formats={formats}
          />
        ))}
      </ul>
    </Sheet>
  );
}

function Linked({ link, words, formats }: { link: LinkedRepair; words: string; formats: Formats }) {
  return (
    <li>
      {words}{' '}
      <Link className="underline" to={paths.repair(link.id)}>
        {link.number}
      </Link>
      <span className="block text-sm text-dim">
        done {formats.day(link.workOn)} · {link.evidence}
      </span>
    </li>
  );
}
