import { Link } from 'react-router';
import type { ModelWhole } from '../../../shared/machines';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';

type Props = { model: ModelWhole; formats: Formats };

/** For whoever has the machine on the bench: what to look at besides. */
export function OftenFailsWith({ model, formats }: Props) {
  const { findingsHere } = model;
  return (
    <Sheet title="Often fails with" actions={<HowComputed anchor="cascade">how</HowComputed>}>
      {findingsHere.length === 0 ? (
        <p className="text-sm text-dim">No pair that the records can show on this model.</p>
      ) : (
        <ul className="-my-1">
          {findingsHere.map(({ id, kind, causal, resultant, episodes }) => (
            <li key={id} className="border-t border-rule py-2 first:border-t-0">
              {kind === 'cascade' ? (
                <>
                  <span className="font-heading">{resultant.name}</span> bad? Test the{' '}
                  <span className="font-heading">{causal.name}</span> before it goes out.
                </>
              ) : (
                <>
                  <span className="font-heading">{causal.name}</span> and{' '}
                  <span className="font-heading">{resultant.name}</span>: look at both.
                </>
              )}
              <span className="block text-sm">
                <Link to={paths.cascade(id)} className="inline-flex min-h-11 items-center desk:min-h-6">
                  seen in {formats.counted(episodes, 'trouble')} here
                </Link>
              </span>
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}
