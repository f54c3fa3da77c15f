import type { RepairLine, RepairWhole } from '../../shared/repairs';

export const TICKET_WORDS: Record<RepairWhole['ticketType'], string> = {
  repair: 'repair',
  setup: 'setup',
  counter_sale: 'counter sale',
  internal: 'internal work',
};

const REASON_WORDS: Record<RepairLine['reason'], string> = {
  failed: 'failed',
  maintenance: 'maintenance',
  preventive: 'changed in time',
  damage: 'damaged by something else',
  upgrade: 'upgrade',
  unknown: 'not said why',
};

const WORK_WORDS: Record<NonNullable<RepairLine['workDone']>, string> = {
  adjusted: 'adjusted',
  cleaned: 'cleaned',
  repaired: 'repaired',
  tightened: 'tightened',
  tested_good: 'tested good',
  nothing_found: 'nothing found',
};

const ORIGIN_WORDS: Readonly<Record<string, string>> = {
  file: 'in the file',
  catalogue: 'from the parts list',
  dictionary: 'from the shop’s own words',
  rule: 'the shop’s rule',
  person: 'a person said so',
  unknown: 'not known',
};

const FAULT_WORDS: Readonly<Record<string, string>> = {
  placeholder: 'it looks like “not read”',
  back: 'it is below an earlier reading',
  impossible_rate: 'more than 24 hours a day would have passed since the reading before',
  typing: 'it is out of line with the readings around it, as a typing slip would be',
};

export const PAY_WORDS: Record<NonNullable<RepairWhole['payType']>, string> = {
  customer: 'the customer pays',
  warranty: 'under warranty',
  shop: 'the shop pays',
};

export const reasonWords = (reason: string): string =>
  REASON_WORDS[reason as RepairLine['reason']] ?? reason.replaceAll('_', ' ');
export const workWords = (work: string): string =>
  WORK_WORDS[work as keyof typeof WORK_WORDS] ?? work.replaceAll('_', ' ');
export const originWords = (origin: string): string => ORIGIN_WORDS[origin] ?? origin;
/** Why a reading of the hour meter is not used. */
export const faultWords = (fault: string): string => FAULT_WORDS[fault] ?? fault.replaceAll('_', ' ');
