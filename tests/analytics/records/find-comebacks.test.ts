import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { CascadeLink, Comeback, ComebackDecision } from '../../../analytics/records/comeback-types';
import { dayNumber } from '../../../analytics/records/day-number';
import { findComebacks } from '../../../analytics/records/find-comebacks';
import type { ComebackOptions } from '../../../analytics/records/find-comebacks';
import type { RecordLine, RecordRepair } from '../../../analytics/records/record-types';
import { repairFacts } from '../../../analytics/records/repair-facts';
import { componentRow, partLine, repairRow, workLine } from './rows';

const COMPONENTS = [
  componentRow('switch', 'pto', { name: 'PTO switch' }),
  componentRow('clutch', 'pto', { name: 'PTO clutch' }),
  componentRow('fuse', 'charging', { name: 'main fuse' }),
  componentRow('lamp', null, { name: 'lamp' }),
  componentRow('bulb', null, { name: 'bulb' }),
  componentRow('filter', 'engine', { name: 'oil filter' }),
  componentRow('blade', 'deck', { name: 'blade' }),
];
const PHRASES = [{ phrase: 'blades', systemId: 'deck' }];
const CASCADES: CascadeLink[] = [
  { modelId: 'm', causalId: 'clutch', resultantId: 'switch' },
  { modelId: 'm', causalId: 'clutch', resultantId: 'fuse' },
];

type Case = {
  repairs: RecordRepair[];
  lines?: RecordLine[];
  cascades?: CascadeLink[];
  decisions?: ComebackDecision[];
  notes?: Parameters<typeof findComebacks>[0]['notes'];
};
function find({ repairs, lines = [], ...rest }: Case, options?: ComebackOptions): Comeback[] {
  const facts = repairFacts({ repairs, lines, components: COMPONENTS, complaintPhrases: PHRASES });
  return findComebacks({ repairs, facts, components: COMPONENTS, ...rest }, options);
}
const pairs = (comebacks: Comeback[]) =>
  comebacks.map(({ id, firstRepairId }) => `${id}<${firstRepairId}`).sort();
const two = (first: string, back: string, days = 30): Case => ({
  repairs: [
    repairRow('a', '2024-05-01'),
    { ...repairRow('b', '2024-05-01'), closedDay: dayNumber('2024-05-01') + days },
  ],
  lines: [partLine('a', first), partLine('b', back)],
});
const decide = (row: Partial<ComebackDecision> = {}): ComebackDecision => ({
  returnRepairId: 'b',
  status: 'confirmed',
  reason: null,
  ...row,
});

describe('what is a candidate', () => {
  test('(a) the same component again', () => {
    expect(find(two('lamp', 'lamp'))).toMatchObject([
      {
        id: 'b',
        firstRepairId: 'a',
        link: 'same_component',
        componentId: 'lamp',
        days: 30,
        status: 'suggested',
      },
    ]);
  });

  test('(b) the same system in lines, but *unassigned* is no system', () => {
    expect(find(two('switch', 'clutch'))[0]?.link).toBe('same_system');
    expect(find(two('lamp', 'bulb'))).toEqual([]);
    expect(find(two('switch', 'fuse'))).toEqual([]);
  });

  test('(b) the same system in complaint, work or a finding', () => {
    const complaints = two('lamp', 'bulb');
    complaints.repairs = complaints.repairs.map((r) => ({ ...r, complaint: 'BLADES STOP' }));
    expect(find(complaints)[0]?.link).toBe('same_system');
    const work = {
      ...two('switch', 'clutch'),
      lines: [workLine('a', 'switch', 'adjusted'), workLine('b', 'clutch', 'tested_good')],
    };
    expect(find(work)[0]?.link).toBe('same_system');
  });

  test('(b) the same system in the notes, where they are all that was written, and tell of no service', () => {
    const written = (first: string, back: string, complaint?: string) =>
      find({
        repairs: [
          repairRow('a', '2024-05-01', { notes: first }),
          repairRow('b', '2024-06-01', { notes: back, ...(complaint ? { complaint } : {}) }),
        ],
      });
    // Parts may stand there by number alone, so that the evidence must not say that there were none.
    expect(written('BLADES STUCK. FREED', 'BLADES STOPPED AGAIN')).toMatchObject([
      { link: 'same_system', evidence: 'No component known 1 May; no component known 1 June' },
    ]);
    expect(written('BLADES STUCK. FREED', 'ANNUAL SERVICE. OIL, BLADES')).toEqual([]);
    expect(written('BLADES STUCK. FREED', 'BLADES STOPPED AGAIN', 'no spark')).toEqual([]);
  });

  test('(c) joined by a cascade of that model, or both resultant of one cause in it', () => {
    expect(find({ ...two('fuse', 'clutch'), cascades: CASCADES })[0]?.link).toBe('cascade');
    expect(find({ ...two('switch', 'fuse'), cascades: CASCADES })[0]?.link).toBe('cascade');
    const other = CASCADES.map((cascade) => ({ ...cascade, modelId: 'k' }));
    expect(find({ ...two('fuse', 'clutch'), cascades: other })).toEqual([]);
  });

  test('the window includes its last day and no more', () => {
    expect(find(two('lamp', 'lamp', 90))).toHaveLength(1);
    expect(find(two('lamp', 'lamp', 91))).toHaveLength(0);
    expect(find(two('lamp', 'lamp', 31), { windowDays: 30 })).toHaveLength(0);
  });

  test('days run from the work date of the first to the opening of the second', () => {
    const { lines } = two('lamp', 'lamp');
    const a = repairRow('a', '2024-06-20', {
      openedDay: dayNumber('2024-05-01'),
      readyDay: dayNumber('2024-05-10'),
    });
    const b = repairRow('b', '2024-08-30', { openedDay: dayNumber('2024-06-09') });
    expect(find({ repairs: [a, b], lines })[0]?.days).toBe(30);
    const early = { ...b, openedDay: dayNumber('2024-05-08') };
    expect(find({ repairs: [a, early], lines })[0]).toMatchObject({ firstRepairId: 'a', days: 0 });
  });

  test('only identified machines, only repairs', () => {
    const { repairs, lines } = two('lamp', 'lamp');
    expect(find({ repairs: repairs.map((r) => ({ ...r, unitId: null })), lines })).toEqual([]);
    expect(find({ repairs: repairs.map((r) => ({ ...r, unitId: r.id })), lines })).toEqual([]);
    for (const ticketType of ['setup', 'counter_sale', 'internal'] as const) {
      expect(find({ repairs: repairs.map((r) => (r.id === 'b' ? { ...r, ticketType } : r)), lines })).toEqual(
        [],
      );
    }
  });

  test('a visit for maintenance only is neither, unless its complaint is a trouble', () => {
    const { repairs } = two('blade', 'blade');
    const lines = [
      partLine('a', 'blade'),
      partLine('b', 'blade', { reason: 'maintenance' }),
      partLine('b', 'filter', { reason: 'maintenance' }),
    ];
    expect(find({ repairs, lines })).toEqual([]);
    const trouble = repairs.map((r) => ({ ...r, complaint: "Service. Blades won't turn" }));
    expect(find({ repairs: trouble, lines })[0]?.link).toBe('same_system');
    const service = repairs.map((r) => (r.id === 'b' ? { ...r, complaint: 'annual service' } : r));
    expect(
      find({ repairs: service, lines: [partLine('a', 'blade'), workLine('b', 'blade', 'cleaned')] }),
    ).toEqual([]);
  });

  test('something changed as maintenance that fails soon after is the same component again', () => {
    const { repairs } = two('blade', 'blade');
    const lines = [
      partLine('a', 'lamp'),
      partLine('a', 'blade', { reason: 'maintenance' }),
      partLine('b', 'blade'),
    ];
    expect(find({ repairs, lines })[0]?.componentId).toBe('blade');
  });

  test('within an hours limit, where that is switched on and both readings exist', () => {
    const late = two('lamp', 'lamp', 200);
    const withHours = { ...late, repairs: late.repairs.map((r, n) => ({ ...r, meterHours: 100 + 20 * n })) };
    expect(find(withHours)).toEqual([]);
    expect(find(withHours, { windowHours: 25 })[0]?.hours).toBe(20);
    expect(find(withHours, { windowHours: 19 })).toEqual([]);
    expect(find(late, { windowHours: 25 })).toEqual([]);
  });

  test('a window that pauses out of season', () => {
    const autumn = {
      repairs: [repairRow('a', '2024-10-15'), repairRow('b', '2025-04-10')],
      lines: two('lamp', 'lamp').lines ?? [],
    };
    expect(find(autumn)).toEqual([]);
    expect(find(autumn, { pausedMonths: [11, 12, 1, 2, 3] })).toHaveLength(1);
  });
});

describe('what it attaches to', () => {
  const days = [0, 40, 80, 160];
  const chain: Case = {
    repairs: days.map((day, n) => ({ ...repairRow(`r${String(n)}`, '2024-05-01'), closedDay: 20_000 + day })),
    lines: days.map((_, n) => partLine(`r${String(n)}`, n === 1 ? 'lamp' : 'switch')),
  };

  test('the nearest earlier repair that qualifies; the chain is an episode and has a head', () => {
    const comebacks = find(chain);
    expect(pairs(comebacks)).toEqual(['r2<r0', 'r3<r2']);
    expect(comebacks.map(({ episodeRepairId }) => episodeRepairId)).toEqual(['r0', 'r0']);
  });

  test('a dismissed return ends the episode before it', () => {
    const comebacks = find({ ...chain, decisions: [decide({ returnRepairId: 'r2', status: 'dismissed' })] });
    expect(comebacks.map(({ status, isCounted }) => [status, isCounted])).toEqual([
      ['dismissed', false],
      ['suggested', true],
    ]);
    expect(comebacks[1]?.episodeRepairId).toBe('r2');
  });
});

describe('people’s decisions rule', () => {
  test('confirmed with a reason; ours by the reason, or where a person says so', () => {
    const of = (row: Partial<ComebackDecision>) =>
      find({ ...two('lamp', 'lamp'), decisions: [decide(row)] })[0];
    expect(of({ reason: 'workmanship' })).toMatchObject({
      reason: 'workmanship',
      isCounted: true,
      isOurs: true,
    });
    expect(of({ reason: 'part_failed_again' })?.isOurs).toBe(false);
    expect(of({ reason: 'part_failed_again', isOurs: true })?.isOurs).toBe(true);
    expect(of({ reason: 'unrelated' })).toMatchObject({ isCounted: false, isOurs: false });
    expect(of({ reason: 'declined_work' })?.isCounted).toBe(false);
    expect(of({ status: 'suggested', reason: 'workmanship' })?.isOurs).toBe(false);
  });

  test('attached elsewhere, also where nothing would be found, and on another machine', () => {
    const far = two('lamp', 'bulb', 400);
    const decisions = [decide({ attachedToRepairId: 'a' })];
    expect(find({ ...far, decisions })).toMatchObject([
      { id: 'b', firstRepairId: 'a', link: 'person', days: 400 },
    ]);
    const lost = { ...far, repairs: far.repairs.map((r) => (r.id === 'b' ? { ...r, unitId: null } : r)) };
    expect(pairs(find({ ...lost, decisions }))).toEqual(['b<a']);
  });

  test('a repair cannot be attached to itself or to a later one', () => {
    const decisions = [
      decide({ returnRepairId: 'a', attachedToRepairId: 'b' }),
      decide({ attachedToRepairId: 'b' }),
    ];
    expect(pairs(find({ ...two('lamp', 'lamp'), decisions }))).toEqual(['b<a']);
  });

  test('a comeback fixed on the lot without a ticket', () => {
    const notes = [
      { id: 'n', firstRepairId: 'a', day: dayNumber('2024-05-08') },
      { id: 'x', firstRepairId: 'gone', day: 1 },
    ];
    expect(find({ ...two('lamp', 'bulb'), notes })).toMatchObject([
      { id: 'n', returnRepairId: null, firstRepairId: 'a', days: 7, status: 'confirmed', isCounted: true },
    ]);
  });
});

describe('the suggested reason and its evidence', () => {
  const withText = (case_: Case, id: string, row: Partial<RecordRepair>): Case => ({
    ...case_,
    repairs: case_.repairs.map((r) => (r.id === id ? { ...r, ...row } : r)),
  });
  const why = (case_: Case) => {
    const [comeback] = find({ cascades: CASCADES, ...case_ });
    return [comeback?.suggestedReason, comeback?.evidence];
  };

  test('cause missed: the switch went in without the clutch', () => {
    const repairs = [
      repairRow('a', '2024-05-12', { meterHours: 214 }),
      repairRow('b', '2024-06-02', { meterHours: 221.5 }),
    ];
    expect(why({ ...two('switch', 'clutch'), repairs })).toEqual([
      'cause_missed',
      'PTO switch replaced 12 May at 214.0 h without the PTO clutch; PTO clutch replaced 2 June at 221.5 h',
    ]);
  });

  test('cause missed rules over the same part again where the cause went in this time', () => {
    const again = two('switch', 'switch');
    expect(why({ ...again, lines: [...(again.lines ?? []), partLine('b', 'clutch')] })[0]).toBe(
      'cause_missed',
    );
  });

  test('two resultants of one cause', () => {
    expect(why(two('switch', 'fuse'))).toEqual([
      'cause_missed',
      'PTO switch replaced 1 May without the PTO clutch; main fuse replaced 31 May (on this model both follow from the PTO clutch)',
    ]);
  });

  test('damage that shows after the cause was cured is not a missed cause', () => {
    expect(why(two('clutch', 'switch'))[0]).toBe('undetermined');
  });

  test('the same part again, or dead early', () => {
    expect(why(two('lamp', 'lamp'))).toEqual([
      'part_failed_again',
      'Lamp replaced 1 May; replaced again 31 May',
    ]);
    expect(why(two('lamp', 'lamp', 5))[0]).toBe('defective_part');
    const repairs = two('lamp', 'lamp', 5).repairs.map((r, n) => ({ ...r, meterHours: 100 + 40 * n }));
    expect(why({ ...two('lamp', 'lamp', 5), repairs })[0]).toBe('part_failed_again');
  });

  test('worked on, then replaced: not for the records to say', () => {
    expect(
      why({ ...two('lamp', 'lamp'), lines: [workLine('a', 'lamp', 'repaired'), partLine('b', 'lamp')] }),
    ).toEqual(['undetermined', 'Lamp worked on 1 May; replaced again 31 May']);
  });

  test('from what the records say in words', () => {
    const base = two('lamp', 'lamp');
    expect(why(withText(base, 'a', { notes: 'cust declined new lamp' }))[0]).toBe('declined_work');
    expect(why(withText(base, 'a', { correction: 'temporary fix' }))[0]).toBe('work_not_completed');
    expect(why(withText(base, 'b', { cause: 'water in fuel' }))[0]).toBe('operator_or_fuel');
    const nothing = { ...base, lines: [workLine('a', 'switch', 'nothing_found'), partLine('b', 'switch')] };
    expect(why(nothing)[0]).toBe('not_duplicated');
  });

  test('declined work is counted apart', () => {
    const [comeback] = find(withText(two('lamp', 'lamp'), 'a', { notes: 'declined' }));
    expect(comeback).toMatchObject({ isCounted: false, suggestedReason: 'declined_work' });
  });

  test('over the turn of the year the years are said', () => {
    const repairs = [repairRow('a', '2024-12-20'), repairRow('b', '2025-01-05')];
    expect(why({ ...two('lamp', 'lamp'), repairs })[1]).toBe(
      'Lamp replaced 20 December 2024; replaced again 5 January 2025',
    );
  });
});

describe('whatever the records', () => {
  const visits = fc.array(
    fc.record({
      unit: fc.constantFrom('u', 'v', null),
      day: fc.integer({ min: 20_000, max: 20_400 }),
      late: fc.integer({ min: 0, max: 60 }),
      component: fc.constantFrom('switch', 'clutch', 'fuse', 'lamp', 'blade'),
      reason: fc.constantFrom('failed', 'maintenance', null),
      hours: fc.constantFrom(null, NaN, 10, 50, 9999),
      attach: fc.option(fc.nat(20)),
      status: fc.constantFrom('suggested', 'confirmed', 'dismissed'),
    }),
    { maxLength: 20 },
  );
  const caseOf = (
    rows: {
      unit: string | null;
      day: number;
      late: number;
      component: string;
      reason: RecordLine['reason'];
      hours: number | null;
      attach: number | null;
      status: ComebackDecision['status'];
    }[],
  ): Case => ({
    repairs: rows.map(({ unit, day, late, hours }, n) => ({
      ...repairRow(`r${String(n)}`, '2024-05-01'),
      unitId: unit,
      openedDay: day,
      closedDay: day + late,
      meterHours: hours,
    })),
    lines: rows.map(({ component, reason }, n) => partLine(`r${String(n)}`, component, { reason })),
    decisions: rows.flatMap(({ attach, status }, n) =>
      attach === null
        ? []
        : [
            {
              returnRepairId: `r${String(n)}`,
              status,
              reason: null,
              attachedToRepairId: `r${String(attach)}`,
            },
          ],
    ),
    cascades: CASCADES,
  });

  test('a return counts once, comes after its first, and the head of an episode is no counted return', () => {
    fc.assert(
      fc.property(visits, fc.constantFrom(undefined, 30), (rows, windowHours) => {
        const case_ = caseOf(rows);
        const comebacks = find(case_, windowHours ? { windowHours } : {});
        expect(new Set(comebacks.map(({ id }) => id)).size).toBe(comebacks.length);
        const opening = new Map(case_.repairs.map((r) => [r.id, r.openedDay ?? 0]));
        const standingReturns = new Set(comebacks.flatMap((c) => (c.status === 'dismissed' ? [] : [c.id])));
        for (const { id, firstRepairId, episodeRepairId, days, evidence } of comebacks) {
          expect(opening.get(firstRepairId) ?? 0).toBeLessThanOrEqual(opening.get(id) ?? 0);
          expect(standingReturns.has(episodeRepairId)).toBe(false);
          expect(days).toBeGreaterThanOrEqual(0);
          expect(evidence).not.toContain('NaN');
        }
      }),
      { seed: 8 },
    );
  });

  test('the order of rows does not matter', () => {
    fc.assert(
      fc.property(visits, (rows) => {
        const case_ = caseOf(rows);
        expect(pairs(find({ ...case_, repairs: case_.repairs.toReversed() }))).toEqual(pairs(find(case_)));
      }),
      { seed: 9 },
    );
  });

  test('stopping early finds what looking at every pair finds', () => {
    fc.assert(
      fc.property(visits, (rows) => {
        const case_: Case = { ...caseOf(rows), decisions: [] };
        const facts = repairFacts({
          repairs: case_.repairs,
          lines: case_.lines ?? [],
          components: COMPONENTS,
        });
        const order = [...facts].sort(
          (a, b) => a.openingDay - b.openingDay || a.workDay - b.workDay || (a.id < b.id ? -1 : 1),
        );
        const expected = order.flatMap((back, at) => {
          if (!back.isEligible) return [];
          const first = order
            .slice(0, at)
            .findLast(
              (f) =>
                f.isEligible &&
                f.unitId === back.unitId &&
                back.openingDay - f.workDay <= 90 &&
                (f.systemIds.some((id) => back.systemIds.includes(id)) ||
                  f.componentIds.some((id) => back.troubleComponentIds.includes(id))),
            );
          return first ? [`${back.id}<${first.id}`] : [];
        });
        expect(pairs(find({ ...case_, cascades: [] }))).toEqual(expected.sort());
      }),
      { seed: 10 },
    );
  });
});

test('wrong use throws', () => {
  expect(() => find(two('lamp', 'lamp'), { windowDays: 0 })).toThrow('findComebacks requires');
  expect(() => find(two('lamp', 'lamp'), { windowHours: -1 })).toThrow('findComebacks requires');
  expect(find({ repairs: [] })).toEqual([]);
});
