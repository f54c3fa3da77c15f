import { Link } from 'react-router';
import type { ModelWhole } from '../../../shared/machines';
import { Finding, Over, Strong } from '../../components/ui/finding';
import { agesOn } from '../../lib/ages';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { mostFailures } from './model-words';

type Props = { model: ModelWhole; formats: Formats };

/** What fails most on the model, how old it gets, and whether its repairs come faster with age. */
export function ModelSentence({ model, formats }: Props) {
  const most = mostFailures(model.components);
  if (model.repairs === 0) return <Finding>No closed repair of this model is here yet.</Finding>;
  if (!most) {
    const unknown = model.components.reduce((sum, row) => sum + row.unknown, 0);
    return (
      <Finding>
        {formats.counted(model.repairs, 'repair')} on {formats.counted(model.units, 'machine')}, and{' '}
        <Strong>no part</Strong> is known to have failed
        {unknown > 0 && <>: {formats.counted(unknown, 'replacement')} had no reason written down</>}.
      </Finding>
    );
  }
  const ages = agesOn(most.clock, formats);
  return (
    <Finding>
      The <Link to={paths.part(most.component.id, { model: model.id })}>{most.component.name}</Link> fails
      most:{' '}
      <Strong>
        {formats.count(most.failures)} of {formats.count(model.failures)}
      </Strong>{' '}
      failures, on {formats.count(most.machines)} of {formats.counted(model.units, 'machine')}
      {most.halfBy !== null && (
        <>
          ; half are gone by <Strong>{ages.of(most.halfBy)}</Strong> (
          {ages.range(most.halfByInterval, most.halfBy)})
        </>
      )}
      .<Trend model={model} />
    </Finding>
  );
}

function Trend({ model: { recurrence } }: { model: ModelWhole }) {
  if (recurrence.kind === 'notEstimable') return null;
  switch (recurrence.trend) {
    case 'rising':
      return (
        <>
          {' '}
          Its repairs come <Over>faster with age</Over>.
        </>
      );
    case 'falling':
      return <> Its repairs come slower with age.</>;
    case 'no_trend':
      return <> Whether its repairs come faster with age cannot be told.</>;
    case 'too_few':
      return null;
  }
}
