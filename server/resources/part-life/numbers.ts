import { hazardRatio } from '../../../analytics/life/hazard-ratio';
import type { PartLife as DerivedLife } from '../../../analytics/records/part-life';
import { toObservations, type ObservationOptions } from '../../../analytics/records/life-observations';
import { dayText } from '../../../analytics/records/day-number';
import type { Named } from '../../../shared/basics';
import type { PartLife } from '../../../shared/parts';
import { weibullOf } from '../../lives/weibull-of-lives';
import type { NumberRow } from './queries';

type OfNumber = PartLife['numbers'][number];

/** Each part number by itself, the newest first: old and new ones are pooled by nobody but the reader. */
export function livesByNumber(
  lives: readonly DerivedLife[],
  numbers: readonly NumberRow[],
  options: ObservationOptions,
): OfNumber[] {
  return numbers
    .map((number): OfNumber => {
      const own = lives.filter(({ partId }) => partId === number.id);
      const { observations, coverage } = toObservations(own, options);
      return {
        part: { id: number.id, name: number.number },
        maker: number.maker,
        supersededBy: number.supersededBy,
        fitmentNote: number.fitmentNote,
        firstFittedOn: firstFitted(own),
        lives: coverage.used,
        failures: coverage.failures,
        weibull: weibullOf(observations).weibull,
      };
    })
    .sort((a, b) => (b.firstFittedOn ?? '').localeCompare(a.firstFittedOn ?? '', 'en'));
}

function firstFitted(lives: readonly DerivedLife[]): string | null {
  const days = lives.flatMap(({ origin, startDay }) =>
    origin === 'fitted' && startDay !== null ? [startDay] : [],
  );
  return days.length === 0 ? null : dayText(Math.min(...days));
}

/**
 * The newest number against the one before it: by the shop's catalog of what supersedes what, else by when each was
 * first fitted.
 */
export function newestAgainstOlder(
  lives: readonly DerivedLife[],
  numbers: readonly OfNumber[],
  options: ObservationOptions,
): PartLife['comparison'] {
  const failed = numbers.filter(({ failures }) => failures > 0);
  const pairs = failed.flatMap((older) =>
    failed
      .filter(({ part }) => part.id === older.supersededBy?.id)
      .map((newer) => ({ newer: newer.part, older: older.part })),
  );
  const byDate = failed[0] && failed[1] ? [{ newer: failed[0].part, older: failed[1].part }] : [];
  const pair: { newer: Named; older: Named } | undefined = pairs[0] ?? byDate[0];
  if (!pair) return null;
  const ofPart = (id: string) => toObservations(lives, { ...options, partIds: [id] }).observations;
  const comparison = hazardRatio(ofPart(pair.older.id), ofPart(pair.newer.id));
  if (comparison.kind === 'notEstimable') return null;
  const { ratio, interval, pValue } = comparison;
  if (ratio === null) return null;
  return { ...pair, ratio, interval, pValue, method: 'Weibull lives with one common shape' };
}
