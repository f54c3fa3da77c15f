import type { Comeback } from './comeback-types';
import { wilsonInterval } from '../rates/wilson-interval';
import type { Interval } from '../types';
import type { RateRepair } from './comeback-outcomes';
import { shrinkRates } from './shrink-rates';

export type ComebackDriver = {
  /** `null`: the record of the first repair names no component. */
  componentId: string | null;
  modelId: string | null;
  /** Repairs of this component on this model that came back, and that could. */
  count: number;
  size: number;
  rate: number | null;
  interval: Interval;
  /** Comebacks beyond what the shop's own rate over all repairs would give for this size. */
  beyondAverage: number;
  shrunken: number | null;
  shrunkenInterval: Interval | null;
  /** Ids of the comebacks, each in one driver only. */
  comebackIds: string[];
};

type Driven = Pick<Comeback, 'id' | 'firstRepairId' | 'modelId' | 'componentId' | 'isCounted'>;

/**
 * What the comebacks are about: component on model, those furthest beyond the average first. Every first repair that
 * came back stands in one row, by the component that joins it to its return, so the counts add up to the rate's.
 */
export function comebackDrivers(input: {
  repairs: readonly RateRepair[];
  comebacks: readonly Driven[];
}): ComebackDriver[] {
  const repairOf = new Map(input.repairs.map((repair) => [repair.id, repair]));
  const rows = new Map<string, ComebackDriver>();
  const rowFor = (componentId: string | null, modelId: string | null): ComebackDriver => {
    const key = JSON.stringify([componentId, modelId]);
    const row = rows.get(key) ?? emptyRow(componentId, modelId);
    rows.set(key, row);
    return row;
  };
  const rowOfFirst = new Map<string, ComebackDriver>();
  for (const { id, firstRepairId, componentId, isCounted } of input.comebacks) {
    const first = repairOf.get(firstRepairId);
    if (!isCounted || !first) continue;
    const row = rowOfFirst.get(firstRepairId) ?? rowFor(componentOf(first, componentId), first.modelId);
    row.comebackIds.push(id);
    if (!rowOfFirst.has(firstRepairId)) row.count++;
    rowOfFirst.set(firstRepairId, row);
  }
  for (const { componentIds, modelId } of input.repairs) {
    const cells = componentIds.length > 0 ? [...new Set(componentIds)] : [null];
    for (const componentId of cells) rowFor(componentId, modelId).size++;
  }
  const average = rowOfFirst.size / Math.max(1, input.repairs.length);
  const drivers = [...rows.values()].map((row) => {
    const { estimate, lower, upper } = wilsonInterval(row.count, row.size);
    return {
      ...row,
      rate: estimate,
      interval: { lower, upper },
      beyondAverage: row.count - average * row.size,
    };
  });
  return shrinkRates(drivers)
    .filter(({ count }) => count > 0)
    .sort((a, b) => b.beyondAverage - a.beyondAverage || b.count - a.count);
}

/** A component of the first repair, so that what came back stands among what could. */
function componentOf(first: RateRepair, componentId: string | null): string | null {
  if (componentId !== null && first.componentIds.includes(componentId)) return componentId;
  return first.componentIds[0] ?? null;
}

function emptyRow(componentId: string | null, modelId: string | null): ComebackDriver {
  return {
    componentId,
    modelId,
    count: 0,
    size: 0,
    rate: null,
    interval: { lower: 0, upper: 1 },
    beyondAverage: 0,
    shrunken: null,
    shrunkenInterval: null,
    comebackIds: [],
  };
}
