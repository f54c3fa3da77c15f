import type { Comeback, ComebackReason } from '../../../shared/comebacks';

const REASONS: Record<ComebackReason, { words: string; about: string }> = {
  part_failed_again: {
    words: 'the part failed again',
    about: 'The same part, fitted well, gave up once more.',
  },
  cause_missed: {
    words: 'the cause was missed',
    about: 'What was replaced had been damaged by something else.',
  },
  workmanship: { words: 'workmanship', about: 'Something was not fitted, set or tightened as it should be.' },
  wrong_part: { words: 'wrong part', about: 'The part did not belong on this machine.' },
  defective_part: { words: 'the new part was bad', about: 'It failed almost at once.' },
  work_not_completed: { words: 'work not finished', about: 'It left before all was done.' },
  not_duplicated: { words: 'trouble could not be seen', about: 'The first time nothing was found.' },
  operator_or_fuel: { words: 'fuel or use', about: 'Stale fuel, an accident, or the way it is used.' },
  declined_work: {
    words: 'customer declined the work',
    about: 'Not counted: it was offered and not wanted.',
  },
  unrelated: { words: 'another trouble', about: 'Not counted: it only happened to come in again.' },
  undetermined: { words: 'cannot be told', about: 'The records do not say.' },
};

const REASON_KEYS = Object.keys(REASONS) as ComebackReason[];
const OURS_BY_REASON: ReadonlySet<ComebackReason> = new Set([
  'cause_missed',
  'workmanship',
  'wrong_part',
  'defective_part',
  'work_not_completed',
]);
const NOT_COUNTED: ReadonlySet<ComebackReason> = new Set(['unrelated', 'declined_work']);

export const reasonWords = (reason: ComebackReason): string => REASONS[reason].words;
export const reasonAbout = (reason: ComebackReason): string => REASONS[reason].about;
export const reasonOptions = REASON_KEYS.map((value) => ({ value, label: REASONS[value].words }));

/** Whose doing a reason is by itself; `null` where a person has to say. */
export function oursByReason(reason: ComebackReason): boolean | null {
  return reason === 'part_failed_again' ? null : OURS_BY_REASON.has(reason);
}

export const isCounted = (reason: ComebackReason): boolean => !NOT_COUNTED.has(reason);

export const isReason = (value: string): value is ComebackReason => value in REASONS;

/** What people made of it, in a few words. */
export function statusWords({ status, reason, suggestedReason, isOurs }: Comeback): string {
  if (status === 'suggested') return 'to look at';
  if (status === 'dismissed') return 'put aside: not the same trouble';
  if (!isCounted(reason ?? suggestedReason)) return 'looked at, not counted';
  return isOurs ? 'confirmed, ours' : 'confirmed';
}
