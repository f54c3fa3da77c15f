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

/** What a rate needs of a comeback. */
export type RateComeback = Pick<Comeback, 'firstRepairId' | 'returnDay' | 'isCounted' | 'isOurs'>;

/** A repair with what became of it by the day of the analysis; days are of the window's clock. */
export type RepairOutcome = RateRepair & {
  ageDays: number;
  isReturned: boolean;
  isOurs: boolean;
  /** Days to the earliest counted return; `null` where it did not come back. */
  returnedAfterDays: number | null;
};

/** What became of each repair; a repair counts once, whatever attaches to it. */
export function repairOutcomes(
  repairs: readonly RateRepair[],
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
  for (const { id, workDay, modelId, technicianIds, componentIds } of repairs) {
    if (workDay > asOfDay) continue;
    const back = returns.get(id);
    outcomes.push({
      id,
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
