import { requireThat } from '../requirement';
import type { LifeObservation } from '../types';

/** Lives added up by age, in rising order of age: all that the likelihood and the risk sets need. */
export type LifeTable = {
  ages: Float64Array;
  /** Weight of the lives that failed at this age. */
  failed: Float64Array;
  /** Weight of the lives last known running at this age. */
  censored: Float64Array;
  /** Weight of the lives that came under observation at this age (age 0 is not listed). */
  entered: Float64Array;
  /** Total weights. */
  observations: number;
  failures: number;
};

/**
 * Adds equal ages together, so that everything after costs by distinct ages. Entries and exits need no
 * pairing: a life contributes log h(time) where it failed, −H(time) and +H(entry).
 *
 * @throws {RequirementError} where a time is not finite or not after its entry, an entry is negative or
 * a weight is negative
 */
export function tabulateLives(observations: readonly LifeObservation[], functionName: string): LifeTable {
  const rowOfAge = new Map<number, number>();
  const failed: number[] = [];
  const censored: number[] = [];
  const entered: number[] = [];
  const rowAt = (age: number): number => {
    const known = rowOfAge.get(age);
    if (known !== undefined) return known;
    const row = rowOfAge.size;
    rowOfAge.set(age, row);
    failed.push(0);
    censored.push(0);
    entered.push(0);
    return row;
  };
  const add = (column: number[], age: number, weight: number): void => {
    const row = rowAt(age);
    column[row] = (column[row] ?? 0) + weight;
  };
  for (const life of observations) {
    const { time, failed: hasFailed, entry = 0, weight = 1 } = life;
    requireThat(entry >= 0, functionName, 'every entry to be 0 or later');
    requireThat(
      time > entry && time < Infinity,
      functionName,
      'every time to be finite, above 0 and after its entry',
    );
    requireThat(weight >= 0 && weight < Infinity, functionName, 'every weight to be finite and not negative');
    if (weight === 0) continue;
    add(hasFailed ? failed : censored, time, weight);
    if (entry > 0) add(entered, entry, weight);
  }
  return sortTable(rowOfAge, failed, censored, entered);
}

function sortTable(
  rowOfAge: ReadonlyMap<number, number>,
  failed: number[],
  censored: number[],
  entered: number[],
): LifeTable {
  const ages = Float64Array.from(rowOfAge.keys()).sort();
  const rows = Uint32Array.from(ages, (age) => rowOfAge.get(age) ?? 0);
  const pick = (column: number[]): Float64Array => Float64Array.from(rows, (row) => column[row] ?? 0);
  const table = { ages, failed: pick(failed), censored: pick(censored), entered: pick(entered) };
  const failures = sum(table.failed);
  return { ...table, failures, observations: failures + sum(table.censored) };
}

function sum(column: Float64Array): number {
  let total = 0;
  for (const value of column) total += value;
  return total;
}

/** Who is at risk at each age (entry < age ≤ exit), for the ages at which someone failed. */
export type RiskRow = { time: number; atRisk: number; failures: number };

export function riskRows(table: LifeTable): RiskRow[] {
  const { ages, failed, censored, entered } = table;
  const rows: RiskRow[] = [];
  let exitsAhead = 0;
  let entriesAhead = 0;
  // Backwards, so that without late entries the last risk sets are sums and not differences.
  for (let i = ages.length - 1; i >= 0; i--) {
    const failures = failed[i] ?? 0;
    exitsAhead += failures + (censored[i] ?? 0);
    entriesAhead += entered[i] ?? 0;
    if (failures === 0) continue;
    const others = exitsAhead - entriesAhead - failures;
    // A rounding error of fractional weights must not stand for a life.
    const atRisk = others > 1e-12 * exitsAhead ? others + failures : failures;
    rows.push({ time: ages[i] ?? 0, atRisk, failures });
  }
  return rows.reverse();
}
