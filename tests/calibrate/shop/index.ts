import type { Link } from './plan';
import { planShop } from './plan';
import { between, frailty, pick, seeded } from './random';
import type { ShopSettings } from './settings';
import { shopDefaults } from './settings';
import type { Reason } from './unit-history';
import { liveUnit } from './unit-history';
import { unitUsage, yearClock } from './usage';

export type { ShopSettings } from './settings';

export type SimulatedShop = {
  visits: {
    unitId: string;
    model: string;
    day: number;
    hours: number | null;
    lines: { component: string; reason: Reason | null }[];
  }[];
  units: {
    unitId: string;
    model: string;
    fromDay: number;
    toDay: number;
    fromHours?: number;
    toHours?: number;
  }[];
  /** Planted pairs by `model|causal|resultant`, with the visits in which each was seen. */
  planted: Map<string, number>;
  /** Unordered pairs by `model|a|b` (a < b) that follow from two links or share a cause: they count neither way. */
  implied: Set<string>;
};

const REASONS: readonly Reason[] = ['failed', 'maintenance', 'preventive', 'damage', 'upgrade'];
const key = (...parts: string[]) => parts.join('|');

const impliedPairs = (links: readonly Link[], model: string): string[] => {
  const here = links.filter((link) => link.models.has(model));
  const reach = (from: string): string[] =>
    here.filter(({ causal }) => causal === from).flatMap(({ resultant }) => [resultant, ...reach(resultant)]);
  const direct = new Set(here.map(({ causal, resultant }) => key(causal, resultant)));
  return here.flatMap(({ causal }) => {
    const group = [causal, ...reach(causal)];
    return group.flatMap((a) =>
      group
        .filter((b) => a < b && !direct.has(key(a, b)) && !direct.has(key(b, a)))
        .map((b) => key(model, a, b)),
    );
  });
};

/** A repair shop of our own making, with known truth and dirty records (methods.md §5). */
export const simulateShop = (changes: Partial<ShopSettings> = {}): SimulatedShop => {
  const settings = { ...shopDefaults, ...changes };
  const random = seeded(settings.seed * 2654435761 + 97);
  const plan = planShop(settings, random);
  const endDay = Math.round(settings.years * 365);
  const clock = yearClock(endDay, settings.winterUse);
  const shop: SimulatedShop = { visits: [], units: [], planted: new Map(), implied: new Set() };

  for (const model of plan.models) {
    impliedPairs(plan.links, model.model).forEach((pair) => shop.implied.add(pair));
    for (let index = 0; index < model.units; index += 1) {
      const unitId = `${model.model} unit ${String(index + 1)}`;
      const startDay = Math.floor(between(random, 0, endDay * 0.6));
      const usage = unitUsage(clock, startDay, between(random, ...settings.hoursPerYear));
      const span = { startDay, endDay, frailty: frailty(random, settings.frailtyCv) };
      const isUnknown = random() < settings.unknownHistory;
      const fromDay = isUnknown ? Math.floor(between(random, startDay, (startDay + endDay) / 2)) : startDay;
      const reading = (day: number) => Math.round(usage.hoursAt(day) * 10) / 10;
      for (const visit of liveUnit(settings, plan, model, usage, span, random)) {
        if (visit.day < fromDay) continue;
        const exact = reading(visit.day);
        const hours = random() < settings.hoursRounded ? Math.round(exact / 10) * 10 : exact;
        const lines = [...visit.lines].map(([component, reason]) => ({
          component,
          reason:
            random() < settings.unknownReasons
              ? null
              : random() < settings.miscoded
                ? pick(random, REASONS)
                : reason,
        }));
        const isMissing = random() < settings.hoursMissing;
        shop.visits.push({
          unitId,
          model: model.model,
          day: visit.day,
          hours: isMissing ? null : hours,
          lines,
        });
        for (const link of visit.links) {
          const name = key(model.model, link.causal, link.resultant);
          shop.planted.set(name, (shop.planted.get(name) ?? 0) + 1);
        }
      }
      if (!settings.register) continue;
      const known = { unitId, model: model.model, fromDay, toDay: endDay };
      shop.units.push(isUnknown ? known : { ...known, fromHours: 0, toHours: reading(endDay) });
    }
  }
  return shop;
};
