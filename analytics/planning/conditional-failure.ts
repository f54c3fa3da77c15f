import { requireThat } from '../requirement';

/** A Weibull life as the forecast needs it; `covariance` is of (log scale, log shape). */
export type FittedLife = {
  shape: number;
  scale: number;
  covariance?: readonly [readonly [number, number], readonly [number, number]];
};

export type Forecast = {
  fit: FittedLife;
  /** Ages of the parts now running, in the unit of the scale. */
  ages: readonly number[];
  /** How much further each will run, one for all or one per age. */
  horizon: number | readonly number[];
};

/** Chance of each part to fail within its horizon, with its slopes in (log scale, log shape). */
export type ConditionalFailure = { probability: number; byLogScale: number; byLogShape: number };

/**
 * 1 − exp(H(age) − H(age + horizon)); the difference is formed as H(age)·(e^(β·log(1 + horizon/age)) − 1), which
 * keeps its digits where the horizon is short beside the age.
 */
export function conditionalFailures({
  fit: { shape, scale },
  ages,
  horizon,
}: Forecast): ConditionalFailure[] {
  return ages.map((age, i) => {
    const further = typeof horizon === 'number' ? horizon : (horizon[i] ?? 0);
    const hazard = (age / scale) ** shape;
    const end = ((age + further) / scale) ** shape;
    const added = age === 0 ? end : hazard * Math.expm1(shape * Math.log1p(further / age));
    const probability = -Math.expm1(-added);
    if (further === 0 || !(added < 700)) {
      return { probability: further === 0 ? 0 : 1, byLogScale: 0, byLogShape: 0 };
    }
    const weighted = (power: number, at: number): number => (at === 0 ? 0 : power * Math.log(at / scale));
    const alive = Math.exp(-added);
    return {
      probability,
      byLogScale: -alive * shape * added,
      byLogShape: alive * shape * (weighted(end, age + further) - weighted(hazard, age)),
    };
  });
}

export function requireForecast({ fit, ages, horizon }: Forecast, functionName: string): void {
  for (const value of [fit.shape, fit.scale]) {
    requireThat(value > 0 && value < Infinity, functionName, 'a shape and scale that are finite and above 0');
  }
  const horizons = typeof horizon === 'number' ? [horizon] : horizon;
  requireThat(
    typeof horizon === 'number' || horizon.length === ages.length,
    functionName,
    'one horizon for all or one per age',
  );
  for (const value of [...ages, ...horizons]) {
    requireThat(
      value >= 0 && value < Infinity,
      functionName,
      'ages and horizons that are finite and not negative',
    );
  }
}
