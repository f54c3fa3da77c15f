import { describe, expect, it } from 'vitest';
import { dayOf } from '../../../server/demo/calendar';
import { simulateMillrace } from '../../../server/demo/simulate-millrace';
import { broke, byMachine, ticketKey, ticketsOf } from './tickets-of';
import type { Ticket } from './tickets-of';

const AS_OF = '2025-09-30';
const WINDOW_DAYS = 90;
const shop = simulateMillrace({ asOf: AS_OF });
const tickets = ticketsOf(shop.repairs);
const machines = byMachine(tickets);
const isRipe = (ticket: Ticket): boolean => ticket.doneDay + WINDOW_DAYS <= dayOf(AS_OF);

function followed(
  test: (ticket: Ticket) => boolean,
  by: (ticket: Ticket, first: Ticket) => boolean,
): { of: number; back: number } {
  let of = 0;
  let back = 0;
  for (const repairs of machines) {
    repairs.forEach((ticket, index) => {
      if (!isRipe(ticket) || !test(ticket)) return;
      of += 1;
      const later = repairs.slice(index + 1).filter((next) => next.openedDay - ticket.doneDay <= WINDOW_DAYS);
      if (later.some((next) => by(next, ticket))) back += 1;
    });
  }
  return { of, back };
}

describe('planted cascades', () => {
  it.each(
    shop.truth.cascades.map((cascade) => [`${cascade.causal} → ${cascade.resultant}`, cascade] as const),
  )(
    '%s: trouble returns after the cheap part alone, and stops with the causal one',
    (_, { models, causal, resultant }) => {
      const inFamily = (ticket: Ticket): boolean => models.some(({ model }) => model === ticket.first.model);
      const again = (ticket: Ticket): boolean => broke(ticket, causal) || broke(ticket, resultant);
      const alone = followed(
        (ticket) => inFamily(ticket) && broke(ticket, resultant) && !broke(ticket, causal),
        again,
      );
      const both = followed(
        (ticket) => inFamily(ticket) && broke(ticket, resultant) && broke(ticket, causal),
        again,
      );
      expect(alone.back).toBeGreaterThanOrEqual(6);
      expect(both.of).toBeGreaterThanOrEqual(25);
      expect(alone.back / alone.of).toBeGreaterThan(3 * (both.back / both.of));
    },
  );

  it('are not there outside their families', () => {
    for (const { models, causal, resultant } of shop.truth.cascades) {
      const inFamily = (ticket: Ticket): boolean => models.some(({ model }) => model === ticket.first.model);
      const outside = tickets.filter((ticket) => !inFamily(ticket) && broke(ticket, resultant));
      const together = outside.filter((ticket) => broke(ticket, causal));
      expect(outside.length).toBeGreaterThan(0);
      expect(together.length / outside.length).toBeLessThan(0.15);
    }
  });
});

describe('planted coincidences', () => {
  it('has parts that fail at one age on many machines', () => {
    for (const [a, b] of shop.truth.sameAgePairs) {
      const both = machines.filter(
        (repairs) => repairs.some((one) => broke(one, a)) && repairs.some((one) => broke(one, b)),
      );
      expect(both.length, `${a}, ${b}`).toBeGreaterThan(5);
    }
  });

  it('has parts that a service changes together', () => {
    const changed = ({ rows }: Ticket, component: string): boolean =>
      rows.some((row) => row.component === component && row.line_reason === 'maintenance');
    for (const [a, b] of shop.truth.servicePairs) {
      expect(tickets.filter((ticket) => changed(ticket, a) && changed(ticket, b)).length).toBeGreaterThan(
        100,
      );
    }
  });
});

describe('the superseded clutch', () => {
  it('names its successor and what changes with it', () => {
    const { oldNumber, newNumber } = shop.truth.supersession;
    const old = shop.parts.find(({ part_number: number }) => number === oldNumber);
    const kit = shop.parts.find(({ part_number: number }) => number === newNumber);
    expect(old?.superseded_by).toBe(newNumber);
    for (const word of ['connector jumper', 'key is built into', 'flat stabilizer bar'])
      expect(kit?.fitment_note).toContain(word);
  });

  it('lasts longer under its new number, by counts of a year after fitting', () => {
    const yearAfter = (number: string): { fitted: number; failed: number } => {
      const counts = { fitted: 0, failed: 0 };
      for (const repairs of machines) {
        repairs.forEach((ticket, index) => {
          const fits = ticket.rows.some((row) => row.part_number === number);
          if (!fits || ticket.doneDay + 365 > dayOf(AS_OF)) return;
          counts.fitted += 1;
          const next = repairs.slice(index + 1).find((later) => broke(later, 'PTO clutch'));
          if (next && next.openedDay - ticket.doneDay <= 365) counts.failed += 1;
        });
      }
      return counts;
    };
    const old = yearAfter(shop.truth.supersession.oldNumber);
    const kit = yearAfter(shop.truth.supersession.newNumber);
    expect(old.fitted).toBeGreaterThan(40);
    expect(kit.fitted).toBeGreaterThan(40);
    expect(old.failed).toBeGreaterThan(4);
    expect(kit.failed / kit.fitted).toBeLessThan(0.6 * (old.failed / old.fitted));
  });
});

describe('comebacks', () => {
  it('come for every reason of the contract, each after its first repair on the same machine', () => {
    const reasons = new Set(shop.truth.comebacks.map(({ reason }) => reason));
    expect([...reasons].sort()).toEqual([
      'cause_missed',
      'declined_work',
      'defective_part',
      'not_duplicated',
      'operator_or_fuel',
      'part_failed_again',
      'unrelated',
      'work_not_completed',
      'workmanship',
      'wrong_part',
    ]);
    const byKey = new Map(tickets.map((ticket) => [ticket.key, ticket]));
    for (const planted of shop.truth.comebacks) {
      const back = byKey.get(ticketKey(planted.location, planted.repairNumber));
      const first = byKey.get(ticketKey(planted.firstLocation, planted.firstRepairNumber));
      expect(back?.unit).toBe(first?.unit);
      expect(back?.openedDay).toBeGreaterThan(first?.doneDay ?? Infinity);
    }
  });

  it('bring back between 6 and 16 of 100 repairs within 90 days', () => {
    const { of, back } = followed(
      () => true,
      (next) => !next.isService,
    );
    expect(back / of).toBeGreaterThan(0.06);
    expect(back / of).toBeLessThan(0.16);
  });

  it('are planted on 5 to 11 of 100 repairs of a trouble', () => {
    const troubles = tickets.filter(({ first, isService }) => first.ticket_type === 'repair' && !isService);
    const share =
      shop.truth.comebacks.filter(({ reason }) => reason !== 'unrelated').length / troubles.length;
    expect(share).toBeGreaterThan(0.05);
    expect(share).toBeLessThan(0.11);
  });

  it('make one recent month, old enough to judge, visibly bad', () => {
    const troubles = (ticket: Ticket): boolean => !ticket.isService;
    const inBadMonth = (ticket: Ticket): boolean =>
      troubles(ticket) && ticket.first.ready_on.startsWith(shop.truth.badMonth);
    const bad = followed(inBadMonth, troubles);
    const usual = followed((ticket) => troubles(ticket) && !inBadMonth(ticket), troubles);
    expect(bad.of).toBeGreaterThan(30);
    expect(bad.back / bad.of).toBeGreaterThan(1.6 * (usual.back / usual.of));
  });
});
