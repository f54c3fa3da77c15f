import { bLife, fitWeibull, type LifeObservation } from '../../analytics';
import type { WeibullFit } from '../../shared/parts';

/** Below so many failures the likelihood is too lopsided for Wald limits. */
const PROFILE_BELOW = 20;
const PERCENTS = [10, 50];

export type Pattern = 'young' | 'wears_out' | 'cannot_tell' | 'no_pattern' | 'too_few';

/** The Weibull life that best explains the observations, with the ages by which 10 and 50 % have failed. */
export function weibullOf(observations: readonly LifeObservation[]): {
  weibull: WeibullFit;
  pattern: Pattern;
} {
  const failures = observations.filter(({ failed }) => failed).length;
  const fit = fitWeibull(observations, { limits: failures < PROFILE_BELOW ? 'profile' : 'wald' });
  if (fit.kind === 'notEstimable') return { weibull: fit, pattern: 'too_few' };
  const { shape, scale, shapeInterval, scaleInterval, limits, warnings } = fit;
  return {
    weibull: {
      kind: 'estimate',
      shape,
      scale,
      shapeInterval,
      scaleInterval,
      limits,
      bLives: PERCENTS.map((percent) => ({ percent, ...bLife(fit, percent) })),
      warnings,
    },
    pattern: fit.distinctFailureAges < 2 ? 'too_few' : patternOf(shapeInterval.lower, shapeInterval.upper),
  };
}

/** What the limits of the shape allow to be said. */
export function patternOf(lower: number | null, upper: number | null): Pattern {
  if (upper !== null && upper < 1) return 'young';
  if (lower !== null && lower > 1) return 'wears_out';
  if (lower !== null && upper !== null && lower >= 0.8 && upper <= 1.25) return 'no_pattern';
  return 'cannot_tell';
}
