import { findCascades } from '../../../analytics/cascades/find-cascades';
import type { CascadeResult } from '../../../analytics/cascades/types';
import type { Comeback, ComebackDecision } from '../../../analytics/records/comeback-types';
import { deriveLives } from '../../../analytics/records/derive-lives';
import { findComebacks, type ComebackOptions } from '../../../analytics/records/find-comebacks';
import type { PartLife } from '../../../analytics/records/part-life';
import { repairFacts, type RepairFacts } from '../../../analytics/records/repair-facts';
import { STARTER_COMPLAINT_PHRASES } from '../../../analytics/records/trouble-words';
import { cascadeInput, judgeMeters, type JudgedMeter } from './cascade-input';
import type { ShopRecords } from './load-records';

export type Derived = {
  meters: Map<string, JudgedMeter>;
  facts: RepairFacts[];
  cascades: CascadeResult;
  comebacks: Comeback[];
  lives: PartLife[];
};

/** Everything that is derived from a shop's records, as of a day; pure, so that a rebuild gives the same. */
export function derive(
  records: ShopRecords,
  {
    asOfDay,
    decisions,
    ...window
  }: { asOfDay: number; decisions: readonly ComebackDecision[] } & Pick<
    ComebackOptions,
    'windowDays' | 'windowHours'
  >,
): Derived {
  const meters = judgeMeters(records, asOfDay);
  const facts = repairFacts({
    ...records,
    complaintPhrases: STARTER_COMPLAINT_PHRASES.map(({ phrase, system }) => ({
      phrase,
      systemId: system.toLowerCase(),
    })),
  });
  const { visits, options } = cascadeInput(records, meters, asOfDay);
  const cascades = findCascades(visits, { ...options, windowDays: window.windowDays ?? 90 });
  const comebacks = findComebacks(
    { ...records, facts, decisions, cascades: linksOf(cascades, records) },
    window,
  );
  return { meters, facts, cascades, comebacks, lives: deriveLives({ ...records, asOfDay }) };
}

function linksOf({ findings }: CascadeResult, { components }: ShopRecords) {
  const idOf = new Map(components.map(({ id, name }) => [name, id]));
  return findings.flatMap(({ kind, model, causal, resultant }) => {
    const causalId = idOf.get(causal);
    const resultantId = idOf.get(resultant);
    return kind === 'cascade' && causalId && resultantId ? [{ modelId: model, causalId, resultantId }] : [];
  });
}
