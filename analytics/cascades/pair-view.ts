import { median } from 'simple-statistics';
import type { ExaminedModel } from './examine';
import type { UnitHistory } from './histories';
import { pairEpisodes, pairSteps } from './links';
import type { CascadeCase, CascadeCounts } from './types';

export type DirectedStep = { at: number; hasCausal: boolean; hasResultant: boolean };
export type DirectedEpisode = { unit: UnitHistory; steps: DirectedStep[] };

/** Every episode of the given units that has the causal or the resultant part, unit by unit. */
export const episodesOf = (
  model: ExaminedModel,
  units: readonly number[],
  causal: number,
  resultant: number,
  windowDays: number,
): DirectedEpisode[] =>
  units.flatMap((unitAt) => {
    const unit = model.history.units[unitAt];
    if (!unit) return [];
    return pairEpisodes(unit, pairSteps(unit, causal, resultant), windowDays).map(({ steps }) => ({
      unit,
      steps: steps.map(({ at, hasA, hasB }) => ({ at, hasCausal: hasA, hasResultant: hasB })),
    }));
  });

/** Units of a model in which either part failed. */
export const unitsWithEither = ({ failures }: ExaminedModel, a: number, b: number): number[] =>
  [...new Set([...(failures.get(a) ?? []), ...(failures.get(b) ?? [])].map(({ unit }) => unit))].sort(
    (x, y) => x - y,
  );

const dayOf = ({ unit }: DirectedEpisode, step: DirectedStep | undefined) =>
  unit.occasions[step?.at ?? 0]?.day ?? 0;
export const hasBoth = ({ steps }: DirectedEpisode) =>
  steps.some(({ hasCausal }) => hasCausal) && steps.some(({ hasResultant }) => hasResultant);

/** Whether trouble came back within the window; an episode joins all that is within it, so the next step tells. */
const returned = (episode: DirectedEpisode, at: number, windowDays: number) => {
  const next = episode.steps[at + 1];
  return next !== undefined && dayOf(episode, next) - dayOf(episode, episode.steps[at]) <= windowDays;
};

export const countEpisodes = (episodes: readonly DirectedEpisode[], windowDays: number): CascadeCounts => {
  const counts: CascadeCounts = {
    causalTotal: 0,
    resultantTotal: 0,
    resultantNearCausal: 0,
    resultantAlone: 0,
    episodes: episodes.length,
    withBoth: 0,
    causalOnly: 0,
    resultantOnly: 0,
    causalFirst: 0,
    resultantFirst: 0,
    sameVisitFirst: 0,
    endedByCausal: 0,
    endedByResultant: 0,
    endedByBoth: 0,
    repeatedBeforeCure: 0,
    extraVisits: 0,
    soloReplacements: 0,
    soloReturns: 0,
    withCausalReplacements: 0,
    withCausalReturns: 0,
    unjudgedReplacements: 0,
  };
  for (const episode of episodes) {
    const { steps, unit } = episode;
    const both = hasBoth(episode);
    steps.forEach((step, at) => {
      if (step.hasCausal) counts.causalTotal += 1;
      if (!step.hasResultant) return;
      counts.resultantTotal += 1;
      if (both) counts.resultantNearCausal += 1;
      else counts.resultantAlone += 1;
      const isBack = returned(episode, at, windowDays) ? 1 : 0;
      if (dayOf(episode, step) + windowDays > unit.judgedToDay) counts.unjudgedReplacements += 1;
      else if (step.hasCausal) {
        counts.withCausalReplacements += 1;
        counts.withCausalReturns += isBack;
      } else {
        counts.soloReplacements += 1;
        counts.soloReturns += isBack;
      }
    });
    const first = steps[0];
    const last = steps.at(-1);
    if (!both) {
      if (first?.hasCausal) counts.causalOnly += 1;
      else counts.resultantOnly += 1;
      continue;
    }
    counts.withBoth += 1;
    counts.extraVisits += steps.length - 1;
    if (first?.hasCausal && first.hasResultant) counts.sameVisitFirst += 1;
    else if (first?.hasCausal) counts.causalFirst += 1;
    else {
      counts.resultantFirst += 1;
      if (steps.findIndex(({ hasCausal }) => hasCausal) > 1) counts.repeatedBeforeCure += 1;
    }
    if (last?.hasCausal && last.hasResultant) counts.endedByBoth += 1;
    else if (last?.hasCausal) counts.endedByCausal += 1;
    else counts.endedByResultant += 1;
  }
  return counts;
};

const medianOf = (values: number[]): number | null => (values.length > 0 ? median(values) : null);

/** From the first replacement of one part to the first of the other, where they are not at one visit. */
export const medianGaps = (episodes: readonly DirectedEpisode[]) => {
  const days: number[] = [];
  const hours: number[] = [];
  for (const episode of episodes) {
    const { steps, unit } = episode;
    const first = steps[0];
    const other = steps.find(
      ({ hasCausal, hasResultant }) => hasCausal !== first?.hasCausal || hasResultant !== first.hasResultant,
    );
    if (!first || !other || !hasBoth(episode) || (first.hasCausal && first.hasResultant)) continue;
    days.push(dayOf(episode, other) - dayOf(episode, first));
    const [from, to] = [unit.occasions[first.at]?.hours ?? null, unit.occasions[other.at]?.hours ?? null];
    if (from !== null && to !== null && to >= from) hours.push(to - from);
  }
  return { medianDays: medianOf(days), medianHoursBetween: medianOf(hours) };
};

/** The episodes with both as cases, in order of unit and day; `directed` says whether an order speaks for or against. */
export const toCases = (
  episodes: readonly DirectedEpisode[],
  names: readonly string[],
  directed: boolean,
): CascadeCase[] =>
  episodes.filter(hasBoth).map((episode): CascadeCase => {
    const { unit, steps } = episode;
    const first = steps[0];
    const isSame = first?.hasCausal === true && first.hasResultant;
    const cured = steps.findIndex(({ hasCausal, hasResultant }) => hasCausal && hasResultant);
    const isBack = cured >= 0 && cured < steps.length - 1;
    const course = isBack
      ? 'returnedAfterCure'
      : isSame
        ? 'sameVisit'
        : first?.hasCausal
          ? 'causalFirst'
          : 'resultantFirst';
    const stance =
      course === 'sameVisit' || !directed ? 'neutral' : course === 'resultantFirst' ? 'for' : 'against';
    return {
      unitId: unit.unitId,
      stance,
      course,
      visits: steps.map(({ at }) => {
        const occasion = unit.occasions[at];
        return {
          day: occasion?.day ?? 0,
          hours: occasion?.hours ?? null,
          visitIds: occasion?.visitIds ?? [],
          components: (occasion?.failed ?? []).map((component) => names[component] ?? ''),
        };
      }),
    };
  });
