import { describe, expect, it } from 'vitest';
import { dayOf } from '../../../server/demo/calendar';
import { COMPONENTS } from '../../../server/demo/components';
import { PART_COLUMNS, REPAIR_COLUMNS, UNIT_COLUMNS } from '../../../server/demo/native-rows';
import { simulateMillrace } from '../../../server/demo/simulate-millrace';
import { ticketsOf } from './tickets-of';

const AS_OF = '2025-09-30';
const shop = simulateMillrace({ asOf: AS_OF });
const tickets = ticketsOf(shop.repairs);

/** Words of real makers of machines, engines and parts, which nothing invented may hold. */
const REAL_BRANDS =
  /deere|husqvarna|toro\b|exmark|scag|kohler|briggs|stratton|kawasaki|honda|kubota|cub cadet|craftsman|stihl|echo\b|ariens|gravely|snapper|simplicity|ferris|hustler|bad boy|troy|murray|warner|ogura|champion|ngk|oregon|stens|rotary|walbro|tecumseh|hydro-gear|tuff torq|dixie chopper|bobcat|wright|grasshopper|walker|swisher|poulan|makita|ryobi|dolmar|yamaha|loncin/i;

const ENUMS = {
  ticket_type: ['repair', 'setup', 'counter_sale', 'internal'],
  product_type: ['lawn_tractor', 'zero_turn', 'walk_behind', 'handheld', 'snow', 'utility', 'other', ''],
  use_class: ['homeowner', 'commercial', 'rental', 'municipal', ''],
  line_kind: ['part', 'labor', 'work', 'fee', 'note'],
  line_reason: ['failed', 'maintenance', 'preventive', 'damage', 'upgrade', ''],
  work_done: ['adjusted', 'cleaned', 'repaired', 'tightened', 'tested_good', 'nothing_found', ''],
  pay_type: ['customer', 'warranty', 'shop'],
} as const;

describe('the demo shop as a whole', () => {
  it('has the size of a believable shop', () => {
    expect(shop.units).toHaveLength(1500);
    expect(tickets.length).toBeGreaterThan(7000);
    expect(tickets.length).toBeLessThan(9500);
    expect(shop.repairs.length).toBeGreaterThan(18_000);
    expect(shop.repairs.length).toBeLessThan(29_000);
    expect(new Set(shop.units.map(({ maker, model }) => `${maker} ${model}`)).size).toBe(20);
    expect(COMPONENTS).toHaveLength(40);
    expect(new Set(COMPONENTS.map(({ system }) => system)).size).toBe(10);
  });

  it('is the same for the same day and seed, and another one for another seed', () => {
    expect(simulateMillrace({ asOf: AS_OF })).toEqual(shop);
    expect(simulateMillrace({ asOf: AS_OF, seed: 2 }).repairs).not.toEqual(shop.repairs);
  });

  it('ends in the days before the day that was asked for', () => {
    const lastClosed = Math.max(...tickets.map(({ first }) => dayOf(first.closed_on)));
    expect(dayOf(AS_OF) - lastClosed).toBeGreaterThanOrEqual(0);
    expect(dayOf(AS_OF) - lastClosed).toBeLessThan(7);
    expect(tickets.some(({ first }) => first.picked_up_on === '')).toBe(true);
  });

  it('spreads a mower shop over the year: a rush in spring, little in winter, snow the other way round', () => {
    const inMonths = (months: readonly string[], snow: boolean): number =>
      tickets.filter(
        ({ first }) =>
          (first.product_type === 'snow') === snow && months.includes(first.opened_on.slice(5, 7)),
      ).length;
    expect(inMonths(['03', '04', '05'], false)).toBeGreaterThan(2.5 * inMonths(['12', '01', '02'], false));
    expect(inMonths(['11', '12', '01', '02'], true)).toBeGreaterThan(
      3 * inMonths(['04', '05', '06', '07'], true),
    );
  });

  it('names nobody and nothing real', () => {
    const everything = JSON.stringify([shop.repairs, shop.units, shop.parts, shop.families, shop.people]);
    expect(everything.match(REAL_BRANDS)).toBeNull();
    expect(shop.repairs.every((row) => /^(555-\d{4})?$/.test(row.customer_phone))).toBe(true);
  });
});

describe('every row is valid by the import contract', () => {
  it('has exactly the columns, and only known words in them', () => {
    for (const row of shop.repairs) expect(Object.keys(row)).toEqual([...REPAIR_COLUMNS]);
    for (const row of shop.units) expect(Object.keys(row)).toEqual([...UNIT_COLUMNS]);
    for (const row of shop.parts) expect(Object.keys(row)).toEqual([...PART_COLUMNS]);
    for (const [column, words] of Object.entries(ENUMS)) {
      const used = new Set(shop.repairs.map((row) => row[column as keyof typeof ENUMS]));
      expect(words, column).toEqual(expect.arrayContaining([...used]));
    }
  });

  it('has dates in order and none after the last day', () => {
    for (const { first, key } of tickets) {
      const dates = [first.opened_on, first.ready_on, first.closed_on, first.picked_up_on || AS_OF, AS_OF];
      expect([...dates].sort(), key).toEqual(dates);
    }
  });

  it('has numbers where numbers belong, and the rows of a repair agree', () => {
    for (const row of shop.repairs) {
      for (const column of [
        'meter_hours',
        'quantity',
        'part_amount',
        'part_cost',
        'labor_hours',
        'labor_amount',
      ] as const) {
        expect(row[column]).toMatch(/^(\d+(\.\d{1,2})?)?$/);
      }
    }
    for (const { rows, first, key } of tickets) {
      const head = REPAIR_COLUMNS.slice(0, REPAIR_COLUMNS.indexOf('line_kind'));
      for (const column of head)
        expect(new Set(rows.map((row) => row[column])), key).toEqual(new Set([first[column]]));
    }
  });

  it('keeps identities apart: repair numbers, machines, parts', () => {
    const rowsOfKey = shop.repairs.map((row) => `${row.location}/${row.repair_number}`);
    const changes = rowsOfKey.filter((key, index) => key !== rowsOfKey[index - 1]).length;
    expect(changes).toBe(tickets.length);
    const machines = shop.units.map((unit) => `${unit.maker}/${unit.unit_serial}/${unit.unit_ref}`);
    expect(new Set(machines).size).toBe(machines.length);
    expect(shop.units.every((unit) => unit.unit_serial !== '' || unit.unit_ref !== '')).toBe(true);
    const numbers = new Set(shop.parts.map((part) => `${part.maker}/${part.part_number}`));
    expect(numbers.size).toBe(shop.parts.length);
    const fitted = shop.repairs.filter((row) => row.line_kind === 'part');
    expect(fitted.every((row) => numbers.has(`${row.part_maker}/${row.part_number}`))).toBe(true);
  });

  it('is as imperfect as the records of a real shop', () => {
    const metered = tickets.filter(
      ({ first }) =>
        ['zero_turn', 'lawn_tractor'].includes(first.product_type) && first.ticket_type === 'repair',
    );
    const missing = metered.filter(({ first }) => first.meter_hours === '').length / metered.length;
    expect(missing).toBeGreaterThan(0.1);
    expect(missing).toBeLessThan(0.14);
    const parts = shop.repairs.filter((row) => row.line_kind === 'part' && row.ticket_type === 'repair');
    const unknown = parts.filter((row) => row.line_reason === '').length / parts.length;
    expect(unknown).toBeGreaterThan(0.045);
    expect(unknown).toBeLessThan(0.08);
    const repairs = tickets.filter(({ first }) => first.ticket_type === 'repair');
    expect(
      repairs.filter(({ first }) => first.unit_serial === '' && first.unit_ref !== '').length,
    ).toBeGreaterThan(100);
    expect(
      repairs.filter(({ first }) => first.unit_serial === '' && first.unit_ref === '').length,
    ).toBeGreaterThan(20);
    const registered = new Set(shop.units.map((unit) => `${unit.maker}/${unit.unit_serial}`));
    const walkIns = repairs.filter(
      ({ first }) => first.unit_serial && !registered.has(`${first.maker}/${first.unit_serial}`),
    );
    expect(walkIns.length).toBeGreaterThan(20);
  });

  it('bills labor between the door rates of 85 and 110 dollars', () => {
    for (const { labor_hours: hours, labor_amount: amount } of shop.repairs.filter(
      (row) => row.labor_hours !== '',
    )) {
      const rate = Number(amount) / Number(hours);
      expect(rate).toBeGreaterThanOrEqual(84.9);
      expect(rate).toBeLessThanOrEqual(110.1);
    }
  });
});
