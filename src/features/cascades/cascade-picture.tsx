import { lazy, type ReactNode } from 'react';
import type { Finding } from '../../../shared/findings';
import type { CascadeFlow } from '../../components/charts/cascade-chart';
import { ChartFrame } from '../../components/charts/chart-frame';
import { EmptyState } from '../../components/ui/states';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { countedShare, strengthOf, whereOf } from './finding-words';

const CascadeChart = lazy(() =>
  import('../../components/charts/cascade-chart').then((module) => ({ default: module.CascadeChart })),
);

type Props = { cascades: readonly Finding[]; pairsExamined: number; table: ReactNode; formats: Formats };

/** What takes what with it: causes left, what they take right. A pair seen on several models is one ribbon. */
export function CascadePicture({ cascades, pairsExamined, table, formats }: Props) {
  const title = 'What takes what with it';
  return (
    <ChartFrame
      title={title}
      sub={`left: failed first · right: taken with it · width: troubles with both · darker: came back oftener where the left one was left in · ${formats.counted(pairsExamined, 'pair')} examined, ${formats.count(cascades.length)} held`}
      how="cascade"
      heightPx={220}
      chart={
        cascades.length === 0 ? (
          <EmptyState title="Nothing to draw">No pair held.</EmptyState>
        ) : (
          <CascadeChart
            flows={flowsOf(cascades, formats)}
            leftNote={(name) => formats.counted(modelsOf(cascades, name), 'model')}
            rightNote={(_, total) => formats.counted(total, 'trouble')}
            label={title}
          />
        )
      }
      table={table}
    />
  );
}

/** On how many models the component is seen to take others with it. */
const modelsOf = (cascades: readonly Finding[], causal: string) =>
  new Set(cascades.filter((finding) => finding.causal === causal).map(whereOf)).size;

function flowsOf(cascades: readonly Finding[], formats: Formats): CascadeFlow[] {
  const pairs = new Map<string, Finding[]>();
  for (const finding of cascades) {
    const key = `${finding.causalComponent.id} ${finding.resultantComponent.id}`;
    pairs.set(key, [...(pairs.get(key) ?? []), finding]);
  }
  return [...pairs].flatMap(([id, findings]) => {
    const [first] = [...findings].sort((a, b) => b.episodesWithBoth - a.episodesWithBoth);
    if (!first) return [];
    const size = findings.reduce((sum, { episodesWithBoth }) => sum + episodesWithBoth, 0);
    const heading = `${first.causal} → ${first.resultant}`;
    const lines =
      findings.length === 1
        ? linesOf(first, formats)
        : [
            `${formats.counted(size, 'trouble')} with both, on ${findings.length} models`,
            ...byModel(findings, formats),
          ];
    return [
      {
        id,
        from: first.causal,
        to: first.resultant,
        size,
        strength: strengthOf(findings),
        href: paths.cascade(first.id),
        label: `${heading}: ${lines.join('; ')}`,
        tip: { heading, lines },
      },
    ];
  });
}

const linesOf = (finding: Finding, formats: Formats): string[] => [
  `${whereOf(finding)}: both in ${formats.count(finding.episodesWithBoth)} of ${formats.counted(finding.episodes, 'trouble')}`,
  `back when it was left in: ${countedShare(finding.leftIn, formats)}`,
  `back when both were replaced: ${countedShare(finding.replaced, formats)}`,
];

const MOST_MODELS = 5;

function byModel(findings: readonly Finding[], formats: Formats): string[] {
  const shown = findings.slice(0, MOST_MODELS).map((finding) => {
    const { episodesWithBoth, leftIn } = finding;
    const back =
      leftIn.of === 0
        ? ''
        : `; left in, ${formats.count(leftIn.returns)} of ${formats.count(leftIn.of)} back`;
    return `${whereOf(finding)}: ${formats.count(episodesWithBoth)}${back}`;
  });
  const more = findings.length - shown.length;
  return more > 0 ? [...shown, `and ${formats.counted(more, 'more model')}`] : shown;
}
