import type { Random } from './random';
import { MACHINE_TROUBLES } from './phrases-machine';
import { POWER_TROUBLES } from './phrases-power';

/** What people say and write about one component's trouble. */
export interface Trouble {
  complaints: readonly string[];
  causes: readonly string[];
  fixes: readonly string[];
  /** Cures without a part. */
  cures?: readonly string[];
}

export interface Words {
  complaint: string;
  cause: string;
  correction: string;
  notes: string;
}

const TROUBLES: Readonly<Record<string, Trouble>> = { ...POWER_TROUBLES, ...MACHINE_TROUBLES };

export function troubleOf(component: string): Trouble {
  const trouble = TROUBLES[component];
  if (!trouble) throw new Error(`troubleOf requires a component that can fail, got ${component}`);
  return trouble;
}

/** A customer of a chain says what the whole chain does, whichever part gives up today. */
export const CHAIN_COMPLAINTS: Readonly<Record<string, readonly string[]>> = {
  'PTO clutch': [
    'blows main fuse when blades engaged',
    'blades quit, fuse blown',
    'PTO switch gets hot and blades quit',
    'blades quit after 20 min, ok when cold',
    'no blades, burnt smell at the dash',
    'pops fuse as soon as PTO is pulled',
    'blades cut out, switch melted',
  ],
  'Voltage regulator': [
    'battery dead again',
    'battery wont hold a charge',
    'new battery went dead',
    'needs jump every time',
    'battery boils, smells like eggs',
  ],
  'Spindle bearing': [
    'threw deck belt',
    'broke deck belt, squeals first',
    'belt smokes at left side',
    'deck belt came off again',
    'deck squeals then belt goes',
  ],
  'Drive idler pulley': [
    'broke drive belt',
    'no drive, belt chewed up',
    'throws the drive belt',
    'wont pull, belt smell',
    'drive belt rolled over',
  ],
  'Battery cable': [
    'clicks, wont crank',
    'no crank, clicks',
    'cranks once then clicks',
    'hit or miss starting',
    'starter clicks when hot',
  ],
};

export const RESULTANT_CAUSES = [
  'found {part} bad',
  '{part} burnt / gone, rest checks ok',
  '{part} no good',
  'bad {part}',
  '{part} failed',
];
export const RESULTANT_FIXES = [
  'replaced {part}, ran 10 min ok',
  'new {part}, works now',
  'R&R {part}',
  'installed {part}, tested ok in lot',
  '{part} replaced',
];
export const FOUND_CAUSE = [
  '{part} is what was taking the {others} out',
  '{others} gone because of {part}',
  'real cause {part}, {others} damaged',
  'traced to {part}; {others} hurt by it',
];

const AGAIN = [
  'back again: ',
  'same problem, ',
  'STILL ',
  'was just here, ',
  'did it again, ',
  'same as last time. ',
];
const LEAD = ['', '', '', '', '', 'cust states ', 'C/S ', 'says ', 'owner: '];
const TAIL = [
  '',
  '',
  '',
  '',
  '',
  ', wants it by sat',
  ', runs fine otherwise',
  ', call w/ est',
  ', worse lately',
  ', been sitting',
  '. needs it for work',
];
const SERVICE = [
  'annual service',
  'spring service',
  'yearly tune up',
  'full service',
  'service & sharpen',
  'tune up, going over',
  'winter service',
  'check over and service',
  '100 hr service',
];
const SERVICE_FIX = [
  'serviced per list',
  'oil, filters, blades, greased',
  'full service done, interlocks checked',
  'serviced, tires aired, deck cleaned',
  'tune up complete, runs good',
  'serviced & greased',
];
const SERVICE_CAUSE = ['due', 'maintenance', 'service interval', '', ''];

const SHORT: readonly (readonly [RegExp, string])[] = [
  [/replaced/g, 'repl'],
  [/battery/g, 'batt'],
  [/checked/g, 'ckd'],
  [/engine/g, 'eng'],
  [/regulator/g, 'reg'],
  [/bearings?/g, 'brg'],
  [/blades/g, 'blds'],
  [/switch/g, 'sw'],
  [/customer/g, 'cust'],
];

/** Each writer has a hand: some shout, some shorten, some write as they were taught. */
export function inHand(random: Random, text: string): string {
  if (text === '') return text;
  const roll = random.next();
  if (roll < 0.16) return text.toUpperCase();
  if (roll < 0.36) return SHORT.reduce((short, [long, brief]) => short.replace(long, brief), text);
  if (roll < 0.62) return text.charAt(0).toUpperCase() + text.slice(1);
  return roll < 0.7 ? `${text.charAt(0).toUpperCase()}${text.slice(1)}.` : text;
}

export function sayComplaint(random: Random, words: readonly string[], again = false): string {
  const lead = again ? random.pick(AGAIN) : random.pick(LEAD);
  return inHand(random, `${lead}${random.pick(words)}${random.pick(TAIL)}`);
}

export function fillIn(text: string, part: string, others: readonly string[] = []): string {
  return text
    .replaceAll('{part}', part.toLowerCase())
    .replaceAll('{others}', others.join(' & ').toLowerCase());
}

export function serviceWords(random: Random): Words {
  return {
    complaint: inHand(random, random.pick(SERVICE)),
    cause: random.pick(SERVICE_CAUSE),
    correction: inHand(random, random.pick(SERVICE_FIX)),
    notes: '',
  };
}

export function failureWords(random: Random, component: string): Words {
  const trouble = troubleOf(component);
  return {
    complaint: sayComplaint(random, trouble.complaints),
    cause: inHand(random, random.pick(trouble.causes)),
    correction: inHand(random, random.pick(trouble.fixes)),
    notes: '',
  };
}

export function cureWords(random: Random, component: string): Words {
  const trouble = troubleOf(component);
  return {
    ...failureWords(random, component),
    correction: inHand(random, random.pick(trouble.cures ?? trouble.fixes)),
  };
}
