import type { PartLife } from '../../../shared/parts';

/** A failure age on the paper where the fitted line is straight. */
export type FitPoint = {
  time: number;
  atRisk: number;
  failures: number;
  /** Share failed at the middle of the step. */
  failedShare: number;
  x: number;
  y: number;
  lowerY: number | null;
  upperY: number | null;
  fittedShare: number;
  isMissed: boolean;
};

export type LineFit = { points: FitPoint[]; missed: number; judged: number; yAt: (time: number) => number };

/** Log of the cumulative hazard: shares of a Weibull life lie on a line over log age. */
export const paperY = (failedShare: number): number => Math.log(-Math.log(1 - failedShare));

/** Does the line fit: each failure age against it, a miss where the line lies outside of the step's 95 % limits. */
export function lineFit({ kaplanMeier, weibull }: Pick<PartLife, 'kaplanMeier' | 'weibull'>): LineFit | null {
  if (weibull.kind === 'notEstimable') return null;
  const { shape, scale } = weibull;
  const points = kaplanMeier.flatMap((row, index): FitPoint[] => {
    const before = kaplanMeier[index - 1]?.survival ?? 1;
    const failedShare = 1 - (before + row.survival) / 2;
    if (row.failures === 0 || failedShare <= 0 || failedShare >= 1 || row.time <= 0) return [];
    const fittedSurvival = Math.exp(-((row.time / scale) ** shape));
    const { lower, upper } = row;
    return [
      {
        time: row.time,
        atRisk: row.atRisk,
        failures: row.failures,
        failedShare,
        x: Math.log(row.time),
        y: paperY(failedShare),
        lowerY: limitY(upper),
        upperY: limitY(lower),
        fittedShare: 1 - fittedSurvival,
        isMissed: lower !== null && upper !== null && (fittedSurvival < lower || fittedSurvival > upper),
      },
    ];
  });
  return {
    points,
    missed: points.filter(({ isMissed }) => isMissed).length,
    judged: points.filter(({ lowerY, upperY }) => lowerY !== null && upperY !== null).length,
    yAt: (time) => shape * (Math.log(time) - Math.log(scale)),
  };
}

function limitY(survival: number | null): number | null {
  return survival === null || survival <= 0 || survival >= 1 ? null : paperY(1 - survival);
}
