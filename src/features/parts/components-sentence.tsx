import { Link } from 'react-router';
import type { ComponentListed } from '../../../shared/parts';
import { Finding, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';

/** A rate of fewer jobs than this is not put into a sentence. */
const FEWEST_JOBS = 20;

type Props = { components: readonly ComponentListed[]; modelId: string | undefined; formats: Formats };

/** What fails most, what comes back most, and how much of it is known. */
export function ComponentsSentence({ components, modelId, formats }: Props) {
  const fitted = sum(components, ({ fitted: count }) => count);
  const unknown = sum(components, ({ unknown: count }) => count);
  const failures = sum(components, ({ failures: count }) => count);
  if (components.length === 0 || fitted === 0) {
    return (
      <Finding>
        No component is known yet. A line counts for a component once the file, or the shop’s parts list, says
        what the part is.
      </Finding>
    );
  }
  const known = (
    <>
      Why a part was replaced is known for{' '}
      <Strong>
        {formats.count(fitted - unknown)} of {formats.counted(fitted, 'part line')}
      </Strong>{' '}
      ({formats.percent((fitted - unknown) / fitted, 0)}).
    </>
  );
  const most = best(components, ({ failures: count }) => count);
  if (!most || most.failures === 0) return <Finding>{known} None of these failed.</Finding>;
  const back = best(
    components.filter(({ comebackSize, comebackCount }) => comebackSize >= FEWEST_JOBS && comebackCount > 0),
    ({ comebackInterval }) => comebackInterval.lower ?? 0,
  );
  return (
    <Finding>
      The <Link to={paths.part(most.id, { model: modelId })}>{most.name}</Link> fails most:{' '}
      <Strong>
        {formats.count(most.failures)} of {formats.count(failures)}
      </Strong>{' '}
      failures.
      {back && (
        <>
          {' '}
          Work on the <Link to={paths.part(back.id, { model: modelId })}>{back.name}</Link> comes back most:{' '}
          <Strong>
            {formats.count(back.comebackCount)} of {formats.count(back.comebackSize)}
          </Strong>{' '}
          ({formats.percentRange(back.comebackInterval, 0)}).
        </>
      )}{' '}
      {known}
    </Finding>
  );
}

const sum = (rows: readonly ComponentListed[], of: (row: ComponentListed) => number) =>
  rows.reduce((total, row) => total + of(row), 0);

const best = (rows: readonly ComponentListed[], of: (row: ComponentListed) => number) =>
  rows.reduce<ComponentListed | undefined>(
    (most, row) => (!most || of(row) > of(most) ? row : most),
    undefined,
  );
