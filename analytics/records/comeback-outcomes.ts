import type { Comeback } from './comeback-types';
import type { WindowClock } from './window-clock';

/** A repair that could come back: an eligible row of `repairFacts`. */
export type RateRepair = {
  id: string;
  workDay: number;
  modelId: string | null;
  technicianIds: readonly string[];
  componentIds: readonly string[];
};

/** Repairs that are alike in what a rate needs and none of which came back, counted instead of listed. */
export type AlikeRepairs = Omit<RateRepair, 'id'> & { repairs: number };

/** What a rate needs of a comeback. */
export type RateComeback = Pick<Comeback, 'firstRepairId' | 'returnDay' | 'isCounted' | 'isOurs'>;

/** A repair, or several alike, with what became of it by the day of the analysis; days are of the window's clock. */
export type RepairOutcome = AlikeRepairs & {
  ageDays: number;
  isReturned: boolean;
  isOurs: boolean;
  /** Days to the earliest counted return; `null` where it did not come back. */
  returnedAfterDays: number | null;
};

/** What became of each repair; a repair counts once, whatever attaches to it. Those that are counted came to nothing. */
export function repairOutcomes(
  repairs: readonly (RateRepair | AlikeRepairs)[],
  comebacks: readonly RateComeback[],
  asOfDay: number,
  daysOf: WindowClock,
): RepairOutcome[] {
  const returns = new Map<string, { day: number; isOurs: boolean }>();
  for (const { firstRepairId, returnDay, isCounted, isOurs } of comebacks) {
    if (!isCounted || returnDay > asOfDay) continue;
    const held = returns.get(firstRepairId);
    const day = Math.min(returnDay, held?.day ?? returnDay);
    returns.set(firstRepairId, { day, isOurs: isOurs || (held?.isOurs ?? false) });
  }
  const outcomes: RepairOutcome[] = [];
  for (const repair of repairs) {
    const { workDay, modelId, technicianIds, componentIds } = repair;
    if (workDay > asOfDay) continue;
    const isOne = 'id' in repair;
    const back = isOne ? returns.get(repair.id) : undefined;
    outcomes.push({
      repairs: isOne ? 1 : repair.repairs,
      workDay,
      modelId,
      technicianIds,
      componentIds,
      ageDays: daysOf(workDay, asOfDay),
      isReturned: back !== undefined,
      isOurs: back?.isOurs ?? false,
      returnedAfterDays: back ? Math.max(0, daysOf(workDay, back.day)) : null,
    });
  }
  return outcomes;
}
