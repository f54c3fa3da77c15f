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
  | 'unrelated'
  | 'undetermined';

export type ComebackStatus = 'suggested' | 'confirmed' | 'dismissed';

/** A person's word on a return; it outlives every computation. */
export type ComebackDecision = {
  returnRepairId: string;
  status: ComebackStatus;
  reason: ComebackReason | null;
  /** A part that failed again was the shop's doing. */
  isOurs?: boolean | null;
  /** The earlier repair that the person attached it to; `null` keeps the computed one. */
  attachedToRepairId?: string | null;
};

/** A comeback fixed on the lot without a ticket, noted by hand. */
export type ComebackNote = {
  id: string;
  firstRepairId: string;
  day: number;
  reason?: ComebackReason | null;
  isOurs?: boolean | null;
};

/** A pair that a cascade of the model supports; pairs found only together do not join repairs. */
export type CascadeLink = { modelId: string; causalId: string; resultantId: string };

/** A return and the earlier repair of the same trouble that it attaches to. */
export type Comeback = {
  /** Id of the return, or of the note. */
  id: string;
  returnRepairId: string | null;
  firstRepairId: string;
  /** The head of the chain of returns. */
  episodeRepairId: string;
  unitId: string | null;
  modelId: string | null;
  /** The component that joins the two, as it stood at the first repair where it did. */
  componentId: string | null;
  firstWorkDay: number;
  returnDay: number;
  /** Work date of the first to opening of the return; 0 where the return came in before the work was closed. */
  days: number;
  hours: number | null;
  link: 'same_component' | 'same_system' | 'cascade' | 'person';
  suggestedReason: ComebackReason;
  /** What the suggestion rests on, in plain words. */
  evidence: string;
  /** A person's reason. */
  reason: ComebackReason | null;
  status: ComebackStatus;
  /** Came back with the same trouble: not dismissed, not unrelated, not work that the customer declined. */
  isCounted: boolean;
  /** Confirmed as the shop's own doing. */
  isOurs: boolean;
};

const OURS: ReadonlySet<ComebackReason> = new Set([
  'cause_missed',
  'workmanship',
  'wrong_part',
  'defective_part',
  'work_not_completed',
]);
const NOT_COUNTED: ReadonlySet<ComebackReason> = new Set(['unrelated', 'declined_work']);

/** How a comeback counts, by its status and the person's reason, else the suggested one. */
export function standing(
  status: ComebackStatus,
  reason: ComebackReason,
  isSaidOurs: boolean,
): Pick<Comeback, 'isCounted' | 'isOurs'> {
  const isCounted = status !== 'dismissed' && !NOT_COUNTED.has(reason);
  const isOurReason = OURS.has(reason) || (reason === 'part_failed_again' && isSaidOurs);
  return { isCounted, isOurs: isCounted && status === 'confirmed' && isOurReason };
}
