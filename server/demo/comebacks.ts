import type { System, WorkDone } from './components';
import type { Random } from './random';

export type ComebackReason =
  | 'part_failed_again'
  | 'cause_missed'
  | 'workmanship'
  | 'wrong_part'
  | 'defective_part'
  | 'work_not_completed'
  | 'not_duplicated'
  | 'operator_or_fuel'
  | 'declined_work'
  | 'unrelated';

export interface ComebackPlan {
  reason: Exclude<ComebackReason, 'cause_missed'>;
  /** Chance per ordinary trouble visit to which it applies. */
  chance: number;
  /** Only after troubles of these systems; absent: all. */
  systems?: readonly System[];
  lagDays: readonly [low: number, high: number];
  /** What the first visit did instead of replacing the part. */
  firstWork?: WorkDone;
  firstCorrections?: readonly string[];
  firstNotes?: readonly string[];
  complaints?: readonly string[];
  causes: readonly string[];
  corrections: readonly string[];
  /** The second visit is cured without a part. */
  work?: WorkDone;
  /** …and on this component instead of the first one. */
  component?: string;
  payType: 'shop' | 'customer' | 'warranty';
}

/** The reasons for which ordinary repairs come back here; a missed cause comes from the planted chains. */
export const COMEBACK_PLANS: readonly ComebackPlan[] = [
  {
    reason: 'part_failed_again',
    chance: 0.0053,
    lagDays: [20, 80],
    payType: 'shop',
    causes: ['{part} failed again', 'same {part} gone after short time', '2nd {part} this season'],
    corrections: [
      'replaced {part} again, no chg',
      'new {part}, watching this one',
      '{part} replaced second time',
    ],
  },
  {
    reason: 'workmanship',
    chance: 0.0084,
    lagDays: [1, 25],
    work: 'tightened',
    payType: 'shop',
    causes: [
      '{part} bolt not torqued, ours',
      'left loose when {part} was done',
      'plug not seated at {part}',
      '{part} mounted crooked',
    ],
    corrections: [
      'tightened and torqued, n/c',
      'reseated and tightened, our fault',
      'redone right, no charge',
    ],
  },
  {
    reason: 'wrong_part',
    chance: 0.0042,
    lagDays: [1, 30],
    payType: 'shop',
    causes: [
      'wrong {part} was fitted',
      '{part} for other deck size, wont line up',
      'book gave old no. for {part}',
    ],
    corrections: [
      'fitted correct {part}, n/c',
      'right {part} by serial, swapped',
      'exchanged {part} for right number',
    ],
  },
  {
    reason: 'defective_part',
    chance: 0.0048,
    lagDays: [1, 20],
    payType: 'warranty',
    causes: [
      'new {part} bad out of box',
      '{part} defective, bench tested bad',
      'new {part} dead, part warranty',
    ],
    corrections: [
      'replaced defective {part}',
      'swapped {part} under part warranty',
      'new {part}, old one tagged',
    ],
  },
  {
    reason: 'work_not_completed',
    chance: 0.0055,
    lagDays: [1, 15],
    work: 'repaired',
    payType: 'shop',
    causes: [
      '{part} job not finished, waiting on hardware',
      'bracket for {part} never went back on',
      'second item on ticket missed',
    ],
    corrections: [
      'finished the job, n/c',
      'completed what was left, tested',
      'put bracket back, all done now',
    ],
  },
  {
    reason: 'not_duplicated',
    chance: 0.0053,
    lagDays: [3, 40],
    payType: 'customer',
    firstWork: 'nothing_found',
    firstCorrections: [
      'could not duplicate, ran 30 min',
      'NPF, ran ok here',
      'ran hot 40 min, no problem found',
    ],
    causes: [
      'acted up here this time, {part}',
      '{part} intermittent, caught it hot',
      'finally did it for us: {part}',
    ],
    corrections: ['replaced {part}', 'new {part}, ran 45 min', '{part} replaced, ok hot and cold'],
  },
  {
    reason: 'operator_or_fuel',
    chance: 0.0468,
    systems: ['fuel', 'ignition'],
    lagDays: [5, 60],
    work: 'cleaned',
    component: 'Carburetor',
    payType: 'customer',
    complaints: ['wont start again', 'dies after start', 'runs bad again', 'surging again'],
    causes: [
      'water in gas from can',
      'old gas put back in',
      'left choke on, fouled',
      'wrong can, 2-cycle mix in tank',
    ],
    corrections: [
      'drained tank, cleaned bowl, showed cust fuel',
      'fresh gas, cleaned carb',
      'dumped fuel, cleaned, went over choke w/ cust',
    ],
  },
  {
    reason: 'declined_work',
    chance: 0.0063,
    lagDays: [10, 75],
    payType: 'customer',
    firstWork: 'adjusted',
    firstCorrections: [
      'adjusted only, cust declined {part}',
      'got it going, declined {part}',
      'quick adjust, {part} quoted and declined',
    ],
    firstNotes: ['customer declined {part}, told it will be back', 'est for {part} declined by phone'],
    causes: ['{part} that was declined is done now', '{part} as quoted last time'],
    corrections: ['replaced {part} as quoted', 'new {part}, ok this time'],
  },
  {
    reason: 'unrelated',
    chance: 0.0042,
    lagDays: [8, 70],
    component: 'Tire',
    payType: 'customer',
    work: 'repaired',
    complaints: ['flat front tire', 'tire flat again, not same one', 'ran over a nail'],
    causes: ['nail in tire, nothing to do w/ last job', 'bead leak', 'thorn'],
    corrections: ['plugged tire', 'sealed bead', 'patched'],
  },
];

export function pickComeback(random: Random, system: System, canTire: boolean): ComebackPlan | undefined {
  return COMEBACK_PLANS.find(
    (plan) =>
      random.chance(plan.chance) &&
      (plan.systems === undefined || plan.systems.includes(system)) &&
      (plan.component !== 'Tire' || canTire),
  );
}
