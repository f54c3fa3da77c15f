import { requireThat } from '../requirement';

/**
 * Repairs of one machine by age. With truncation `'time'` it was watched until `end`; with `'failure'`
 * until its last event, and `end` is not used.
 */
export type EventSeries = { events: readonly number[]; end?: number; truncation: 'time' | 'failure' };

/** An end read in whole units may fall this share short of its last event (the published coal series does). */
const END_ROUNDING = 1e-3;

/** The series as the formulas need it: the end, and the events that are not the end itself. */
export function readSeries(
  { events, end, truncation }: EventSeries,
  functionName: string,
): { end: number; inner: number[]; count: number } {
  for (const event of events) {
    requireThat(event > 0 && event < Infinity, functionName, 'every event to be finite and above 0');
  }
  const inner = [...events].sort((a, b) => a - b);
  if (truncation === 'failure') return { end: inner.pop() ?? 0, inner, count: events.length };
  requireThat(
    end !== undefined && end > 0 && end < Infinity,
    functionName,
    'an end that is finite and above 0 for truncation by time',
  );
  requireThat((inner.at(-1) ?? 0) <= end * (1 + END_ROUNDING), functionName, 'no event after the end');
  return { end, inner, count: events.length };
}
