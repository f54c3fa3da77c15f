import type { Random } from './random';
import { between, shuffled } from './random';
import type { ShopSettings } from './settings';

export type Life = { shape: number; scaleHours: number };
export type Link = {
  causal: string;
  resultant: string;
  holds: number;
  foundFirst: number;
  returnDays: number;
  /** Models where the link is at work. */
  models: ReadonlySet<string>;
};
export type ModelPlan = { model: string; units: number; lives: ReadonlyMap<string, Life> };
export type ShopPlan = {
  models: readonly ModelPlan[];
  links: readonly Link[];
  changedApart: ReadonlyMap<string, string>;
  serviceItems: readonly string[];
};

const logBetween = (random: Random, low: number, high: number) =>
  Math.exp(between(random, Math.log(low), Math.log(high)));

/** Which ordered pairs of `names` are linked, taking names from the front so that distractors use the rest. */
const linkedNames = (settings: ShopSettings, names: string[], random: Random): [string, string][] => {
  const links: [string, string][] = [];
  const take = () => names.shift() ?? '';
  while (links.length < settings.links && names.length >= 3) {
    const draw = random();
    const shape =
      settings.shape !== 'mixed' ? settings.shape : draw < 0.6 ? 'pairs' : draw < 0.8 ? 'chain' : 'fork';
    const first = take();
    const second = take();
    links.push([first, second]);
    if (shape === 'pairs' || links.length >= settings.links) continue;
    const third = take();
    links.push(shape === 'chain' ? [second, third] : [first, third]);
  }
  return links;
};

const unitCounts = (settings: ShopSettings): number[] => {
  const { models, unitsPerModel, tail } = settings;
  if (!tail) return Array.from({ length: models }, () => unitsPerModel);
  // Half of the models have under five units; the rest fall off as 1 / rank.
  const weights = Array.from({ length: models }, (_, rank) => 1 / (rank + 3));
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return weights.map((weight, rank) => {
    const share = Math.round((weight / total) * models * unitsPerModel);
    return rank >= models / 2 ? 1 + (rank % 4) : Math.max(share, 5);
  });
};

export const planShop = (settings: ShopSettings, random: Random): ShopPlan => {
  const all = Array.from({ length: settings.components }, (_, index) => `component ${String(index + 1)}`);
  const names = shuffled(random, all);
  const linked = linkedNames(settings, names, random);
  const pairs = (count: number) =>
    Array.from({ length: count }, (): [string, string] => [names.shift() ?? '', names.shift() ?? '']).filter(
      ([, second]) => second !== '',
    );
  const sameAge = pairs(settings.sameAge);
  const changedApart = new Map(pairs(settings.changedApart));
  const serviceItems = names.splice(0, settings.serviceItems);
  const special = new Set([...linked, ...sameAge, ...changedApart].flat());

  const models = unitCounts(settings).map((units, index): ModelPlan => {
    const others = shuffled(
      random,
      all.filter((name) => !special.has(name)),
    );
    const room = Math.max(0, settings.componentsPerModel - special.size);
    const dropped = new Set(
      shuffled(random, [...special]).slice(0, Math.max(0, special.size - settings.componentsPerModel)),
    );
    const chosen = [...[...special].filter((name) => !dropped.has(name)), ...others.slice(0, room)];
    const lives = new Map<string, Life>(
      chosen.map((name) => [
        name,
        { shape: between(random, 0.9, 3), scaleHours: logBetween(random, ...settings.lifeHours) },
      ]),
    );
    for (const [first, second] of sameAge) {
      const scaleHours = logBetween(random, ...settings.lifeHours);
      if (!lives.has(first) || !lives.has(second)) continue;
      lives.set(first, { shape: settings.sameAgeShape, scaleHours });
      lives.set(second, { shape: settings.sameAgeShape, scaleHours: scaleHours * settings.sameAgeRatio });
    }
    return { model: `model ${String(index + 1)}`, units, lives };
  });

  const links = linked.map(([causal, resultant]): Link => {
    const having = models.filter(({ lives }) => lives.has(causal) && lives.has(resultant));
    const count = Math.max(1, Math.round(having.length * settings.linkModels));
    return {
      causal,
      resultant,
      holds: between(random, ...settings.linkHolds),
      foundFirst: between(random, ...settings.foundFirst),
      returnDays: between(random, ...settings.returnDays),
      models: new Set(
        shuffled(random, having)
          .slice(0, count)
          .map(({ model }) => model),
      ),
    };
  });
  return { models, links, changedApart, serviceItems };
};
