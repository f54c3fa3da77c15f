import type { HazardBetween, UnitAges } from './hazards';
import type { ModelHistory, Occasion, UnitHistory } from './histories';

/** A visit of one unit that replaced A (the first of a pair), B, or both. */
export type PairStep = { at: number; hasA: boolean; hasB: boolean };

/** Steps of one unit joined while the gap is within the window. */
export type PairEpisode = { steps: PairStep[]; hasA: boolean; hasB: boolean };

export type PairUnits = { a: number; b: number; units: number[] };

/** Days on which each component failed, unit by unit: what every pair of the model is made from. */
export const failureIndex = (model: ModelHistory): Map<number, { unit: number; at: number }[]> => {
  const index = new Map<number, { unit: number; at: number }[]>();
  model.units.forEach(({ occasions }, unit) => {
    occasions.forEach(({ failed }, at) => {
      for (const component of failed) {
        const list = index.get(component);
        if (list) list.push({ unit, at });
        else index.set(component, [{ unit, at }]);
      }
    });
  });
  return index;
};

/** Pairs that failed within the window of each other at least once, and the units where they did. */
export const linkedPairs = (model: ModelHistory, windowDays: number, components: number): PairUnits[] => {
  const pairs = new Map<number, PairUnits>();
  const note = (first: number, second: number, unit: number) => {
    if (first === second) return;
    const a = Math.min(first, second);
    const b = Math.max(first, second);
    const key = a * components + b;
    const pair = pairs.get(key);
    if (!pair) pairs.set(key, { a, b, units: [unit] });
    else if (pair.units.at(-1) !== unit) pair.units.push(unit);
  };
  model.units.forEach(({ occasions }, unit) => {
    const near: Occasion[] = [];
    for (const occasion of occasions) {
      if (occasion.failed.length === 0) continue;
      while (near[0] && near[0].day < occasion.day - windowDays) near.shift();
      near.push(occasion);
      for (const earlier of near)
        for (const first of earlier.failed) for (const second of occasion.failed) note(first, second, unit);
    }
  });
  return [...pairs.values()].sort((x, y) => x.a - y.a || x.b - y.b);
};

export const pairSteps = ({ occasions }: UnitHistory, a: number, b: number): PairStep[] => {
  const steps: PairStep[] = [];
  occasions.forEach(({ failed }, at) => {
    if (failed.length === 0) return;
    const hasA = failed.includes(a);
    const hasB = failed.includes(b);
    if (hasA || hasB) steps.push({ at, hasA, hasB });
  });
  return steps;
};

export const pairEpisodes = (
  unit: UnitHistory,
  steps: readonly PairStep[],
  windowDays: number,
): PairEpisode[] => {
  const episodes: PairEpisode[] = [];
  let lastDay = -Infinity;
  for (const step of steps) {
    const day = unit.occasions[step.at]?.day ?? 0;
    let episode = episodes.at(-1);
    if (!episode || day - lastDay > windowDays) {
      episode = { steps: [], hasA: false, hasB: false };
      episodes.push(episode);
    }
    episode.steps.push(step);
    episode.hasA ||= step.hasA;
    episode.hasB ||= step.hasB;
    lastDay = day;
  }
  return episodes;
};

const lastRenewalAge = ({ renewals }: UnitAges, component: number, day: number): number => {
  let age = 0;
  for (const renewal of renewals) {
    if (renewal.component > component || (renewal.component === component && renewal.day > day)) break;
    if (renewal.component === component) age = renewal.age;
  }
  return age;
};

/** Whether the other part already failed within the window: then this failure begins no episode. */
const failedBefore = ({ occasions }: UnitHistory, component: number, at: number, windowDays: number) => {
  const since = (occasions[at]?.day ?? 0) - windowDays;
  for (let before = at - 1; before >= 0; before -= 1) {
    const occasion = occasions[before];
    if (!occasion || occasion.day < since) return false;
    if (occasion.failed.includes(component)) return true;
  }
  return false;
};

/** Age up to which the second part could have been counted: window, next failure of either, end of observation. */
const ageAtStop = (
  unit: UnitHistory,
  ages: UnitAges,
  first: number,
  second: number,
  at: number,
  windowDays: number,
) => {
  const stopDay = (unit.occasions[at]?.day ?? 0) + windowDays;
  for (let after = at + 1; after < unit.occasions.length; after += 1) {
    const occasion = unit.occasions[after];
    if (!occasion || occasion.day > stopDay) break;
    if (occasion.failed.includes(first) || occasion.failed.includes(second))
      return ages.atOccasion[after] ?? 0;
  }
  return stopDay < unit.toDay ? (ages.afterWindow[at] ?? 0) : ages.ageAtEnd;
};

/**
 * Expected number of times that `second` fails by itself within the window after a failure of `first`, from its
 * own age-dependent hazard over exactly the days in which such a failure would have been counted: to the end of
 * the window, the next failure of either, or the end of observation (the compensator of the counting process).
 */
export const expectedAfter = (
  model: ModelHistory,
  ages: readonly UnitAges[],
  between: HazardBetween,
  index: Map<number, { unit: number; at: number }[]>,
  first: number,
  second: number,
  windowDays: number,
): number => {
  let expected = 0;
  for (const { unit: unitAt, at } of index.get(first) ?? []) {
    const unit = model.units[unitAt];
    const own = ages[unitAt];
    const occasion = unit?.occasions[at];
    if (!unit || !own || !occasion || occasion.failed.includes(second)) continue;
    if (failedBefore(unit, second, at, windowDays)) continue;
    const start = lastRenewalAge(own, second, occasion.day);
    const fromAge = (own.atOccasion[at] ?? 0) - start;
    expected += between(second, fromAge, ageAtStop(unit, own, first, second, at, windowDays) - start);
  }
  return expected;
};
