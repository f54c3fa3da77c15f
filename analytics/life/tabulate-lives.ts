import { requireThat } from '../requirement';
import type { LifeObservation } from '../types';
import { AgeIndex } from './age-index';

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
  const index = new AgeIndex();
  const failed: number[] = [];
  const censored: number[] = [];
  const entered: number[] = [];
  const add = (column: number[], age: number, weight: number): void => {
    const row = index.rowOf(age);
    if (row === failed.length) {
      failed.push(0);
      censored.push(0);
      entered.push(0);
    }
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
  return sortTable(index, failed, censored, entered);
}

function sortTable(index: AgeIndex, failed: number[], censored: number[], entered: number[]): LifeTable {
  const ages = index.ages().sort();
  const rows = new Uint32Array(ages.length);
  for (let i = 0; i < ages.length; i++) rows[i] = index.rowOf(ages[i] ?? 0);
  const pick = (column: number[]): Float64Array => {
    const picked = new Float64Array(rows.length);
    for (let i = 0; i < rows.length; i++) picked[i] = column[rows[i] ?? 0] ?? 0;
    return picked;
  };
  const table = { ages, failed: pick(failed), censored: pick(censored), entered: pick(entered) };
  const failures = sum(table.failed);
  return { ...table, failures, observations: failures + sum(table.censored) };
}

function sum(column: Float64Array): number {
  let total = 0;
  for (const value of column) total += value;
  return total;
}

/** Who was at risk and who failed at given ages in rising order: at risk when entry < age ≤ exit. */
export function riskAt(
  table: LifeTable,
  times: Float64Array,
): { atRisk: Float64Array; failures: Float64Array } {
  const { ages, failed, censored, entered } = table;
  const atRisk = new Float64Array(times.length);
  const failures = new Float64Array(times.length);
  let row = ages.length - 1;
  let exitsAhead = 0;
  let entriesAhead = 0;
  // Backwards, so that without late entries the last risk sets are sums and not differences.
  for (let i = times.length - 1; i >= 0; i--) {
    const time = times[i] ?? 0;
    for (; row >= 0 && (ages[row] ?? 0) >= time; row--) {
      exitsAhead += (failed[row] ?? 0) + (censored[row] ?? 0);
      entriesAhead += entered[row] ?? 0;
      if (ages[row] === time) failures[i] = failed[row] ?? 0;
    }
    const failing = failures[i] ?? 0;
    const others = exitsAhead - entriesAhead - failing;
    // A rounding error of fractional weights must not stand for a life.
    atRisk[i] = others > 1e-12 * exitsAhead ? others + failing : failing;
  }
  return { atRisk, failures };
}

export type RiskRow = { time: number; atRisk: number; failures: number };

/** The same at the ages at which someone failed. */
export function riskRows(table: LifeTable): RiskRow[] {
  const times = table.ages.filter((_, i) => (table.failed[i] ?? 0) > 0);
  const { atRisk, failures } = riskAt(table, times);
  return Array.from(times, (time, i) => ({ time, atRisk: atRisk[i] ?? 0, failures: failures[i] ?? 0 }));
}
