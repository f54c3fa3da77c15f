import { requireThat } from '../requirement';

export type Check = { component: string; probability: number; minutes: number };

/**
 * In which order to check the possible causes so that the cause is found in the fewest minutes on
 * average.
 *
 * Assumes one cause, and that each check tests one cause perfectly. Rising minutes per probability is
 * best; equal ones keep the order given. Checks run until the cause is found, the last one included;
 * what 1 − Σ probability leaves pays for all. Probabilities are shares, minutes are minutes.
 *
 * Source: Mitten (1960), Journal of the Operations Research Society of Japan 3.
 *
 * @throws {RequirementError} where a probability is not from 0 to 1, they add up to more than 1, or
 * minutes are not finite and above 0
 * @example checkOrder([{ component: 'belt', probability: 0.6, minutes: 10 }, { component: 'switch', probability: 0.3, minutes: 2 }])
 * // { order: ['switch', 'belt'], expectedMinutes: 9 }
 */
export function checkOrder(checks: readonly Check[]): { order: string[]; expectedMinutes: number } {
  for (const { probability, minutes } of checks) {
    requireThat(probability >= 0 && probability <= 1, 'checkOrder', 'every probability to be from 0 to 1');
    requireThat(minutes > 0 && minutes < Infinity, 'checkOrder', 'all minutes to be finite and above 0');
  }
  const sum = checks.reduce((total, { probability }) => total + probability, 0);
  requireThat(sum <= 1 + 1e-9, 'checkOrder', 'probabilities that add up to no more than 1');
  const ordered = [...checks].sort((a, b) => b.probability / b.minutes - a.probability / a.minutes);
  let spent = 0;
  let expectedMinutes = 0;
  for (const { probability, minutes } of ordered) {
    spent += minutes;
    expectedMinutes += probability * spent;
  }
  expectedMinutes += Math.max(0, 1 - sum) * spent;
  return { order: ordered.map(({ component }) => component), expectedMinutes };
}
