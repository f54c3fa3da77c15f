import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { RateComeback, RateRepair } from '../../../analytics/records/comeback-outcomes';
import { comebackRates, latestJudgeableMonth } from '../../../analytics/records/comeback-rates';
import type { ComebackRateRow } from '../../../analytics/records/comeback-rates';
import { dayNumber, dayText } from '../../../analytics/records/day-number';
import { exactBinomialLimits } from '../../../analytics/rates/exact-binomial-limits';
import { wilsonInterval } from '../../../analytics/rates/wilson-interval';

const WINDOW = 90;

const repair = (id: string, workDay: number, row: Partial<RateRepair> = {}): RateRepair => ({
  id,
  workDay,
  modelId: null,
  technicianIds: [],
  componentIds: [],
  ...row,
});
const back = (first: RateRepair, afterDays: number, row: Partial<RateComeback> = {}): RateComeback => ({
  firstRepairId: first.id,
  returnDay: first.workDay + afterDays,
  isCounted: true,
  isOurs: false,
  ...row,
});
const rowOf = (rows: ComebackRateRow[], key: string): ComebackRateRow => {
  const row = rows.find((each) => each.key === key);
  if (!row) throw new Error(`no row ${key}`);
  return row;
};

/** `size` repairs on the 10th of each month from January 2024, `count` of which came back after 20 days. */
function months(list: [size: number, count: number][]): { repairs: RateRepair[]; comebacks: RateComeback[] } {
  const repairs: RateRepair[] = [];
  const comebacks: RateComeback[] = [];
  list.forEach(([size, count], at) => {
    const month = `${String(2024 + Math.floor(at / 12))}-${String((at % 12) + 1).padStart(2, '0')}`;
    for (let n = 0; n < size; n++) {
      const first = repair(`${month}/${String(n)}`, dayNumber(`${month}-10`));
      repairs.push(first);
      if (n < count) comebacks.push(back(first, 20));
    }
  });
  return { repairs, comebacks };
}
const byMonth = (
  records: { repairs: RateRepair[]; comebacks: RateComeback[] },
  asOf: string,
): ComebackRateRow[] =>
  comebackRates({ ...records, asOfDay: dayNumber(asOf), windowDays: WINDOW, by: 'month' });

test('repairs that did not come back give the same rows counted as listed', () => {
  const { repairs, comebacks } = months(Array.from({ length: 12 }, (_, at) => [20 + at, at % 4]));
  const named = new Set(comebacks.map(({ firstRepairId }) => firstRepairId));
  const counts = new Map<number, number>();
  for (const { id, workDay } of repairs)
    if (!named.has(id)) counts.set(workDay, (counts.get(workDay) ?? 0) + 1);
  const others = [...counts].map(([workDay, alike]) => {
    return { workDay, modelId: null, technicianIds: [], componentIds: [], repairs: alike };
  });
  const listed = byMonth({ repairs, comebacks }, '2025-01-31');
  const counted = comebackRates({
    repairs: repairs.filter(({ id }) => named.has(id)),
    others,
    comebacks,
    asOfDay: dayNumber('2025-01-31'),
    windowDays: WINDOW,
    by: 'month',
  });
  const bare = (rows: ComebackRateRow[]) => rows.map(({ projected: _, ...row }) => row);
  expect(bare(counted)).toEqual(bare(listed));
  const ahead = listed.filter(({ projected }) => projected !== null);
  expect(ahead.length).toBeGreaterThan(0);
  for (const { key, projected } of ahead)
    expect(rowOf(counted, key).projected).toBeCloseTo(projected ?? -1, 12);
});

describe('the rate of a month', () => {
  test('repairs of the month that came back, over those that could, with Wilson’s interval', () => {
    const { repairs, comebacks } = months([[60, 7]]);
    const ours = comebacks.map((c, n) => ({ ...c, isOurs: n < 2 }));
    const row = rowOf(byMonth({ repairs, comebacks: ours }, '2025-01-31'), '2024-01');
    const { lower, upper } = wilsonInterval(7, 60);
    expect(row).toMatchObject({
      month: '2024-01',
      count: 7,
      size: 60,
      rate: 7 / 60,
      oursCount: 2,
      oursRate: 2 / 60,
    });
    expect(row.interval).toEqual({ lower, upper });
  });

  test('a repair counts once, whatever attaches to it; dismissed and declined do not count', () => {
    const first = repair('a', dayNumber('2024-01-10'));
    const other = repair('b', dayNumber('2024-01-11'));
    const comebacks = [
      back(first, 10),
      back(first, 30, { isOurs: true }),
      back(other, 5, { isCounted: false }),
    ];
    expect(byMonth({ repairs: [first, other], comebacks }, '2025-01-31')[0]).toMatchObject({
      count: 1,
      size: 2,
      oursCount: 1,
    });
  });

  test('what lies after the day of the analysis does not exist yet', () => {
    const first = repair('a', dayNumber('2024-01-10'));
    const rows = byMonth(
      { repairs: [first, repair('b', dayNumber('2024-03-01'))], comebacks: [back(first, 60)] },
      '2024-02-20',
    );
    expect(rows.map(({ month, count, size }) => [month, count, size])).toEqual([
      ['2024-01', 0, 1],
      ['2024-02', 0, 0],
    ]);
  });

  test('months run on without gaps; one without repairs has no rate and no limits', () => {
    const rows = byMonth(
      months([
        [10, 1],
        [0, 0],
        [10, 1],
      ]),
      '2024-12-31',
    );
    expect(rows).toHaveLength(12);
    expect(rows[1]).toMatchObject({
      month: '2024-02',
      size: 0,
      rate: null,
      oursRate: null,
      limits: null,
      signal: null,
    });
  });

  test('a comeback whose first repair is not among those that could does not count', () => {
    const rows = byMonth(
      { repairs: [repair('a', 20_000)], comebacks: [back(repair('x', 20_000), 5)] },
      '2025-06-30',
    );
    expect(rows[0]?.count).toBe(0);
  });
});

describe('maturity', () => {
  test('a month can be judged when its last day is as old as the window', () => {
    const asOfDay = dayNumber('2024-06-28');
    expect(latestJudgeableMonth(asOfDay, WINDOW)).toBe('2024-02');
    expect(latestJudgeableMonth(dayNumber('2024-06-29'), WINDOW)).toBe('2024-03');
    const rows = byMonth(
      months([
        [5, 0],
        [5, 0],
        [5, 0],
        [5, 0],
      ]),
      '2024-06-29',
    );
    expect(rows.map(({ maturing }) => maturing)).toEqual([false, false, false, true, true, true]);
  });

  test('with a winter pause it lags longer', () => {
    expect(latestJudgeableMonth(dayNumber('2025-05-15'), WINDOW, [11, 12, 1, 2, 3])).toBe('2024-08');
  });

  test('projected by the formula, worked by hand', () => {
    // Earlier: 10 in January; one returns on day 20, one on day 60: F(20) = 0.1, F(60) = F(90) = 0.2.
    const { repairs, comebacks } = months([[10, 1]]);
    const late = repairs.find(({ id }) => id === '2024-01/9');
    if (late) comebacks.push(back(late, 60));
    // Of age 40 on 30 April: 4 repairs of 21 March, one of which came back.
    const young = [0, 1, 2, 3].map((n) => repair(`y${String(n)}`, dayNumber('2024-03-21')));
    const rows = byMonth(
      { repairs: [...repairs, ...young], comebacks: [...comebacks, back(young[0] ?? repair('', 0), 15)] },
      '2024-04-30',
    );
    expect(rowOf(rows, '2024-03').projected).toBeCloseTo((1 + 3 * ((0.2 - 0.1) / (1 - 0.1))) / 4, 12);
    expect(rowOf(rows, '2024-03').rate).toBe(0.25);
    expect(rowOf(rows, '2024-01').projected).toBeNull();
  });

  test('no projection where no earlier repair is as old as the window', () => {
    const rows = byMonth(
      months([
        [10, 1],
        [10, 1],
      ]),
      '2024-03-20',
    );
    expect(rows.map(({ projected }) => projected)).toEqual([null, null, null]);
  });

  test('on simulated returns the projection recovers the final rate, where the raw rate falls short', () => {
    const uniform = seeded(42);
    let raw = 0;
    let projected = 0;
    const runs = 60;
    for (let run = 0; run < runs; run++) {
      const repairs: RateRepair[] = [];
      const comebacks: RateComeback[] = [];
      for (let n = 0; n < 3000; n++) {
        const first = repair(String(n), 19_800 + Math.floor(360 * uniform()));
        repairs.push(first);
        if (uniform() < 0.12) comebacks.push(back(first, Math.floor(WINDOW * uniform() ** 1.5)));
      }
      const asOf = dayText(19_800 + 360);
      const row = rowOf(byMonth({ repairs, comebacks }, asOf), dayText(19_800 + 330).slice(0, 7));
      expect(row.maturing).toBe(true);
      raw += (row.rate ?? 0) / runs;
      projected += (row.projected ?? 0) / runs;
    }
    // A month of 250 has a standard error of 2 points; 60 of them, 0.3.
    expect(Math.abs(projected - 0.12)).toBeLessThan(0.012);
    expect(raw).toBeLessThan(0.1);
  });
});

describe('limits of the monthly chart', () => {
  const steady: [number, number][] = Array.from({ length: 12 }, () => [50, 5]);

  test('none before six months that can be judged', () => {
    const rows = byMonth(months(steady), '2025-12-31');
    expect(rows.slice(0, 6).map(({ limits }) => limits)).toEqual([null, null, null, null, null, null]);
    expect(rows[6]?.limits).not.toBeNull();
  });

  test('exact binomial for the month’s size around the earlier months, itself left out', () => {
    const rows = byMonth(months([...steady, [40, 20]]), '2025-12-31');
    const judged = rowOf(rows, '2025-01');
    const { lower, upper } = exactBinomialLimits(40, 0.1);
    expect(judged.center).toBeCloseTo(0.1, 12);
    expect(judged.limits).toEqual({ lower: lower / 40, upper: upper / 40 });
    expect(judged.signal).toBe('high');
    expect(rows.slice(0, 12).every(({ signal }) => signal === null)).toBe(true);
  });

  test('they look back on 24 months at most', () => {
    const early: [number, number][] = Array.from({ length: 12 }, () => [50, 25]);
    const later: [number, number][] = Array.from({ length: 25 }, () => [50, 5]);
    const rows = byMonth(months([...early, ...later]), '2028-01-31');
    expect(rowOf(rows, '2027-01').center).toBeCloseTo(0.1, 12);
  });

  test('a maturing month is not judged, and is in no later month’s base', () => {
    const rows = byMonth(months([...steady, [50, 50], [50, 0]]), '2025-03-15');
    expect(rowOf(rows, '2025-01')).toMatchObject({ maturing: true, signal: null });
    expect(rowOf(rows, '2025-02').center).toBeCloseTo(0.1, 12);
  });

  test('a low month signals too', () => {
    const busy: [number, number][] = Array.from({ length: 12 }, () => [100, 20]);
    expect(rowOf(byMonth(months([...busy, [100, 2]]), '2025-12-31'), '2025-01').signal).toBe('low');
  });
});

describe('by model, component and technician', () => {
  const repairs = [
    repair('a', 19_800, {
      modelId: 'm',
      technicianIds: ['dk', 'rl'],
      componentIds: ['clutch', 'belt', 'belt'],
    }),
    repair('b', 19_801, { modelId: 'm', technicianIds: ['dk'], componentIds: ['belt'] }),
    repair('c', 19_802, { modelId: 'k', technicianIds: [], componentIds: [] }),
    repair('d', 19_803),
  ];
  const comebacks = repairs.slice(0, 1).map((first) => back(first, 10));
  const by = (key: 'model' | 'component' | 'technician', asOfDay = 20_000) =>
    comebackRates({ repairs, comebacks, asOfDay, windowDays: WINDOW, by: key });
  const counts = (rows: ComebackRateRow[]) =>
    rows.map(({ key, count, size, month }) => [key, count, size, month]);

  test('a repair stands in the row of each', () => {
    expect(counts(by('model'))).toEqual([
      ['k', 0, 1, null],
      ['m', 1, 2, null],
    ]);
    expect(counts(by('component'))).toEqual([
      ['belt', 1, 2, null],
      ['clutch', 1, 1, null],
    ]);
    expect(counts(by('technician'))).toEqual([
      ['dk', 1, 2, null],
      ['rl', 1, 1, null],
    ]);
  });

  test('they mature with their youngest repair', () => {
    expect(by('model', 19_892).map(({ maturing }) => maturing)).toEqual([false, false]);
    expect(by('model', 19_891).map(({ maturing }) => maturing)).toEqual([true, false]);
  });

  test('the shrunken rate lies between the raw one and the common one', () => {
    const many: RateRepair[] = [];
    const returns: RateComeback[] = [];
    [
      [3, 2],
      [200, 10],
      [150, 30],
      [80, 2],
      [40, 14],
    ].forEach(([size = 0, count = 0], model) => {
      for (let n = 0; n < size; n++) {
        const first = repair(`${String(model)}/${String(n)}`, 19_800, { modelId: String(model) });
        many.push(first);
        if (n < count) returns.push(back(first, 10));
      }
    });
    const rows = comebackRates({
      repairs: many,
      comebacks: returns,
      asOfDay: 20_000,
      windowDays: WINDOW,
      by: 'model',
    });
    const few = rowOf(rows, '0');
    expect(few.shrunken).toBeLessThan(2 / 3 - 0.1);
    expect(few.shrunken).toBeGreaterThan(58 / 473);
    expect(few.shrunkenInterval?.lower).toBeLessThan(few.shrunken ?? 0);
    expect(few.shrunkenInterval?.upper).toBeGreaterThan(few.shrunken ?? 1);
  });

  test('nothing gives no rows', () => {
    expect(
      comebackRates({ repairs: [], comebacks: [], asOfDay: 20_000, windowDays: WINDOW, by: 'model' }),
    ).toEqual([]);
    expect(
      comebackRates({ repairs: [], comebacks: [], asOfDay: 20_000, windowDays: WINDOW, by: 'month' }),
    ).toEqual([]);
  });
});

test('whatever the returns: counts fit, rates and projections are shares, never NaN', () => {
  const row = fc.record({
    day: fc.integer({ min: 19_000, max: 20_000 }),
    after: fc.option(fc.integer({ min: -5, max: 200 })),
  });
  fc.assert(
    fc.property(
      fc.array(row, { maxLength: 60 }),
      fc.integer({ min: 19_000, max: 20_200 }),
      (rows, asOfDay) => {
        const repairs = rows.map(({ day }, n) => repair(String(n), day, { modelId: String(n % 3) }));
        const comebacks = rows.flatMap(({ after }, n) => {
          const first = repairs[n];
          return after === null || !first ? [] : [back(first, after)];
        });
        for (const by of ['month', 'model'] as const) {
          const table = comebackRates({ repairs, comebacks, asOfDay, windowDays: WINDOW, by });
          expect(table.reduce((sum, { size }) => sum + size, 0)).toBe(
            repairs.filter(({ workDay }) => workDay <= asOfDay).length,
          );
          for (const { count, size, rate, projected, limits } of table) {
            expect(count).toBeLessThanOrEqual(size);
            for (const share of [rate, projected, limits?.lower ?? null, limits?.upper ?? null]) {
              if (share !== null) expect(share >= 0 && share <= 1 + 1e-12).toBe(true);
            }
            if (projected !== null) expect(projected).toBeGreaterThanOrEqual((rate ?? 0) - 1e-12);
          }
        }
      },
    ),
    { seed: 12 },
  );
});

test('wrong use throws', () => {
  const input = { repairs: [], comebacks: [], asOfDay: 20_000, by: 'month' } as const;
  expect(() => comebackRates({ ...input, windowDays: 0 })).toThrow('comebackRates requires');
});

function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}
