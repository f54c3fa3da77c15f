import { Link } from 'react-router';
import type { ModelListed } from '../../../shared/machines';
import type { RateRow } from '../../../shared/reports';
import { Finding, Over, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { mostFailures, standsOut } from './model-words';
import { nameOf } from './queries';

type Props = { models: readonly ModelListed[]; rates: readonly RateRow[] | null; formats: Formats };

/** Which model fails most, and whether one comes back more than chance explains. */
export function ModelsSentence({ models, rates, formats }: Props) {
  const most = mostFailures(models);
  if (models.length === 0)
    return <Finding>No model is known yet: models come with the closed repairs.</Finding>;
  if (!most) {
    return (
      <Finding>
        {formats.counted(models.length, 'model')}, and <Strong>no failure</Strong> is written down as one yet:
        a line counts once its reason is known.
      </Finding>
    );
  }
  const failures = models.reduce((sum, model) => sum + model.failures, 0);
  const over = rates?.filter((row) => standsOut(row) === 'over').sort((a, b) => b.size - a.size) ?? [];
  return (
    <Finding>
      The <Link to={paths.model(most.id)}>{nameOf(most)}</Link> has{' '}
      <Strong>
        {formats.count(most.failures)} of {formats.count(failures)}
      </Strong>{' '}
      failures on {formats.counted(most.units, 'machine')}
      {most.topComponent && <>, most of all its {most.topComponent.name}</>}
      {rates === null ? '.' : <Returns over={over} rates={rates} formats={formats} />}
    </Finding>
  );
}

function Returns({
  over,
  rates,
  formats,
}: {
  over: readonly RateRow[];
  rates: readonly RateRow[];
  formats: Formats;
}) {
  const [first] = over;
  if (!rates.some(({ limits }) => limits !== null)) {
    return <>. There are too few judged jobs to say whether a model comes back more than the rest.</>;
  }
  if (!first) return <>. No model comes back more than chance explains for its number of jobs.</>;
  return (
    <>
      . <Over>{over.length === 1 ? first.label : `${formats.count(over.length)} models`}</Over>{' '}
      {over.length === 1 ? 'comes' : 'come'} back more than chance explains
      {over.length > 1 && <>, first of all the {first.label}</>}: {formats.count(first.count)} of{' '}
      {formats.counted(first.size, 'repair')} ({formats.percentRange(first.interval, 0)}).
    </>
  );
}
