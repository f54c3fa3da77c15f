import { describe, expect, test } from 'vitest';
import { meanCumulativeFunction } from '../../../analytics/machine/mean-cumulative-function';
import { dayText } from '../../../analytics/records/day-number';
import { recurrence } from '../../../analytics/records/recurrence';
import { repairFacts } from '../../../analytics/records/repair-facts';
import type { RecordUnit } from '../../../analytics/records/record-types';
import { partLine, repairRow, unitRow } from './rows';

const IN_SERVICE = 19_000;
const asOfDay = IN_SERVICE + 1000;
const KNOWN = unitRow({ inRegister: true, inServiceDay: IN_SERVICE });

function recur(
  units: RecordUnit[],
  visits: [unitId: string, age: number, reason?: 'failed' | 'maintenance'][],
) {
  const repairs = visits.map(([unitId, age], n) =>
    repairRow(`r${String(n)}`, dayText(IN_SERVICE + age), { unitId }),
  );
  const lines = visits.map(([, , reason = 'failed'], n) => partLine(`r${String(n)}`, 'belt', { reason }));
  return recurrence({ units, facts: repairFacts({ repairs, lines, components: [] }), asOfDay });
}

describe('the end of observation', () => {
  test('is the day of the analysis for a unit that is still active', () => {
    expect(
      recur(
        [{ ...KNOWN, isActive: true }],
        [
          ['u', 300],
          ['u', 100],
        ],
      ),
    ).toEqual([
      {
        modelId: 'm',
        basis: 'observed',
        histories: [{ unitId: 'u', entry: 0, end: 1000, events: [100, 300] }],
        mtbf: { failures: 2, exposureDays: 1000 },
        leftOutUnits: 0,
      },
    ]);
  });

  test('is else a reading of the register; repairs after it are left out', () => {
    const unit = { ...KNOWN, readings: [{ day: IN_SERVICE + 250, hours: 80 }] };
    expect(
      recur(
        [unit],
        [
          ['u', 100],
          ['u', 300],
        ],
      )[0]?.histories,
    ).toEqual([{ unitId: 'u', entry: 0, end: 250, events: [100] }]);
  });

  test('is no repair and no reading of the bench: among machines that came in, and no MTBF', () => {
    const unit = { ...KNOWN, readings: [{ day: IN_SERVICE + 500, hours: 80, isAtBench: true }] };
    expect(
      recur(
        [unit],
        [
          ['u', 100],
          ['u', 300],
        ],
      )[0],
    ).toMatchObject({
      basis: 'came_in',
      mtbf: null,
      histories: [{ end: 300, events: [100, 300] }],
    });
  });

  test('units without one are left out where others are observed', () => {
    const units = [{ ...KNOWN, isActive: true }, unitRow({ id: 'v', inServiceDay: IN_SERVICE })];
    const [model] = recur(units, [
      ['u', 10],
      ['v', 20],
      ['v', 40],
    ]);
    expect(model).toMatchObject({
      basis: 'observed',
      leftOutUnits: 1,
      mtbf: { failures: 1, exposureDays: 1000 },
    });
  });
});

test('a unit that is known only later enters late, and its earlier repairs are not events', () => {
  const unit = { ...KNOWN, knownFromDay: IN_SERVICE + 200, isActive: true };
  expect(
    recur(
      [unit],
      [
        ['u', 150],
        ['u', 300],
      ],
    )[0]?.histories,
  ).toEqual([{ unitId: 'u', entry: 200, end: 1000, events: [300] }]);
});

test('maintenance is no event; units without an in-service day have no age', () => {
  const units = [
    { ...KNOWN, isActive: true },
    { ...KNOWN, id: 'v', inServiceDay: null, isActive: true },
  ];
  expect(
    recur(units, [
      ['u', 100, 'maintenance'],
      ['v', 50],
    ])[0],
  ).toMatchObject({ histories: [{ events: [] }], leftOutUnits: 1 });
});

test('histories feed the mean cumulative function', () => {
  const units = [
    { ...KNOWN, isActive: true },
    { ...KNOWN, id: 'v', isActive: true },
  ];
  const [model] = recur(units, [
    ['u', 100],
    ['u', 300],
    ['v', 200],
  ]);
  expect(meanCumulativeFunction(model?.histories ?? []).map(({ time, mean }) => [time, mean])).toEqual([
    [100, 0.5],
    [200, 1],
    [300, 1.5],
  ]);
});

test('nothing gives nothing', () => {
  expect(recur([], [])).toEqual([]);
});
