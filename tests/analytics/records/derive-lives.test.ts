import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { dayNumber } from '../../../analytics/records/day-number';
import { deriveLives, deriveLivesOfUnit, modelComponents } from '../../../analytics/records/derive-lives';
import type { PartLife } from '../../../analytics/records/part-life';
import { groupRows } from '../../../analytics/records/record-types';
import type { RecordLine, RecordRepair, RecordUnit } from '../../../analytics/records/record-types';
import { componentRow, partLine, repairRow, unitRow, workLine } from './rows';

const COMPONENTS = [
  componentRow('clutch', 'pto'),
  componentRow('belt', 'deck'),
  componentRow('coil', 'ignition', { isOfEngine: true }),
  componentRow('engine', 'engine', { isEngine: true }),
];
const asOfDay = dayNumber('2025-12-31');
const start = dayNumber('2023-01-01');
const KNOWN = unitRow({ inRegister: true, inServiceDay: start });

function derive(unit: RecordUnit, repairs: RecordRepair[], lines: RecordLine[]): PartLife[] {
  return deriveLives({ units: [unit], repairs, lines, components: COMPONENTS, asOfDay });
}
const brief = (lives: PartLife[]) =>
  lives.map(({ componentId, origin, outcome, hours, days }) => [
    componentId,
    origin,
    outcome,
    hours && [hours.entry, hours.exit],
    days && [days.entry, days.exit],
  ]);
const only = (lives: PartLife[]): PartLife => {
  const [life] = lives;
  if (!life || lives.length !== 1) throw new Error(`one life expected, got ${String(lives.length)}`);
  return life;
};

describe('where a life starts', () => {
  const repairs = [
    repairRow('a', '2024-01-01', { meterHours: 100 }),
    repairRow('b', '2024-12-31', { meterHours: 160 }),
  ];
  const lines = [partLine('a', 'clutch', { partId: 'old' }), partLine('b', 'clutch', { partId: 'new' })];

  test('at in-service where the unit is known from that day, then where the shop fitted the part', () => {
    const lives = derive(KNOWN, repairs, lines);
    expect(brief(lives)).toEqual([
      ['clutch', 'in_service', 'failed', [0, 100], [0, 365]],
      ['clutch', 'fitted', 'failed', [0, 60], [0, 365]],
      ['clutch', 'fitted', 'censored', [0, 0], [0, 0]],
    ]);
    expect(lives.map(({ partId }) => partId)).toEqual([null, 'old', 'new']);
    expect(lives.map(({ startRepairId, endRepairId }) => [startRepairId, endRepairId])).toEqual([
      [null, 'a'],
      ['a', 'b'],
      ['b', null],
    ]);
  });

  test('unknown before the first visit: a part that failed at that very visit adds nothing', () => {
    const lives = derive(unitRow({ inServiceDay: start }), repairs, lines);
    expect(lives.map(({ origin }) => origin)).toEqual(['fitted', 'fitted']);
  });

  test('unknown history: assumed original, delayed entry at the first reading', () => {
    const more = [repairRow('0', '2023-07-01', { meterHours: 40 }), ...repairs];
    const [life] = derive(unitRow({ inServiceDay: start }), more, lines);
    expect(life?.origin).toBe('assumed_original');
    expect(life?.hours).toEqual({ entry: 40, exit: 100, isCut: false });
    expect(life?.days).toEqual({ entry: 181, exit: 365, isCut: false });
  });

  test('in the register, but known only later: delayed entry from that day', () => {
    const unit = unitRow({ inRegister: true, inServiceDay: start, knownFromDay: dayNumber('2023-03-01') });
    const [life] = derive(
      { ...unit, readings: [{ day: dayNumber('2023-04-01'), hours: 20 }] },
      repairs,
      lines,
    );
    expect(life?.origin).toBe('assumed_original');
    expect(life?.hours?.entry).toBe(20);
    expect(life?.days?.entry).toBe(59);
  });

  test('without an in-service day the calendar age is not known and says so', () => {
    const more = [repairRow('0', '2023-07-01', { meterHours: 40 }), ...repairs];
    const [life] = derive(unitRow(), more, lines);
    expect(life?.origin).toBe('assumed_original');
    expect([life?.days, life?.daysMissing]).toEqual([null, 'no_in_service_day']);
  });
});

describe('where a life ends', () => {
  const at = (reason: RecordLine['reason']) =>
    derive(
      KNOWN,
      [repairRow('a', '2024-01-01', { meterHours: 100 })],
      [partLine('a', 'clutch', { reason })],
    )[0];

  test.each([
    ['failed', 'failed'],
    ['damage', 'damage'],
    ['maintenance', 'censored'],
    ['preventive', 'censored'],
    ['upgrade', 'censored'],
    [null, 'unknown'],
  ] as const)('a line with reason %s ends it as %s', (reason, outcome) => {
    expect(at(reason)?.outcome).toBe(outcome);
  });

  test('still running: at the last known reading, here the register’s after the last repair', () => {
    const unit = { ...KNOWN, readings: [{ day: dayNumber('2025-06-30'), hours: 220 }] };
    const lives = derive(
      unit,
      [repairRow('a', '2024-01-01', { meterHours: 100 })],
      [partLine('a', 'clutch')],
    );
    expect(lives[1]?.hours).toEqual({ entry: 0, exit: 120, isCut: false });
    expect(lives[1]?.days?.exit).toBe(546);
    expect(lives[1]?.endReason).toBe('running');
  });

  test('readings and repairs after the day of the analysis do not exist yet', () => {
    const unit = { ...KNOWN, readings: [{ day: asOfDay + 1, hours: 220 }] };
    const repairs = [
      repairRow('a', '2024-01-01', { meterHours: 100 }),
      repairRow('b', '2026-01-15', { meterHours: 230 }),
    ];
    const lives = derive(unit, repairs, [partLine('a', 'clutch'), partLine('b', 'clutch')]);
    expect(lives.map(({ outcome }) => outcome)).toEqual(['failed', 'censored']);
    expect(lives[1]?.hours?.exit).toBe(0);
  });

  test('work without a part, a returned core and a counter sale end nothing', () => {
    const repairs = [
      repairRow('a', '2024-01-01', { meterHours: 100 }),
      repairRow('b', '2024-02-01', { meterHours: 110 }),
      repairRow('c', '2024-03-01', { meterHours: 120, ticketType: 'counter_sale' }),
    ];
    const lines = [
      workLine('a', 'clutch', 'tested_good'),
      workLine('a', 'clutch', 'adjusted'),
      partLine('b', 'clutch', { quantity: -1 }),
      partLine('c', 'clutch'),
    ];
    const life = only(derive(KNOWN, repairs, lines));
    expect([life.outcome, life.hours?.exit]).toEqual(['censored', 110]);
  });

  test('several of a component at one visit are one event, and the gravest reason rules', () => {
    const lines = [
      partLine('a', 'clutch', { reason: 'maintenance', partId: 'x' }),
      partLine('a', 'clutch', { reason: 'failed', partId: 'y', quantity: 2 }),
      partLine('a', 'clutch', { reason: null, partId: 'z' }),
    ];
    const lives = derive(KNOWN, [repairRow('a', '2024-01-01', { meterHours: 100 })], lines);
    expect(lives.map(({ outcome }) => outcome)).toEqual(['failed', 'censored']);
    expect(lives[1]?.partId).toBe('y');
  });

  test('a part fails on the day the machine came in and starts on the day of the work', () => {
    const a = repairRow('a', '2024-01-20', {
      openedDay: dayNumber('2024-01-01'),
      readyDay: dayNumber('2024-01-11'),
    });
    const b = repairRow('b', '2024-02-20', { openedDay: dayNumber('2024-02-10') });
    const lives = derive(KNOWN, [a, b], [partLine('a', 'clutch'), partLine('b', 'clutch')]);
    expect(lives.map(({ days }) => days?.exit)).toEqual([365, 30, 0]);
  });

  test('dead on arrival: half of the meter’s and the calendar’s resolution, flagged', () => {
    const repairs = [
      repairRow('a', '2024-01-01', { meterHours: 100 }),
      repairRow('b', '2024-01-01', { meterHours: 100 }),
    ];
    const lives = derive(KNOWN, repairs, [partLine('a', 'clutch'), partLine('b', 'clutch')]);
    expect(lives[1]).toMatchObject({
      hours: { entry: 0, exit: 0.05 },
      days: { entry: 0, exit: 0.5 },
      isDeadOnArrival: true,
    });
    expect(lives.filter(({ isDeadOnArrival }) => isDeadOnArrival)).toHaveLength(1);
  });
});

describe('the hour meter', () => {
  test('no reading at one end: no hours, the calendar stays', () => {
    const repairs = [repairRow('a', '2024-01-01'), repairRow('b', '2024-12-31', { meterHours: 160 })];
    const lives = derive(KNOWN, repairs, [partLine('a', 'clutch'), partLine('b', 'clutch')]);
    expect(lives.slice(0, 2).map(({ hours, hoursMissing }) => [hours, hoursMissing])).toEqual([
      [null, 'no_reading_at_end'],
      [null, 'no_reading_at_start'],
    ]);
    expect(lives[1]?.days?.exit).toBe(365);
  });

  test('a restart within a life: known running up to the last trusted reading, the rest set aside', () => {
    const hours = [350, 410, 12, 60, 110];
    const repairs = hours.map((meterHours, n) =>
      repairRow(`r${String(n)}`, `2024-0${String(n + 1)}-01`, { meterHours }),
    );
    const lives = derive(KNOWN, repairs, [
      partLine('r0', 'clutch'),
      partLine('r3', 'clutch'),
      partLine('r4', 'clutch'),
    ]);
    expect(lives[1]).toMatchObject({
      outcome: 'failed',
      hours: { entry: 0, exit: 60, isCut: true },
      days: { exit: 91 },
    });
    expect(lives[2]).toMatchObject({ outcome: 'failed', hours: { entry: 0, exit: 50, isCut: false } });
  });

  test('a restart whose old reading was written down goes on counting', () => {
    const repairs = [
      repairRow('a', '2024-01-01', { meterHours: 350 }),
      repairRow('b', '2024-03-01', { meterHours: 0, oldMeterHours: 400 }),
      repairRow('c', '2024-06-01', { meterHours: 60 }),
    ];
    const lives = derive(KNOWN, repairs, [partLine('a', 'clutch'), partLine('c', 'clutch')]);
    expect(lives[1]?.hours).toEqual({ entry: 0, exit: 110, isCut: false });
  });
});

describe('a visit without a reading', () => {
  const lines = [partLine('b', 'clutch'), partLine('d', 'clutch')];
  const visits = (last: Parameters<typeof repairRow>[2]) => [
    repairRow('a', '2024-01-01', { meterHours: 100 }),
    repairRow('b', '2024-04-10'),
    repairRow('c', '2024-07-19', { meterHours: 300 }),
    repairRow('d', '2024-10-27', last),
  ];

  test('takes its hours from the line between the readings before and after it, and the life says so', () => {
    const lives = derive(KNOWN, visits({ meterHours: 350 }), lines);
    expect(lives[0]?.hours).toEqual({ entry: 0, exit: 200, isCut: false, isBetween: true });
    expect(lives[1]?.hours).toEqual({ entry: 0, exit: 150, isCut: false, isBetween: true });
  });

  test('has none where no reading comes after it, and a far one does not count', () => {
    expect(derive(KNOWN, visits({}), lines)[1]).toMatchObject({
      hours: null,
      hoursMissing: 'no_reading_at_end',
    });
    const far = [
      repairRow('a', '2023-02-01', { meterHours: 10 }),
      repairRow('b', '2024-04-10'),
      ...visits({}).slice(2),
    ];
    expect(derive(KNOWN, far, lines)[0]).toMatchObject({ hours: null, hoursMissing: 'no_reading_at_end' });
  });
});

describe('an engine swapped for another', () => {
  const repairs = [
    repairRow('a', '2024-01-01', { meterHours: 100, engineSerial: 'E-1' }),
    repairRow('b', '2024-07-01', { meterHours: 150, engineSerial: 'E-2' }),
    repairRow('c', '2024-12-01', { meterHours: 190, engineSerial: 'e2' }),
  ];

  test('by this shop: its components start anew, the others go on', () => {
    const lines = [partLine('b', 'engine'), partLine('c', 'coil'), partLine('c', 'clutch')];
    const lives = derive(KNOWN, repairs, lines);
    const of = (id: string) =>
      brief(lives.filter(({ componentId }) => componentId === id)).map((row) => row.slice(1, 4));
    expect(of('coil').slice(0, 2)).toEqual([
      ['in_service', 'censored', [0, 150]],
      ['fitted', 'failed', [0, 40]],
    ]);
    expect(of('clutch')[0]).toEqual(['in_service', 'failed', [0, 190]]);
    expect(of('engine')).toEqual([
      ['in_service', 'failed', [0, 150]],
      ['fitted', 'censored', [0, 40]],
    ]);
    expect(lives.filter(({ componentId }) => componentId === 'coil').map(({ engine }) => engine)).toEqual([
      0, 1, 1,
    ]);
  });

  test('elsewhere: censored at the visit before, not followed until the shop fits one', () => {
    const lives = derive(KNOWN, repairs, [partLine('c', 'coil')]);
    expect(lives.map(({ origin, outcome, hours }) => [origin, outcome, hours?.exit])).toEqual([
      ['in_service', 'censored', 100],
      ['fitted', 'censored', 0],
    ]);
  });

  test('a serial that gives way to the old one again was a slip of the pen', () => {
    const slip = repairs.map((repair) => (repair.id === 'c' ? { ...repair, engineSerial: 'E-1' } : repair));
    const lives = derive(KNOWN, slip, [partLine('c', 'coil')]);
    expect(lives[0]).toMatchObject({ outcome: 'failed', hours: { exit: 190 } });
  });
});

test('an original part is followed on every unit of a model that is known to have it', () => {
  const units = [KNOWN, { ...KNOWN, id: 'v' }, { ...KNOWN, id: 'w', modelId: 'other' }];
  const repairs = [
    repairRow('a', '2024-01-01', { meterHours: 100 }),
    repairRow('b', '2025-01-01', { unitId: 'v', meterHours: 80 }),
    repairRow('c', '2025-01-01', { unitId: 'w', modelId: 'other', meterHours: 80 }),
  ];
  const lines = [partLine('a', 'clutch')];
  const lives = deriveLives({ units, repairs, lines, components: COMPONENTS, asOfDay });
  expect(lives.map(({ unitId, outcome }) => [unitId, outcome])).toEqual([
    ['u', 'failed'],
    ['u', 'censored'],
    ['v', 'censored'],
  ]);
});

describe('whatever the records', () => {
  const reason = fc.constantFrom('failed', 'damage', 'maintenance', 'preventive', 'upgrade', null);
  const visit = fc.record({
    unit: fc.integer({ min: 0, max: 4 }),
    day: fc.integer({ min: start - 100, max: asOfDay + 50 }),
    late: fc.integer({ min: 0, max: 20 }),
    hours: fc.oneof(fc.constantFrom(null, 0, 1, 9999, NaN), fc.integer({ min: 0, max: 900 })),
    serial: fc.constantFrom(null, 'A', 'B'),
    lines: fc.array(fc.record({ component: fc.constantFrom('clutch', 'belt', 'coil', 'engine'), reason }), {
      maxLength: 3,
    }),
  });
  const shop = fc.array(visit, { maxLength: 25 }).map((visits) => {
    const units = [0, 1, 2, 3, 4].map((n) =>
      unitRow({
        id: String(n),
        inRegister: n % 2 === 0,
        inServiceDay: n < 3 ? start + n : null,
        modelId: n < 4 ? 'm' : 'k',
      }),
    );
    const repairs = visits.map(({ unit, day, late, hours, serial }, n) => ({
      ...repairRow(`r${String(n)}`, '2024-01-01'),
      unitId: String(unit),
      modelId: unit < 4 ? 'm' : 'k',
      openedDay: day,
      closedDay: day + late,
      meterHours: hours,
      engineSerial: serial,
    }));
    const lines = visits.flatMap((v, n) =>
      v.lines.map((l) => partLine(`r${String(n)}`, l.component, { reason: l.reason })),
    );
    return { units, repairs, lines, components: COMPONENTS, asOfDay };
  });

  test('every age is finite, nothing is negative, and ids are unique', () => {
    fc.assert(
      fc.property(shop, (records) => {
        const lives = deriveLives(records);
        for (const { hours, days, outcome, origin } of lives) {
          for (const span of [hours, days]) {
            if (span === null) continue;
            expect(Number.isFinite(span.exit) && span.exit >= 0 && span.entry >= 0).toBe(true);
            if (outcome === 'failed' && origin !== 'assumed_original' && !span.isCut)
              expect(span.exit).toBeGreaterThan(0);
          }
        }
        expect(new Set(lives.map(({ id }) => id)).size).toBe(lives.length);
      }),
      { seed: 3 },
    );
  });

  test('the order of rows does not matter', () => {
    fc.assert(
      fc.property(shop, (records) => {
        const turned = { ...records, repairs: records.repairs.toReversed() };
        expect(deriveLives(turned)).toEqual(deriveLives(records));
      }),
      { seed: 4 },
    );
  });

  test('rebuilding only the units that changed gives the rows of the full rebuild', () => {
    fc.assert(
      fc.property(shop, fc.integer({ min: 0, max: 25 }), (records, kept) => {
        const before = { ...records, repairs: records.repairs.slice(0, kept) };
        const earlier = modelComponents(before);
        const rows = new Map(groupRows(deriveLives(before), ({ unitId }) => unitId));
        const now = modelComponents(records);
        const changed = new Set(records.repairs.slice(kept).map(({ unitId }) => unitId));
        const linesOfRepair = groupRows(records.lines, ({ repairId }) => repairId);
        for (const unit of records.units) {
          const key = unit.modelId ?? '';
          const isModelChanged = (now.get(key) ?? []).join() !== (earlier.get(key) ?? []).join();
          if (!changed.has(unit.id) && !isModelChanged) continue;
          rows.set(
            unit.id,
            deriveLivesOfUnit({
              unit,
              repairs: records.repairs.filter(({ unitId }) => unitId === unit.id),
              linesOfRepair: (repairId) => linesOfRepair.get(repairId) ?? [],
              components: new Map(COMPONENTS.map((c) => [c.id, c])),
              modelComponentIds: now.get(key) ?? [],
              asOfDay,
            }),
          );
        }
        expect(records.units.flatMap(({ id }) => rows.get(id) ?? [])).toEqual(deriveLives(records));
      }),
      { seed: 5 },
    );
  });
});
