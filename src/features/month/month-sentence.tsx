import { Link } from 'react-router';
import type { MonthReview, RateRow } from '../../../shared/reports';
import { Finding, Over, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { monthInWords, settledOn } from './month-words';

/** Under this many repairs a share says less than the counts do. */
const FEWEST_FOR_A_RATE = 10;

type Props = { review: MonthReview; formats: Formats; mayImport: boolean };

/** The page in one sentence, whatever the records can say. */
export function MonthSentence({ review, formats, mayImport }: Props) {
  const row = review.rows.find(({ month }) => month === review.month);
  if (review.repairsInAll === 0) return <NoRepairs mayImport={mayImport} />;
  if (!row) return <NothingToJudge review={review} formats={formats} />;
  if (row.size === 0 || row.rate === null) {
    return (
      <Finding>
        No repair done in {monthInWords(review, formats)} could have come back: none of that month names its
        machine and its trouble.
      </Finding>
    );
  }
  if (row.maturing) return <Maturing review={review} row={row} formats={formats} />;
  return <Settled review={review} row={row} rate={row.rate} formats={formats} />;
}

function NoRepairs({ mayImport }: { mayImport: boolean }) {
  return (
    <Finding>
      There are no repairs here yet.{' '}
      {mayImport ? (
        <>
          <Link to={paths.imports()}>Bring in a file</Link> of closed repairs, and this page says what came
          back.
        </>
      ) : (
        'Once the closed repairs are brought in, this page says what came back.'
      )}
    </Finding>
  );
}

function NothingToJudge({ review, formats }: { review: MonthReview; formats: Formats }) {
  const repairs = formats.counted(review.repairsInAll, 'repair');
  if (review.analysis === 'pending' || review.analysis === 'running') {
    return (
      <Finding>
        <Strong>{repairs}</Strong> are in and are being read together now; this page fills by itself.
      </Finding>
    );
  }
  if (review.analysis === 'failed') {
    return (
      <Finding>
        <Strong>{repairs}</Strong> are in, but reading them together failed. The records are safe; the next
        import tries again.
      </Finding>
    );
  }
  if (review.unidentified >= review.repairsInAll) {
    return (
      <Finding>
        <Strong>None of the {repairs}</Strong> says which machine it was. Without a serial number or the
        shop’s tag nobody can tell what came back.
      </Finding>
    );
  }
  if (review.rows.some((row) => !row.maturing)) {
    return <Finding>No repair that could have come back was done in that month. Choose another one.</Finding>;
  }
  const size = review.rows.reduce((sum, row) => sum + row.size, 0);
  const count = review.rows.reduce((sum, row) => sum + row.count, 0);
  const first = review.rows[0]?.month;
  return (
    <Finding>
      No month can be judged yet: a repair counts once its {review.windowDays} days are over. So far{' '}
      <Strong>
        {formats.count(count)} of {formats.count(size)}
      </Strong>{' '}
      have come back.
      {first && (
        <>
          {' '}
          The first month, {formats.month(first)}, can be judged after{' '}
          {formats.day(settledOn(first, review.windowDays))}.
        </>
      )}
    </Finding>
  );
}

/** A month whose window is open has only a lower bound: never a rate to be glad of. */
function Maturing({ review, row, formats }: { review: MonthReview; row: RateRow; formats: Formats }) {
  return (
    <Finding>
      <Strong>
        {formats.count(row.count)} of the {formats.counted(row.size, 'repair')}
      </Strong>{' '}
      done in {monthInWords(review, formats)} have come back so far, and the {review.windowDays} days are not
      over for all of them.
      {row.projected !== null && (
        <>
          {' '}
          About <Strong>{formats.percent(row.projected)}</Strong> are expected in the end.
        </>
      )}{' '}
      It is too early to judge this month.
    </Finding>
  );
}

type SettledProps = { review: MonthReview; row: RateRow; rate: number; formats: Formats };

function Settled({ review, row, rate, formats }: SettledProps) {
  const done = `done in ${monthInWords(review, formats)}`;
  if (row.size < FEWEST_FOR_A_RATE) {
    return (
      <Finding>
        <Strong>
          {formats.count(row.count)} of the {formats.counted(row.size, 'repair')}
        </Strong>{' '}
        {done} came back: too few repairs for a rate ({formats.percentRange(row.interval, 0)} would fit).
      </Finding>
    );
  }
  const upper = row.limits?.upper ?? null;
  const lower = row.limits?.lower ?? null;
  const isOver = upper !== null && rate > upper;
  const isUnder = lower !== null && rate < lower;
  const Share = isOver ? Over : Strong;
  const start = (
    <>
      <Share>{formats.percent(rate)}</Share> of the {formats.counted(row.size, 'repair')} {done} came back (
      {formats.percentRange(row.interval)})
    </>
  );
  if (upper === null) {
    return (
      <Finding>
        {start}. There are too few earlier months to say whether that is unusual for this shop.
      </Finding>
    );
  }
  if (isOver) {
    return (
      <Finding>
        {start}. A month of this size stays under <Strong>{formats.percent(upper)}</Strong> by chance
        {review.signalSystem ? (
          <>
            : look at <Strong>{review.signalSystem.system}</Strong>,{' '}
            {formats.count(review.signalSystem.count)} of the {formats.count(row.count)}.
          </>
        ) : (
          <>: something has changed, though no one system stands out.</>
        )}
      </Finding>
    );
  }
  if (isUnder) {
    return (
      <Finding>
        {start}; a month of this size stays above <Strong>{formats.percent(lower)}</Strong> by chance: fewer
        came back than chance explains.
      </Finding>
    );
  }
  return (
    <Finding>
      {start}; a month of this size stays under <Strong>{formats.percent(upper)}</Strong> by chance.
    </Finding>
  );
}
