import type { ReactNode } from 'react';
import type { Finding as Pair } from '../../../shared/findings';
import { Held, Over, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';
import { lowered, thing, whereOf } from './finding-words';

type Props = { finding: Pair; windowDays: number; formats: Formats };

/** One pair in one sentence: what happened when only the one was replaced, and when both were. */
export function PairSentence({ finding, windowDays, formats }: Props) {
  const { causal, resultant, kind } = finding;
  const where = `On the ${whereOf(finding)}`;
  if (kind === 'together') {
    return (
      <>
        {where} {thing(causal)} and {thing(resultant)} <Strong>fail together</Strong> in{' '}
        <Strong>{formats.counted(finding.episodesWithBoth, 'trouble')}</Strong>
        {finding.expectedNear !== null && (
          <>, where their ages explain {formats.number(finding.expectedNear, 1)}</>
        )}
        . Which takes which, the records do not show.
      </>
    );
  }
  return (
    <>
      {where} a failing <Strong>{lowered(causal)}</Strong> takes <Strong>{thing(resultant)}</Strong> with it:{' '}
      <Returns finding={finding} windowDays={windowDays} formats={formats} />
    </>
  );
}

function Returns({ finding, windowDays, formats }: Props) {
  const { leftIn, replaced, causal, resultant, episodesWithBoth, episodes } = finding;
  if (leftIn.of === 0 && replaced.of === 0) {
    return (
      <>
        both in <Strong>{formats.count(episodesWithBoth)}</Strong> of {formats.counted(episodes, 'trouble')};
        none is old enough to say what came back.
      </>
    );
  }
  const alone: ReactNode =
    leftIn.of === 0 ? (
      <>{thing(resultant)} was never replaced alone</>
    ) : (
      <>
        replaced alone,{' '}
        <Over>
          {formats.count(leftIn.returns)} of {formats.count(leftIn.of)}
        </Over>{' '}
        were back within {windowDays} days
      </>
    );
  return (
    <>
      {alone};{' '}
      {replaced.of === 0 ? (
        <>none with {thing(causal)} is old enough to judge.</>
      ) : (
        <>
          replaced with {thing(causal)},{' '}
          <Held>
            {formats.count(replaced.returns)} of {formats.count(replaced.of)}
          </Held>
          .
        </>
      )}
    </>
  );
}
