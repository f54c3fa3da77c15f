import { Link } from 'react-router';
import type { PartLife } from '../../../shared/parts';
import { Finding, Over, Strong } from '../../components/ui/finding';
import type { Ages } from '../../lib/ages';
import type { Formats } from '../../lib/format';
import { bLifeOf, FEW_FAILURES, oldestSeen, reachedWithoutFailure, scopeWords } from './life-words';
import { lineFit } from './line-fit';
import { NumberComparison } from './number-comparison';

type Props = {
  life: PartLife;
  formats: Formats;
  ages: Ages;
  reasons: 'known' | 'allFailed' | 'noneFailed';
  isAssumed: boolean;
  /** One part number alone is looked at. */
  isOneNumber: boolean;
  /** The same page with the original parts taken in. */
  assumeLink: string;
};

/** How long it lasts, in one sentence, whatever the records can say. */
export function LifeSentence(props: Props) {
  const { life, formats, ages } = props;
  if (life.lives === 0) return <NothingFollowed {...props} />;
  const start = <Start {...props} />;
  if (life.failures === 0) return <NoneFailed {...props} />;
  const counts = `${formats.count(life.failures)} of ${formats.count(life.lives)}`;
  if (life.pattern === 'too_few') {
    const [first] = life.kaplanMeier;
    return (
      <Finding>
        {start}
        <Strong>{counts}</Strong> failed
        {first && (
          <>
            , {life.failures === 1 ? 'at' : 'first at'} {ages.of(first.time)}
          </>
        )}
        : too few to say how long it lasts.
      </Finding>
    );
  }
  const isRough = life.failures < FEW_FAILURES;
  const hasStart = startWords(props) !== '';
  const opening = (word: string) => (hasStart ? word : capital(word));
  return (
    <Finding>
      {start}
      {isRough && (
        <>
          {opening('only')} {counts} failed, which gives no more than a rough figure:{' '}
        </>
      )}
      <Pattern life={life} it={isRough ? 'it' : opening('it')} formats={formats} />: <Gone {...props} />.
      {isLineLoose(life) && ' The fitted line misses many of these failures: trust the steps.'}
      {life.comparison && <NumberComparison comparison={life.comparison} formats={formats} />}
    </Finding>
  );
}

/** Whatever the figure holds under, before it. */
type StartProps = Pick<Props, 'life' | 'reasons' | 'isOneNumber'>;

function Start(props: StartProps) {
  const text = startWords(props);
  return text === '' ? null : <>{`${capital(text)}: `}</>;
}

function startWords({ life, reasons, isOneNumber }: StartProps): string {
  return [
    scopeWords(life),
    life.comparison && !isOneNumber ? 'all part numbers together' : '',
    life.amongThoseThatCameIn ? 'among machines that came in' : '',
    reasons === 'allFailed' ? 'if every replacement without a reason was a failure' : '',
    reasons === 'noneFailed' ? 'if no replacement without a reason was a failure' : '',
  ]
    .filter(Boolean)
    .join(', ');
}

/** More misses than the one in twenty that limits allow, and then some. */
function isLineLoose(life: PartLife): boolean {
  const fit = lineFit(life);
  return fit !== null && fit.missed > fit.judged * 0.1;
}

const capital = (text: string) => `${text.charAt(0).toUpperCase()}${text.slice(1)}`;

function NothingFollowed({ life, formats, isAssumed, assumeLink }: Props) {
  const scope = scopeWords(life);
  return (
    <Finding>
      {scope ? `${scope} nothing` : 'Nothing'} is known yet of how long the {life.component.name} lasts: none
      was followed from when it was fitted.
      {life.unknown > 0 && <> {formats.counted(life.unknown, 'replacement')} had no reason written down.</>}
      {life.assumedOriginal > 0 && !isAssumed && (
        <>
          {' '}
          {formats.counted(life.assumedOriginal, 'machine')} came with one whose past is not known:{' '}
          <Link to={assumeLink}>take these for the original parts</Link>.
        </>
      )}
    </Finding>
  );
}

/** No failure gives no estimate: only how far it has been seen to hold. */
function NoneFailed(props: Props) {
  const { life, formats, ages, isAssumed } = props;
  const half = isAssumed ? null : reachedWithoutFailure(life.atRiskAt, 0.5);
  return (
    <Finding>
      <Start {...props} />
      <Strong>None of {formats.count(life.lives)}</Strong> failed
      {half ? (
        <>
          : at least half last beyond <Strong>{ages.of(half.time)}</Strong>, from the{' '}
          {formats.count(half.atRisk)} that ran that long. How much longer, no failure has shown.
        </>
      ) : (
        <>, but too few ran long enough to say how long it lasts.</>
      )}
    </Finding>
  );
}

function Pattern({ life, it, formats }: { life: PartLife; it: string; formats: Formats }) {
  switch (life.pattern) {
    case 'young':
      return (
        <>
          {it} <Over>fails young</Over>
        </>
      );
    case 'wears_out':
      return (
        <>
          {it} <Strong>wears out</Strong>
        </>
      );
    case 'no_pattern':
      return (
        <>
          {it} fails <Strong>at any age alike</Strong>
        </>
      );
    default:
      return (
        <>
          {formats.counted(life.failures, 'failure')} <Strong>cannot tell</Strong> whether it wears out
        </>
      );
  }
}

function Gone({ life, ages }: Props) {
  const tenth = bLifeOf(life.weibull, 10);
  const half = bLifeOf(life.weibull, 50);
  const oldest = oldestSeen(life);
  return (
    <>
      {tenth && (
        <>
          one in ten is gone by <Strong>{ages.of(tenth.estimate)}</Strong> (
          {ages.range(tenth, tenth.estimate)})
        </>
      )}
      {tenth && half && ', '}
      {half && (
        <>
          half by <Strong>{ages.of(half.estimate)}</Strong> ({ages.range(half, half.estimate)})
          {half.estimate > oldest && <>, which is beyond the oldest seen, {ages.of(oldest)}</>}
        </>
      )}
      {!tenth && !half && 'how long it lasts lies beyond what was seen'}
    </>
  );
}
