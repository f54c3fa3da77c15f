import type { ComebackReason } from './comeback-types';
import { dayText } from './day-number';
import type { RecordRepair } from './record-types';
import type { RepairFacts } from './repair-facts';
import { readsAsDeclined, readsAsLeftOpen, readsAsOperatorOrFuel } from './trouble-words';

/** What joins a return to an earlier repair; the cascade is kept also where a nearer link rules. */
export type Join = {
  link: 'same_component' | 'same_system' | 'cascade';
  componentId: string | null;
  cascade: { causalId: string; firstId: string; backId: string } | null;
};

type Visit = { facts: RepairFacts; record: RecordRepair };
type Suggestion = { suggestedReason: ComebackReason; evidence: string };

/** A part that fails this early was bad when it was fitted. */
const DEAD_EARLY_DAYS = 7;
const DEAD_EARLY_HOURS = 2;

const MONTHS = 'January February March April May June July August September October November December'.split(
  ' ',
);

/**
 * Why a machine came back, as far as the records say, with the evidence in words. Workmanship, a wrong part and
 * *unrelated* are never suggested: those are for a person to say.
 */
export function suggestReason(
  first: Visit,
  back: Visit,
  join: Join,
  nameOf: (componentId: string) => string,
): Suggestion {
  const isTwoYears = dayText(first.facts.workDay).slice(0, 4) !== dayText(back.facts.openingDay).slice(0, 4);
  const done = momentOf(first.facts.workDay, first.facts.hours, isTwoYears);
  const returned = momentOf(back.facts.openingDay, back.facts.hours, isTwoYears);
  const { correction, notes } = first.record;

  if (readsAsDeclined(correction, notes)) {
    return say('declined_work', `work was declined ${done}; came back ${returned}`);
  }
  if (first.facts.isNothingFound) {
    return say('not_duplicated', `nothing was found ${done}; came back ${returned}`);
  }
  if (readsAsLeftOpen(correction, notes)) {
    return say('work_not_completed', `work was left open ${done}; came back ${returned}`);
  }
  if (readsAsOperatorOrFuel(back.record.cause, back.record.correction)) {
    return say('operator_or_fuel', `the record of ${returned} names fuel, operation or an accident`);
  }
  const verb = ({ facts }: Visit, id: string) =>
    facts.fittedComponentIds.includes(id) ? 'replaced' : 'worked on';
  if (join.cascade && !first.facts.componentIds.includes(join.cascade.causalId)) {
    const { causalId, firstId, backId } = join.cascade;
    const missed = `${nameOf(firstId)} ${verb(first, firstId)} ${done} without the ${nameOf(causalId)}`;
    const then = `${nameOf(backId)} ${verb(back, backId)} ${returned}`;
    const why = backId === causalId ? '' : ` (on this model both follow from the ${nameOf(causalId)})`;
    return say('cause_missed', `${missed}; ${then}${why}`);
  }
  if (join.link === 'same_component' && join.componentId !== null) {
    const id = join.componentId;
    const verbs = [verb(first, id), verb(back, id)];
    const evidence = `${nameOf(id)} ${verbs[0] ?? ''} ${done}; ${verbs[1] ?? ''} again ${returned}`;
    if (verbs.includes('worked on')) return say('undetermined', evidence);
    return say(isDeadEarly(first.facts, back.facts) ? 'defective_part' : 'part_failed_again', evidence);
  }
  const names = ({ facts }: Visit) =>
    facts.troubleComponentIds.map(nameOf).join(', ') || 'no component known';
  return say('undetermined', `${names(first)} ${done}; ${names(back)} ${returned}`);
}

/** Hours of the meter between two visits, where both readings exist on one track. */
export function hoursBetween(first: RepairFacts, back: RepairFacts): number | null {
  if (first.hours === null || back.hours === null || first.meterTrack !== back.meterTrack) return null;
  return Math.max(0, Math.round((back.hours - first.hours) * 10) / 10);
}

function isDeadEarly(first: RepairFacts, back: RepairFacts): boolean {
  const hours = hoursBetween(first, back);
  return hours === null ? back.openingDay - first.workDay <= DEAD_EARLY_DAYS : hours <= DEAD_EARLY_HOURS;
}

function momentOf(day: number, hours: number | null, withYear: boolean): string {
  const [year = '', month = '', date = ''] = dayText(day).split('-');
  const words = `${String(Number(date))} ${MONTHS[Number(month) - 1] ?? ''}${withYear ? ` ${year}` : ''}`;
  return hours === null ? words : `${words} at ${hours.toFixed(1)} h`;
}

function say(suggestedReason: ComebackReason, evidence: string): Suggestion {
  return { suggestedReason, evidence: evidence.charAt(0).toUpperCase() + evidence.slice(1) };
}
