import { wilsonInterval } from '../../../analytics';
import { dayText } from '../../../analytics/records/day-number';
import type { Named } from '../../../shared/basics';
import type { Finding, FindingWhole } from '../../../shared/findings';
import type { FindingRow, SpentByRepair } from './queries';
import type { StoredCase } from './stored-finding';

const EVIDENCE = {
  'seen together': 'seen_together',
  'replaced before': 'replaced_before',
  'tested as cause': 'tested_as_cause',
} as const;

export function presentFinding(
  row: FindingRow,
  models: ReadonlyMap<string, Named>,
  spent: SpentByRepair,
): Finding {
  const { detail } = row;
  return {
    id: row.id,
    maker: row.maker,
    model: row.model,
    modelId: row.modelId,
    family: row.family,
    causal: row.causal.name,
    resultant: row.resultant.name,
    causalComponent: row.causal,
    resultantComponent: row.resultant,
    kind: row.kind,
    qValue: row.qValue,
    isDeclared: detail.declared,
    evidence: EVIDENCE[detail.evidence],
    episodes: detail.episodes,
    episodesWithBoth: detail.withBoth,
    resultantFailures: detail.resultantTotal,
    resultantNearCausal: detail.resultantNearCausal,
    resultantAlone: detail.resultantAlone,
    leftIn: returnsOf(detail.soloReturns, detail.soloReplacements),
    replaced: returnsOf(detail.withCausalReturns, detail.withCausalReplacements),
    returnRatio: detail.returnRatio,
    returnRatioInterval: detail.returnRatioLimits,
    expectedNear: detail.expectedNear,
    excessRatio: detail.excessRatio,
    excessRatioInterval: detail.excessRatioLimits,
    endedByCausal: detail.endedByCausal,
    endedByResultant: detail.endedByResultant,
    causalFirst: detail.causalFirst,
    resultantFirst: detail.resultantFirst,
    shareExplained: detail.shareExplained,
    medianHours: detail.medianHoursBetween,
    medianDays: detail.medianDays,
    borrowedFrom: detail.borrowedFrom.flatMap((id) => models.get(id) ?? []),
    spentCents: spentOn(row, spent),
  };
}

function returnsOf(returns: number, of: number) {
  const { lower, upper } = wilsonInterval(returns, of);
  return { returns, of, interval: { lower, upper } };
}

/** What the pair cost beyond the causal part: all of the extra visits, and the resultant parts of each first one. */
function spentOn({ detail, resultant }: FindingRow, spent: SpentByRepair): number {
  const counted = new Set<string>();
  let cents = 0;
  for (const { visits, stance } of detail.cases) {
    if (stance !== 'for') continue;
    for (const [at, { visitIds }] of visits.entries()) {
      for (const id of visitIds.filter((visitId) => !counted.has(visitId))) {
        counted.add(id);
        const repair = spent.get(id);
        cents += (at === 0 ? repair?.partCents[resultant.id] : repair?.totalCents) ?? 0;
      }
    }
  }
  return cents;
}

export function presentEpisodes(
  row: FindingRow,
  units: ReadonlyMap<string, Named>,
  spent: SpentByRepair,
): FindingWhole['cases'] {
  return row.detail.cases.flatMap((episode) => {
    const unit = units.get(episode.unitId);
    if (!unit) return [];
    return [
      { unit, speaks: episode.stance, why: whyOf(episode, row), visits: visitsOf(episode, row, spent) },
    ];
  });
}

function visitsOf(episode: StoredCase, { detail }: FindingRow, spent: SpentByRepair) {
  const [first] = episode.visits;
  return episode.visits.flatMap(({ day, hours, visitIds, components }) => {
    const repairs = visitIds.flatMap((id) => spent.get(id) ?? []);
    const [repair] = repairs;
    if (!repair || !first) return [];
    return [
      {
        repair: { id: repair.id, name: repair.name },
        on: dayText(Math.floor(day)),
        hours,
        daysIn: Math.round(day - first.day),
        hoursIn: hours === null || first.hours === null ? null : hours - first.hours,
        causal: components.includes(detail.causal),
        resultant: components.includes(detail.resultant),
        spentCents: repairs.reduce((sum, { totalCents }) => sum + totalCents, 0),
      },
    ];
  });
}

/** Why an episode speaks as it does, in a mechanic's words. */
function whyOf({ course, stance }: StoredCase, { causal, resultant, kind }: FindingRow): string {
  const [first, second] = [causal.name, resultant.name];
  if (kind === 'together') return `${first} and ${second} in one trouble.`;
  switch (course) {
    case 'resultantFirst':
      return `${second} first; the trouble stayed until the ${first} was replaced.`;
    case 'sameVisit':
      return `${first} and ${second} at one visit${stance === 'for' ? ', and it did not come back' : ''}.`;
    case 'causalFirst':
      return `${first} first, and the ${second} still had to be replaced later.`;
    case 'returnedAfterCure':
      return `Both were replaced, and the trouble came back.`;
  }
}
