import { readFileSync } from 'node:fs';

import { expect } from 'vitest';

import type { LifeObservation } from '../../../analytics';

/** Entries of a file in `tests/reference`, by method. */
export function referenceEntries<Entry>(file: string, ...methods: string[]): (Entry & { id: string })[] {
  const path = new URL(`../../reference/${file}.json`, import.meta.url);
  const { entries } = JSON.parse(readFileSync(path, 'utf8')) as {
    entries: (Entry & { id: string; method: string })[];
  };
  const chosen = methods.length === 0 ? entries : entries.filter(({ method }) => methods.includes(method));
  expect(chosen.length).toBeGreaterThan(0);
  return chosen;
}

export type LifeColumns = { time: number[]; status: number[]; count?: number[]; entry?: number[] };

export function livesOf({ time, status, count, entry }: LifeColumns): LifeObservation[] {
  return time.map((t, i) => ({
    time: t,
    failed: status[i] === 1,
    weight: count?.[i] ?? 1,
    entry: entry?.[i] ?? 0,
  }));
}

/** Agreement within a relative tolerance (with an absolute floor); null agrees with null alone. */
export function expectClose(
  actual: number | null | undefined,
  expected: number | null | undefined,
  relative: number,
  absolute = 0,
): void {
  if (typeof expected !== 'number') {
    expect(actual).toBeNull();
    return;
  }
  expect(actual).toBeTypeOf('number');
  const difference = Math.abs((actual ?? NaN) - expected);
  const allowed = relative * Math.abs(expected) + absolute;
  expect(difference, `${actual} against ${expected}`).toBeLessThanOrEqual(allowed);
}

/** The estimate of a result that must be one. */
export function estimateOf<Result extends { kind: string }>(
  result: Result,
): Extract<Result, { kind: 'estimate' }> {
  expect(result).toMatchObject({ kind: 'estimate' });
  return result as Extract<Result, { kind: 'estimate' }>;
}

/** A small reproducible generator of numbers between 0 and 1 (Park & Miller 1988, 48271). */
export function seededRandom(seed: number): () => number {
  let state = seed;
  return () => {
    state = (48271 * state) % 2147483647;
    return state / 2147483647;
  };
}
