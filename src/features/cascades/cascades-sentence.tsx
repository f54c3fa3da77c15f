import type { Finding as Pair, FindingSummary } from '../../../shared/findings';
import { Finding, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';
import { PairSentence } from './finding-sentence';

type Props = {
  findings: readonly Pair[];
  summary: FindingSummary;
  /** Where the page is narrowed to one. */
  modelName: string | undefined;
  windowDays: number;
  formats: Formats;
};

/** The strongest pair, or that there is none, with how many were looked at. */
export function CascadesSentence({ findings, summary, modelName, windowDays, formats }: Props) {
  const cascades = findings.filter(({ kind }) => kind === 'cascade');
  const [strongest] = [...cascades].sort(
    (a, b) => b.leftIn.returns - a.leftIn.returns || b.episodesWithBoth - a.episodesWithBoth,
  );
  if (summary.asOf === null) {
    return (
      <Finding>
        The records have not been read together yet. Once they have, this page says what takes what with it.
      </Finding>
    );
  }
  if (strongest) {
    const more = cascades.length - 1;
    return (
      <Finding>
        <PairSentence finding={strongest} windowDays={windowDays} formats={formats} />
        {more > 0 && <> {more === 1 ? 'One more pair holds' : `${formats.count(more)} more pairs hold`}.</>}
      </Finding>
    );
  }
  const where = modelName ? `on the ${modelName}` : 'on any model';
  return (
    <Finding>
      <Strong>No part</Strong> is shown to take another with it {where}
      {findings.length > 0 && <>, though {formats.counted(findings.length, 'pair')} fail together</>}:{' '}
      {formats.counted(summary.pairsExamined, 'pair')} on {formats.counted(summary.models, 'model')} were
      examined.
      {summary.pairsExamined === 0 && ' It takes failures whose component and reason are written down.'}
    </Finding>
  );
}
