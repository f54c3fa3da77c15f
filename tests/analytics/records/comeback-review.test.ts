import { describe, expect, test } from 'vitest';
import type { RateRepair } from '../../../analytics/records/comeback-outcomes';
import { comebackDrivers } from '../../../analytics/records/comeback-drivers';
import { dayNumber } from '../../../analytics/records/day-number';
import { byTheDoor, firstVisitCure } from '../../../analytics/records/first-visit-cure';

const repair = (id: string, workDay: number, componentIds: string[] = [], modelId = 'm'): RateRepair => ({
  id,
  workDay,
  modelId,
  technicianIds: [],
  componentIds,
});
const comeback = (
  id: string,
  firstRepairId: string,
  firstWorkDay: number,
  returnDay: number,
  componentId: string | null = null,
) => ({
  id,
  returnRepairId: id as string | null,
  firstRepairId,
  firstWorkDay,
  returnDay,
  modelId: 'm',
  componentId,
  isCounted: true,
  isOurs: false,
});

describe('first-visit cure', () => {
  const repairs = [repair('a', 100), repair('b', 120), repair('c', 140), repair('d', 100), repair('e', 400)];
  const comebacks = [comeback('b', 'a', 100, 118), comeback('c', 'b', 120, 139)];
  const cure = (rows = comebacks) =>
    firstVisitCure({ repairs, comebacks: rows, asOfDay: 420, windowDays: 90 });

  test('heads that ended their episode, over episodes old enough to judge', () => {
    expect(cure()).toMatchObject({ cured: 1, of: 2, rate: 0.5 });
  });

  test('a dismissed return is an episode of its own', () => {
    expect(cure(comebacks.map((c) => ({ ...c, isCounted: false })))).toMatchObject({
      cured: 4,
      of: 4,
      rate: 1,
    });
  });

  test('a note without a ticket ends a first visit’s cure too', () => {
    expect(cure([...comebacks, { ...comeback('n', 'd', 100, 110), returnRepairId: null }])).toMatchObject({
      cured: 0,
      of: 2,
    });
  });

  test('none old enough: no rate', () => {
    expect(firstVisitCure({ repairs, comebacks: [], asOfDay: 150, windowDays: 90 })).toEqual({
      cured: 0,
      of: 0,
      rate: null,
      interval: { lower: 0, upper: 1 },
    });
  });
});

test('by the door in a month, and from which months’ work', () => {
  const day = dayNumber;
  const rows = [
    comeback('a', 'x', day('2025-03-20'), day('2025-05-01')),
    comeback('b', 'y', day('2025-05-02'), day('2025-05-31')),
    comeback('c', 'z', day('2025-02-01'), day('2025-04-30')),
    { ...comeback('d', 'w', day('2025-01-01'), day('2025-05-15')), isCounted: false },
  ];
  expect(byTheDoor(rows, '2025-05')).toEqual({ count: 2, fromMonth: '2025-03', toMonth: '2025-05' });
  expect(byTheDoor([], '2025-05')).toEqual({ count: 0, fromMonth: null, toMonth: null });
});

describe('what drives it', () => {
  const repairs = [
    ...Array.from({ length: 10 }, (_, n) => repair(`s${String(n)}`, 100, ['switch'])),
    ...Array.from({ length: 20 }, (_, n) => repair(`b${String(n)}`, 100, ['belt', 'switch'], 'k')),
    repair('none', 100),
  ];
  const comebacks = [
    comeback('r1', 's0', 100, 110, 'switch'),
    comeback('r2', 's1', 100, 110, 'switch'),
    comeback('r3', 's1', 100, 130, 'clutch'),
    comeback('r8', 's2', 100, 110, 'switch'),
    comeback('r4', 'b0', 100, 110, 'belt'),
    comeback('r5', 'none', 100, 110, 'clutch'),
    { ...comeback('r6', 'b1', 100, 110, 'belt'), isCounted: false },
    comeback('r7', 'gone', 100, 110, 'belt'),
  ];
  const drivers = comebackDrivers({ repairs, comebacks });
  const cell = (component: string | null, model: string) =>
    drivers.find(({ componentId, modelId }) => componentId === component && modelId === model);

  test('component on model with its count beyond the average, the furthest beyond first', () => {
    expect(drivers[0]).toMatchObject({
      componentId: 'switch',
      modelId: 'm',
      count: 3,
      size: 10,
      comebackIds: ['r1', 'r2', 'r3', 'r8'],
    });
    expect(drivers[0]?.beyondAverage).toBeCloseTo(3 - (10 * 5) / 31, 12);
    expect(cell('belt', 'k')).toMatchObject({ count: 1, size: 20 });
  });

  test('each comeback once: the rows add up', () => {
    expect(drivers.flatMap(({ comebackIds }) => comebackIds).sort()).toEqual([
      'r1',
      'r2',
      'r3',
      'r4',
      'r5',
      'r8',
    ]);
    expect(drivers.reduce((sum, { count }) => sum + count, 0)).toBe(5);
  });

  test('a first repair that names no component stands as not recorded', () => {
    expect(cell(null, 'm')).toMatchObject({ count: 1, size: 1 });
  });

  test('nothing drives nothing', () => {
    expect(comebackDrivers({ repairs, comebacks: [] })).toEqual([]);
    expect(comebackDrivers({ repairs: [], comebacks: [] })).toEqual([]);
  });
});
