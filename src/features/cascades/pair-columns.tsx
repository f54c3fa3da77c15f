import { Link } from 'react-router';
import type { Finding } from '../../../shared/findings';
import type { Column } from '../../components/ui/data-table';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { chanceWords, countedShare, EVIDENCE_WORDS, ratioWords, whereOf } from './finding-words';

/** Pairs, one a model, with the counts that carry them. */
export function pairColumns(formats: Formats, kind: Finding['kind']): Column<Finding>[] {
  const isCascade = kind === 'cascade';
  const pair: Column<Finding> = {
    id: 'pair',
    header: isCascade ? 'Takes with it' : 'Pair',
    value: ({ causal, resultant }) => `${causal} ${isCascade ? '→' : 'and'} ${resultant}`,
    cell: (row) => (
      <>
        <Link to={paths.cascade(row.id)}>
          {row.causal} {isCascade ? '→' : 'and'} {row.resultant}
        </Link>
        <span className="block text-xs text-dim">{EVIDENCE_WORDS[row.evidence].short}</span>
      </>
    ),
    isRowHeader: true,
  };
  const model: Column<Finding> = {
    id: 'model',
    header: 'Model',
    value: whereOf,
    cell: (row) => (
      <>
        {row.modelId ? <Link to={paths.model(row.modelId)}>{whereOf(row)}</Link> : whereOf(row)}
        {row.borrowedFrom.length > 0 && (
          <span className="block text-xs text-dim">
            with {formats.counted(row.borrowedFrom.length, 'other model')} beside it
          </span>
        )}
      </>
    ),
  };
  const both: Column<Finding> = {
    id: 'both',
    header: 'Both in',
    value: ({ episodesWithBoth }) => episodesWithBoth,
    cell: (row) => `${formats.count(row.episodesWithBoth)} of ${formats.counted(row.episodes, 'trouble')}`,
    align: 'right',
  };
  const expected: Column<Finding> = {
    id: 'expected',
    header: 'Their ages explain',
    value: ({ expectedNear }) => expectedNear,
    cell: ({ expectedNear }) => (expectedNear === null ? '–' : formats.number(expectedNear, 1)),
    align: 'right',
  };
  const excess: Column<Finding> = {
    id: 'excess',
    header: 'As many',
    value: ({ excessRatio }) => excessRatio,
    cell: (row) => ratioWords(row.excessRatio, row.excessRatioInterval, formats) ?? '–',
    align: 'right',
  };
  const chance: Column<Finding> = {
    id: 'chance',
    header: 'Chance',
    value: ({ qValue }) => qValue,
    cell: ({ qValue }) => chanceWords(qValue, formats),
    align: 'right',
  };
  const returns: Column<Finding>[] = [
    {
      id: 'left',
      header: 'Back, left in',
      value: ({ leftIn }) => (leftIn.of === 0 ? null : leftIn.returns / leftIn.of),
      cell: ({ leftIn }) => countedShare(leftIn, formats),
      align: 'right',
    },
    {
      id: 'replaced',
      header: 'Back, both replaced',
      value: ({ replaced }) => (replaced.of === 0 ? null : replaced.returns / replaced.of),
      cell: ({ replaced }) => countedShare(replaced, formats),
      align: 'right',
    },
    {
      id: 'spent',
      header: 'Spent before the cure',
      value: ({ spentCents }) => spentCents / 100,
      cell: ({ spentCents }) => formats.wholeMoney(spentCents),
      align: 'right',
    },
  ];
  return isCascade ? [pair, model, both, ...returns, chance] : [pair, model, both, expected, excess, chance];
}
