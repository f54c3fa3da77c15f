import type { z } from 'zod';
import {
  chooseClock,
  toObservations,
  type ObservationOptions,
} from '../../../analytics/records/life-observations';
import type { PartLife as DerivedLife } from '../../../analytics/records/part-life';
import type { PartLife, partLifeQuery } from '../../../shared/parts';
import type { Transaction } from '../../db/client';
import { foldText } from '../../db/fold';
import { lastAnalysis } from '../../db/last-analysis';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { invalid, missing } from '../../http/errors';
import { loadLives } from '../../lives/load-lives';
import { weibullOf } from '../../lives/weibull-of-lives';
import { curveOf, numbersAtRisk } from './curve';
import { livesByNumber, newestAgainstOlder } from './numbers';
import { findComponent, findNumbers, findTakenAlong, type NumberRow } from './queries';
import { scopeOf } from './scope';

type LifeQuery = z.output<typeof partLifeQuery>;

/** @throws missing where the component, model or family is not there; invalid for a number that was never fitted. */
export function readPartLife(deps: Deps, actor: Actor, query: LifeQuery): Promise<PartLife> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    const component = await findComponent(tx, query.component);
    if (!component) throw missing('component');
    const { modelIds, model, family } = await scopeOf(tx, query);
    const all = await loadLives(tx, { componentId: component.id, modelIds });
    const known = await findNumbers(tx, [...new Set(all.flatMap(({ partId }) => partId ?? []))]);
    const asked = askedNumbers(query.partNumbers, known);
    const lives = asked ? all.filter(({ partId }) => partId !== null && asked.has(partId)) : all;
    return {
      component: { id: component.id, name: component.name },
      system: component.system,
      scope: { model, family },
      ...figuresOf(lives, all, known, query),
      takesWithIt: await findTakenAlong(tx, component.id, modelIds),
      asOf: (await asOfDay(tx)) ?? null,
    };
  });
}

const asOfDay = async (tx: Transaction) => (await lastAnalysis(tx))?.asOf;

/** Ids of the part numbers that the reader wants pooled; undefined for all lives, with or without a number. */
function askedNumbers(partNumbers: string | undefined, known: readonly NumberRow[]) {
  if (partNumbers === undefined) return undefined;
  const asked = partNumbers.split(',').flatMap((number) => foldText(number) || []);
  const errors = asked
    .filter((key) => !known.some(({ numberKey }) => numberKey === key))
    .map((key) => ({ path: '/partNumbers', message: `No ${key} was fitted here.` }));
  if (errors.length > 0) throw invalid('The query cannot be used as sent.', errors);
  return new Set(known.filter(({ numberKey }) => asked.includes(numberKey)).map(({ id }) => id));
}

function figuresOf(
  lives: readonly DerivedLife[],
  all: readonly DerivedLife[],
  known: readonly NumberRow[],
  query: LifeQuery,
) {
  const proposed = chooseClock(all);
  const options: ObservationOptions = {
    clock: query.clock ?? proposed,
    reasonBounds: query.reasons,
    assumedOriginal: query.assumedOriginal === 'true',
  };
  const { observations, coverage } = toObservations(lives, options);
  const { leftOut } = coverage;
  const seen = lives.filter(({ origin }) => options.assumedOriginal || origin !== 'assumed_original');
  const { weibull, pattern } = weibullOf(observations);
  const numbers = livesByNumber(all, known, options);
  const clockReason = proposed === 'hours' ? ('hours_known' as const) : ('few_hours' as const);
  return {
    clock: options.clock,
    clockReason: query.clock ? ('asked' as const) : clockReason,
    lives: coverage.used,
    failures: coverage.failures,
    unknown: seen.filter(({ outcome }) => outcome === 'unknown').length,
    damaged: coverage.competingDamage,
    withHours: seen.filter(({ hours }) => hours !== null).length,
    betweenReadings: coverage.between,
    setAside: leftOut.noClock + leftOut.noTime,
    assumedOriginal: lives.filter(({ origin }) => origin === 'assumed_original').length,
    // Where most were seen only because they broke, the sample is of broken machines.
    amongThoseThatCameIn: coverage.inRegister * 2 < coverage.used,
    pattern,
    kaplanMeier: curveOf(observations),
    weibull,
    atRiskAt: numbersAtRisk(observations, options.clock),
    numbers,
    comparison: newestAgainstOlder(all, numbers, options),
  };
}
