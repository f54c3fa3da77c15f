import { requireThat, requireWhole } from '../requirement';

/** A share with its limits; the estimate is null where there were no trials. */
export type ProportionEstimate = { estimate: number | null; lower: number; upper: number };

export function requireProportion(successes: number, trials: number, functionName: string): void {
  requireWhole(trials, functionName, 'trials');
  requireWhole(successes, functionName, 'successes');
  requireThat(successes <= trials, functionName, 'no more successes than trials');
}
