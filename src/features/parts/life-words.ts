import type { PartLife, WeibullFit } from '../../../shared/parts';

type BLife = Extract<WeibullFit, { kind: 'estimate' }>['bLives'][number];

/** Below so many failures an estimate is rough at best. */
export const FEW_FAILURES = 6;

export function bLifeOf(weibull: WeibullFit, percent: number): (BLife & { estimate: number }) | null {
  if (weibull.kind === 'notEstimable') return null;
  const found = weibull.bLives.find((life) => life.percent === percent);
  return found && found.estimate !== null ? { ...found, estimate: found.estimate } : null;
}

/** A line through one age of failure would say what nobody knows. */
export const isLineDrawn = ({ weibull, kaplanMeier }: Pick<PartLife, 'weibull' | 'kaplanMeier'>): boolean =>
  weibull.kind === 'estimate' && kaplanMeier.filter(({ failures }) => failures > 0).length >= 2;

/** The oldest age that was seen, failed or not, as far as the answer tells. */
export function oldestSeen({ kaplanMeier, atRiskAt }: Pick<PartLife, 'kaplanMeier' | 'atRiskAt'>): number {
  const running = atRiskAt.filter(({ atRisk }) => atRisk > 0).at(-1)?.time ?? 0;
  return Math.max(running, kaplanMeier.at(-1)?.time ?? 0);
}

/**
 * The greatest age that at least `share` of all reach, with 95 % confidence, where nothing has failed: of n seen
 * running that long none failed, so that (share reaching it)^n would have to be above 0.05.
 */
export function reachedWithoutFailure(
  atRiskAt: PartLife['atRiskAt'],
  share: number,
): PartLife['atRiskAt'][number] | null {
  const needed = Math.log(0.05) / Math.log(share);
  return atRiskAt.filter(({ time, atRisk }) => time > 0 && atRisk >= needed).at(-1) ?? null;
}

/** "less than half as often" from how many times as often the newer one fails at the same age. */
export function timesAsOften(ratio: number): string {
  if (ratio <= 0.25) return 'less than a quarter as often';
  if (ratio < 0.5) return 'less than half as often';
  if (ratio < 1) return 'less often';
  if (ratio <= 2) return 'more often';
  return 'more than twice as often';
}

/** On which machines a life was followed; nothing where on all. */
export function scopeWords({ scope }: Pick<PartLife, 'scope'>): string {
  if (scope.model) return `On the ${scope.model.name}`;
  if (scope.family) return `In the family ${scope.family.name}`;
  return '';
}
