import { Link } from 'react-router';
import type { PartLife } from '../../../shared/parts';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';

type Taken = PartLife['takesWithIt'][number];
type Props = { life: PartLife; formats: Formats };

/** What this component takes with it when it fails, each component once with the models on which it was seen. */
export function TakesWithIt({ life, formats }: Props) {
  const groups = new Map<string, Taken[]>();
  for (const taken of life.takesWithIt) {
    groups.set(taken.component.id, [...(groups.get(taken.component.id) ?? []), taken]);
  }
  return (
    <Sheet title="Takes with it" actions={<HowComputed anchor="cascade">how</HowComputed>}>
      {groups.size === 0 ? (
        <p className="text-sm text-dim">Nothing that the records can show.</p>
      ) : (
        <ul className="flex flex-col gap-2 text-table">
          {[...groups.values()].map((taken) => (
            <Group key={taken[0]?.component.id} taken={taken} formats={formats} />
          ))}
        </ul>
      )}
    </Sheet>
  );
}

function Group({ taken, formats }: { taken: readonly Taken[]; formats: Formats }) {
  const sum = (of: (one: Taken) => number) => taken.reduce((total, one) => total + of(one), 0);
  const [first] = taken;
  if (!first) return null;
  const counts = `in ${formats.count(sum(({ both }) => both))} of ${formats.counted(
    sum(({ episodes }) => episodes),
    'trouble',
  )}`;
  if (taken.length === 1) {
    return (
      <li>
        <Link to={paths.cascade(first.findingId)} className="underline">
          {first.component.name}
        </Link>{' '}
        {counts}
        {first.model && <span className="block text-xs text-dim">on the {first.model.name}</span>}
      </li>
    );
  }
  return (
    <li>
      <span className="font-label">{first.component.name}</span> {counts}
      <span className="flex flex-wrap gap-x-3 text-sm">
        {taken.map(({ findingId, model }) => (
          <Link key={findingId} to={paths.cascade(findingId)} className="inline-flex min-h-6 items-center">
            {model?.name ?? 'other models'}
          </Link>
        ))}
      </span>
    </li>
  );
}
