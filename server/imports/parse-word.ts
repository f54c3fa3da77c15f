import {
  LINE_KINDS,
  LINE_REASONS,
  PAY_TYPES,
  PRODUCT_TYPES,
  TICKET_TYPES,
  USE_CLASSES,
  WORK_DONE,
} from '../../shared/basics';
import type { ColumnType } from './columns';

/** Other words that plainly mean one of ours, folded; whatever needs a guess is left out. */
const ALSO: Partial<Record<ColumnType, Record<string, string>>> = {
  ticketType: {
    repairs: 'repair',
    service: 'repair',
    'set up': 'setup',
    counter: 'counter_sale',
    'over the counter': 'counter_sale',
  },
  productType: {
    'riding mower': 'lawn_tractor',
    rider: 'lawn_tractor',
    tractor: 'lawn_tractor',
    zeroturn: 'zero_turn',
    ztr: 'zero_turn',
    'zero turn mower': 'zero_turn',
    'push mower': 'walk_behind',
    'walk behind mower': 'walk_behind',
    'hand held': 'handheld',
    'snow blower': 'snow',
    snowblower: 'snow',
    'snow thrower': 'snow',
  },
  useClass: {
    residential: 'homeowner',
    consumer: 'homeowner',
    'home owner': 'homeowner',
    municipality: 'municipal',
  },
  lineKind: { parts: 'part', labour: 'labor', notes: 'note', fees: 'fee', comment: 'note' },
  lineReason: {
    failure: 'failed',
    broken: 'failed',
    damaged: 'damage',
    upgraded: 'upgrade',
    prevention: 'preventive',
    preventative: 'preventive',
  },
  workDone: {
    adjust: 'adjusted',
    clean: 'cleaned',
    repair: 'repaired',
    tighten: 'tightened',
    'no fault found': 'nothing_found',
    'no trouble found': 'nothing_found',
  },
  payType: { 'customer pay': 'customer', cust: 'customer', internal: 'shop', 'warranty pay': 'warranty' },
};

export const WORDS: Partial<Record<ColumnType, readonly string[]>> = {
  ticketType: TICKET_TYPES,
  productType: PRODUCT_TYPES,
  useClass: USE_CLASSES,
  lineKind: LINE_KINDS,
  lineReason: LINE_REASONS,
  workDone: WORK_DONE,
  payType: PAY_TYPES,
};

/** The word of ours that a cell states: case, spaces and hyphens do not matter. */
export function parseWord(text: string, type: ColumnType): string | undefined {
  const words = WORDS[type] ?? [];
  if (words.includes(text)) return text;
  const folded = text
    .toLowerCase()
    .replace(/[\s_-]+/g, ' ')
    .trim();
  return words.find((word) => word.replaceAll('_', ' ') === folded) ?? ALSO[type]?.[folded];
}
