import { Link } from 'react-router';
import type { PartLife } from '../../../shared/parts';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';

type Props = { life: PartLife; formats: Formats };

/** What this component takes with it when it fails. */
export function TakesWithIt({ life, formats }: Props) {
  const { takesWithIt, scope } = life;
  return (
    <Sheet title="Takes with it" actions={<HowComputed anchor="cascade">how</HowComputed>}>
      {takesWithIt.length === 0 ? (
        <p className="text-sm text-dim">Nothing that the records can show.</p>
      ) : (
        <ul className="flex flex-col gap-1.5 text-table">
          {takesWithIt.map(({ findingId, component, model, both, episodes }) => (
            <li key={findingId}>
              <Link to={paths.cascade(findingId)}>{component.name}</Link> in {formats.count(both)} of{' '}
              {formats.counted(episodes, 'trouble')}
              {!scope.model && model && <span className="block text-xs text-dim">on the {model.name}</span>}
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}
