import { requireThat } from '../requirement';
import { standing } from './comeback-types';
import type { CascadeLink, Comeback, ComebackDecision, ComebackNote } from './comeback-types';
import type { RecordComponent, RecordRepair } from './record-types';
import { groupRows } from './record-types';
import type { RepairFacts } from './repair-facts';
import { joinTroubles } from './join-troubles';
import { hoursBetween, suggestReason } from './suggest-reason';
import type { Join } from './suggest-reason';
import { windowClock } from './window-clock';

type Found = { first: RepairFacts; join: Join | null };
/** The latest work day and the highest reading on the current meter, up to a visit. */
type Reach = { workDay: number; hours: number; meterTrack: number };

const NO_JOIN: Join = { link: 'same_system', componentId: null, cascade: null };

export type ComebackOptions = {
  /** Default 90. */
  windowDays?: number;
  /** Where given, a return also counts within these hours of the meter, whatever the days. */
  windowHours?: number | null;
  /** Months (1–12) in which the days of the window do not run. */
  pausedMonths?: readonly number[];
};

/**
 * Repairs that came back: each later repair of the same machine within the window that is of the same trouble,
 * attached to the nearest earlier one that qualifies, with the head of its episode and a suggested reason.
 *
 * - Both are repairs of an identified machine that are not maintenance only (`repairFacts`).
 * - The window runs from the work date of the first to the opening of the return, which may come before the first
 *   is closed.
 * - Same trouble: the same component again, or the same system in complaint, work or lines, or two components that
 *   a cascade of the model joins.
 * - A return counts once. People's decisions rule over the computed rows, also where those have gone: a repair that
 *   somebody attached stays attached while both repairs exist. Attaching to a later repair is not possible.
 *
 * @param records `facts` of `repairFacts` and the repairs they were made from
 * @throws {RequirementError} where the window is not a positive number
 */
export function findComebacks(
  records: {
    repairs: readonly RecordRepair[];
    facts: readonly RepairFacts[];
    components: readonly RecordComponent[];
    cascades?: readonly CascadeLink[];
    decisions?: readonly ComebackDecision[];
    notes?: readonly ComebackNote[];
  },
  options: ComebackOptions = {},
): Comeback[] {
  const { windowDays = 90, windowHours = null, pausedMonths = [] } = options;
  requireThat(windowDays > 0, 'findComebacks', 'a window of more than 0 days');
  requireThat(windowHours === null || windowHours > 0, 'findComebacks', 'a window of more than 0 hours');
  const daysOf = windowClock(pausedMonths);
  const recordOf = new Map(records.repairs.map((repair) => [repair.id, repair]));
  const factsOf = new Map(records.facts.map((facts) => [facts.id, facts]));
  const decisionOf = new Map(
    (records.decisions ?? []).map((decision) => [decision.returnRepairId, decision]),
  );
  const nameOfComponent = new Map(records.components.map(({ id, name }) => [id, name]));
  const nameOf = (id: string) => nameOfComponent.get(id) ?? 'part';
  const join = joinTroubles(records.cascades ?? []);
  const firstOf = new Map<string, string>();
  const comebacks: Comeback[] = [];

  const keep = (found: Found, back: RepairFacts) => {
    const decision = decisionOf.get(back.id);
    if (decision?.status !== 'dismissed') firstOf.set(back.id, found.first.id);
    comebacks.push(comebackOf(found, back, decision));
  };
  const attachedIds = new Set<string>();
  for (const { returnRepairId, attachedToRepairId } of decisionOf.values()) {
    const back = factsOf.get(returnRepairId);
    const first = factsOf.get(attachedToRepairId ?? '');
    if (!back || !first || byOpening(first, back) >= 0) continue;
    attachedIds.add(back.id);
    keep({ first, join: join(first, back) }, back);
  }
  for (const visits of groupRows(records.facts, ({ unitId }) => unitId).values()) {
    visits.sort(byOpening);
    const reach = furthestBefore(visits);
    visits.forEach((back, index) => {
      const found = attachedIds.has(back.id) ? null : nearest(visits, index, reach);
      if (found) keep(found, back);
    });
  }
  for (const note of records.notes ?? []) {
    const first = factsOf.get(note.firstRepairId);
    if (first) comebacks.push(noted(first, note));
  }
  const headOf = headFinder(firstOf);
  return comebacks.map((comeback) => ({ ...comeback, episodeRepairId: headOf(comeback.firstRepairId) }));

  function nearest(visits: readonly RepairFacts[], index: number, reach: readonly Reach[]): Found | null {
    const back = visits[index];
    if (!back?.isEligible) return null;
    for (let at = index - 1; at >= 0; at--) {
      const first = visits[at];
      const before = reach[at];
      if (!first || !before || isPast(before, back)) return null;
      if (!first.isEligible || !isWithin(first, back)) continue;
      const joined = join(first, back);
      if (joined) return { first, join: joined };
    }
    return null;
  }

  function isWithin(first: RepairFacts, back: RepairFacts): boolean {
    if (daysOf(first.workDay, back.openingDay) <= windowDays) return true;
    const hours = windowHours === null ? null : hoursBetween(first, back);
    return hours !== null && windowHours !== null && hours <= windowHours;
  }

  /** No earlier visit can qualify any more. */
  function isPast(before: Reach, back: RepairFacts): boolean {
    if (daysOf(before.workDay, back.openingDay) <= windowDays) return false;
    if (windowHours === null || back.hours === null || before.meterTrack !== back.meterTrack) return true;
    return back.hours - before.hours > windowHours;
  }

  function comebackOf(
    { first, join: joined }: Found,
    back: RepairFacts,
    decision?: ComebackDecision,
  ): Comeback {
    const [firstRecord, backRecord] = [recordOf.get(first.id), recordOf.get(back.id)];
    requireThat(firstRecord !== undefined, 'findComebacks', `the repair ${first.id} of the facts`);
    requireThat(backRecord !== undefined, 'findComebacks', `the repair ${back.id} of the facts`);
    const suggestion = suggestReason(
      { facts: first, record: firstRecord },
      { facts: back, record: backRecord },
      joined ?? NO_JOIN,
      nameOf,
    );
    const status = decision?.status ?? 'suggested';
    const reason = decision?.reason ?? null;
    return {
      id: back.id,
      returnRepairId: back.id,
      firstRepairId: first.id,
      episodeRepairId: first.id,
      unitId: back.unitId,
      modelId: first.modelId,
      componentId: joined?.componentId ?? first.troubleComponentIds[0] ?? null,
      firstWorkDay: first.workDay,
      returnDay: back.openingDay,
      days: Math.max(0, back.openingDay - first.workDay),
      hours: hoursBetween(first, back),
      link: joined?.link ?? 'person',
      ...suggestion,
      reason,
      status,
      ...standing(status, reason ?? suggestion.suggestedReason, decision?.isOurs === true),
    };
  }
}

function byOpening(a: RepairFacts, b: RepairFacts): number {
  return a.openingDay - b.openingDay || a.workDay - b.workDay || (a.id < b.id ? -1 : Number(a.id > b.id));
}

function furthestBefore(visits: readonly RepairFacts[]): Reach[] {
  const reach = { workDay: -Infinity, hours: -Infinity, meterTrack: 0 };
  return visits.map(({ workDay, hours, meterTrack }) => {
    if (meterTrack !== reach.meterTrack) reach.hours = -Infinity;
    reach.workDay = Math.max(reach.workDay, workDay);
    reach.hours = Math.max(reach.hours, hours ?? -Infinity);
    reach.meterTrack = meterTrack;
    return { ...reach };
  });
}

/** Finds the first repair of a chain; repairs attach to earlier ones only, so every chain ends. */
function headFinder(firstOf: ReadonlyMap<string, string>): (repairId: string) => string {
  const heads = new Map<string, string>();
  return (repairId) => {
    const path: string[] = [];
    let head = repairId;
    for (let first = firstOf.get(head); first !== undefined; first = firstOf.get(head)) {
      path.push(head);
      head = heads.get(first) ?? first;
    }
    for (const id of path) heads.set(id, head);
    return head;
  };
}

function noted(first: RepairFacts, note: ComebackNote): Comeback {
  const reason = note.reason ?? null;
  return {
    id: note.id,
    returnRepairId: null,
    firstRepairId: first.id,
    episodeRepairId: first.id,
    unitId: first.unitId,
    modelId: first.modelId,
    componentId: first.troubleComponentIds[0] ?? null,
    firstWorkDay: first.workDay,
    returnDay: note.day,
    days: Math.max(0, note.day - first.workDay),
    hours: null,
    link: 'person',
    suggestedReason: 'undetermined',
    evidence: 'Noted by hand; fixed without a ticket',
    reason,
    status: 'confirmed',
    ...standing('confirmed', reason ?? 'undetermined', note.isOurs === true),
  };
}
