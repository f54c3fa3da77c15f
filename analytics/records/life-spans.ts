import type { LifeSpan, MissingSpan, PartLife } from './part-life';
import type { Replacement, TrustedReading } from './unit-visits';

/** Half the resolution of an hour meter, and of a date. */
const HALF_TENTH_HOUR = 0.05;
const HALF_DAY = 0.5;

/** How a life begins; `entryDay` and `entryReading` are from when it was under observation. */
export type LifeStart = {
  origin: PartLife['origin'];
  repairId: string | null;
  day: number | null;
  entryDay: number | null;
  reading: TrustedReading | null;
  entryReading: TrustedReading | null;
  part: Replacement | null;
};

export type LifeEnd = {
  repairId: string | null;
  day: number;
  reading: TrustedReading | null;
  outcome: PartLife['outcome'];
  reason: PartLife['endReason'];
};

type Spans = Pick<PartLife, 'hours' | 'hoursMissing' | 'days' | 'daysMissing' | 'isDeadOnArrival'>;

/** A life on both clocks; one that failed at 0 is set to half the resolution of the clock. */
export function spansOf(start: LifeStart, end: LifeEnd, readings: readonly TrustedReading[]): Spans {
  const hours = hoursOf(start, end, readings);
  const days = daysOf(start, end);
  const isEvent = end.outcome !== 'censored' && start.origin !== 'assumed_original';
  const isZeroHours = isEvent && isZero(hours.span);
  const isZeroDays = isEvent && isZero(days.span);
  if (hours.span && isZeroHours) hours.span.exit = HALF_TENTH_HOUR;
  if (days.span && isZeroDays) days.span.exit = HALF_DAY;
  return {
    hours: hours.span,
    hoursMissing: hours.missing,
    days: days.span,
    daysMissing: days.missing,
    isDeadOnArrival: isZeroHours || (hours.span === null && isZeroDays),
  };
}

function isZero(span: LifeSpan | null): boolean {
  return span !== null && !span.isCut && span.exit === 0;
}

type SpanOrReason = { span: LifeSpan | null; missing: MissingSpan | null };

function hoursOf(start: LifeStart, end: LifeEnd, readings: readonly TrustedReading[]): SpanOrReason {
  const { reading: zero, entryReading } = start;
  if (!zero || !entryReading) return { span: null, missing: 'no_reading_at_start' };
  if (entryReading.track !== zero.track) return { span: null, missing: 'meter_restarted' };
  const upToEnd = lastUpTo(readings, end.day);
  // A failure needs the reading of its own visit; a life that only stopped being seen is known up to any earlier one.
  const atEnd = end.reading ?? (end.outcome === 'censored' ? upToEnd : undefined);
  const isWhole = atEnd?.track === zero.track;
  const isRestarted = !isWhole && upToEnd !== undefined && (end.reading ?? upToEnd).track !== zero.track;
  if (!isWhole && !isRestarted) return { span: null, missing: 'no_reading_at_end' };
  const last = isWhole ? atEnd : lastUpTo(readings, end.day, zero.track);
  if (!last) return { span: null, missing: isRestarted ? 'meter_restarted' : 'no_reading_at_end' };
  const entry = Math.max(0, entryReading.hours - zero.hours);
  const exit = Math.max(0, last.hours - zero.hours);
  const span: LifeSpan = { entry: clean(entry), exit: clean(exit), isCut: isRestarted };
  if (zero.isBetween || last.isBetween) span.isBetween = true;
  return { span, missing: null };
}

/** Farther apart than this, two readings say little of the days between them: a winter lies there, or two. */
const LONGEST_GAP_DAYS = 400;

/**
 * What the meter will have shown on a day without a reading: on the line between the machine's own readings before
 * and after it, where both are of one meter and not too far apart; `null` elsewhere, since nothing is extrapolated.
 * Leaving such failures out instead would make parts look better: a part that runs on keeps its last reading.
 *
 * @param readings in order of days
 */
export function readingBetween(readings: readonly TrustedReading[], day: number): TrustedReading | null {
  const before = lastUpTo(readings, day);
  if (!before) return null;
  const after = readings[readings.indexOf(before) + 1];
  if (after?.track !== before.track || after.day - before.day > LONGEST_GAP_DAYS) return null;
  const share = (day - before.day) / Math.max(1, after.day - before.day);
  const hours = clean(before.hours + share * (after.hours - before.hours));
  return { day, track: before.track, hours, isBetween: true };
}

/** The latest reading up to a day, on any track or on the given one; `readings` are in order of days. */
function lastUpTo(
  readings: readonly TrustedReading[],
  day: number,
  track?: number,
): TrustedReading | undefined {
  let low = 0;
  let high = readings.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((readings[middle]?.day ?? 0) <= day) low = middle + 1;
    else high = middle;
  }
  let at = low - 1;
  while (at >= 0 && track !== undefined && readings[at]?.track !== track) at--;
  return readings[at];
}

function daysOf(start: LifeStart, end: LifeEnd): SpanOrReason {
  if (start.day === null || start.entryDay === null) return { span: null, missing: 'no_in_service_day' };
  const entry = start.origin === 'fitted' ? 0 : start.entryDay - start.day;
  if (entry < 0 || (start.origin !== 'fitted' && end.day < start.day)) {
    return { span: null, missing: 'in_service_after_visit' };
  }
  return { span: { entry, exit: Math.max(0, end.day - start.day), isCut: false }, missing: null };
}

/** Takes binary dust off a difference of readings. */
function clean(hours: number): number {
  return Math.round(hours * 1e6) / 1e6;
}
