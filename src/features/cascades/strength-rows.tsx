import type { ReactNode } from 'react';
import type { FindingWhole } from '../../../shared/findings';
import type { Formats } from '../../lib/format';
import { chanceWords, countedShare, EVIDENCE_WORDS, lowered, ratioWords, thing } from './finding-words';

export type StrengthRow = { id: string; question: string; counts: ReactNode; answer: ReactNode };

/**
 * How strong a pair is, question by question. The counts of a row add up to the number that its question names:
 * what the API leaves out of them is the rest of that sum, and is said.
 */
export function strengthRows(finding: FindingWhole, windowDays: number, formats: Formats): StrengthRow[] {
  const isCascade = finding.kind === 'cascade';
  return [
    ...(isCascade ? [returnsRow(finding, windowDays, formats)] : []),
    nearRow(finding, formats),
    firstRow(finding, formats),
    ...(isCascade ? [endedRow(finding, formats)] : []),
    ...(isCascade && finding.spentCents > 0 ? [spentRow(finding, formats)] : []),
    chanceRow(finding, formats),
    {
      id: 'evidence',
      question: 'What is shown',
      counts: <strong className="font-heading">{EVIDENCE_WORDS[finding.evidence].short}</strong>,
      answer: EVIDENCE_WORDS[finding.evidence].long,
    },
  ];
}

function returnsRow(finding: FindingWhole, windowDays: number, formats: Formats): StrengthRow {
  const { causal, resultant, resultantFailures, leftIn, replaced } = finding;
  const unjudged = resultantFailures - leftIn.of - replaced.of;
  const ratio = ratioWords(finding.returnRatio, finding.returnRatioInterval, formats);
  return {
    id: 'returns',
    question: `Of ${formats.counted(resultantFailures, `${lowered(resultant)} replacement`)}, trouble back within ${windowDays} days`,
    counts: (
      <>
        {thing(causal)} left in: {countedShare(leftIn, formats)}
        <br />
        {thing(causal)} replaced too: {countedShare(replaced, formats)}
        {unjudged > 0 && (
          <>
            <br />
            {formats.count(unjudged)} too young to judge
          </>
        )}
      </>
    ),
    answer: ratio ? `${ratio} as likely where it was left in` : 'The two cannot be compared yet.',
  };
}

function nearRow(finding: FindingWhole, formats: Formats): StrengthRow {
  const { causal, resultant, resultantFailures, resultantNearCausal, resultantAlone, shareExplained } =
    finding;
  const ratio = ratioWords(finding.excessRatio, finding.excessRatioInterval, formats);
  const expected = finding.expectedNear;
  return {
    id: 'near',
    question: `Of ${formats.counted(resultantFailures, `${lowered(resultant)} replacement`)}, near one of ${thing(causal)}`,
    counts: (
      <>
        {formats.count(resultantNearCausal)} in a trouble with both, {formats.count(resultantAlone)} without
        {shareExplained !== null && <> ({formats.percent(shareExplained, 0)} near)</>}
      </>
    ),
    answer:
      expected === null || ratio === null
        ? 'What their ages explain is not known.'
        : `${formats.counted(finding.episodesWithBoth, 'trouble')} with both, where their ages explain ${formats.number(expected, 1)}: ${ratio} as many`,
  };
}

function firstRow(finding: FindingWhole, formats: Formats): StrengthRow {
  const { causal, resultant, episodesWithBoth, causalFirst, resultantFirst, medianDays, medianHours } =
    finding;
  const together = episodesWithBoth - causalFirst - resultantFirst;
  const apart = [
    medianDays === null ? '' : formats.days(medianDays),
    medianHours === null ? '' : formats.hours(medianHours, 0),
  ].filter(Boolean);
  return {
    id: 'first',
    question: `Of ${formats.counted(episodesWithBoth, 'trouble')} with both, what was replaced first`,
    counts: `${lowered(resultant)} ${formats.count(resultantFirst)}, ${lowered(causal)} ${formats.count(causalFirst)}, both at once ${formats.count(together)}`,
    answer:
      apart.length === 0
        ? 'Never at different visits.'
        : `Half of them within ${apart.join(' and ')} of each other. What is replaced first is not what failed first.`,
  };
}

function endedRow(finding: FindingWhole, formats: Formats): StrengthRow {
  const { causal, resultant, episodesWithBoth, endedByCausal, endedByResultant } = finding;
  const both = episodesWithBoth - endedByCausal - endedByResultant;
  return {
    id: 'ended',
    question: `Of ${formats.counted(episodesWithBoth, 'trouble')} with both, what ended it`,
    counts: `${lowered(causal)} alone ${formats.count(endedByCausal)}, both at once ${formats.count(both)}, ${lowered(resultant)} alone ${formats.count(endedByResultant)}`,
    answer: `${thing(causal)} was in the last repair of ${formats.count(endedByCausal + both)}`,
  };
}

function spentRow(finding: FindingWhole, formats: Formats): StrengthRow {
  const spoken = finding.cases.filter(({ speaks }) => speaks === 'for');
  const repairs = new Set(spoken.flatMap(({ visits }) => visits.map(({ repair }) => repair.id))).size;
  return {
    id: 'spent',
    question: `Spent on ${thing(finding.resultant)} and on extra visits before the cure`,
    counts: formats.wholeMoney(finding.spentCents),
    answer: `over ${formats.counted(repairs, 'repair')} of ${formats.counted(spoken.length, 'trouble')}, listed below`,
  };
}

function chanceRow(finding: FindingWhole, formats: Formats): StrengthRow {
  const borrowed = finding.borrowedFrom.length;
  return {
    id: 'chance',
    question: 'Could it be chance?',
    counts: chanceWords(finding.qValue, formats),
    answer: `${
      finding.isDeclared ? 'A chain that the trade knows, named before the records were read. ' : ''
    }Of all pairs shown, at most 1 in 20 is expected to be chance.${
      borrowed > 0 ? ' This model has few machines: others lent strength, see below.' : ''
    }`,
  };
}
