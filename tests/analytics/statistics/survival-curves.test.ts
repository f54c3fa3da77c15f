import { describe, expect, it } from 'vitest';

import { kaplanMeier, nelsonAalen, RequirementError } from '../../../analytics';
import type { LifeColumns } from './reference';
import { expectClose, livesOf, referenceEntries, seededRandom } from './reference';

type Rows = { time: number[]; n_risk: number[]; n_event: number[] };

const survival = referenceEntries<{
  data: LifeColumns;
  result: Rows & {
    surv: number[];
    greenwood_se: (number | null)[];
    loglog_lower95: (number | null)[];
    loglog_upper95: (number | null)[];
  };
}>('kaplan-meier');

const hazard = referenceEntries<{ data: LifeColumns; result: Rows & { cumhaz: number[]; se: number[] } }>(
  'nelson-aalen',
);

describe('kaplanMeier against R survival 3.5-3', () => {
  it.each(survival)('$id', ({ data, result }) => {
    const rows = kaplanMeier(livesOf(data));
    expect(rows.map(({ time }) => time)).toEqual(result.time);
    expect(rows.map(({ atRisk }) => atRisk)).toEqual(result.n_risk);
    expect(rows.map(({ failures }) => failures)).toEqual(result.n_event);
    rows.forEach((row, i) => {
      expectClose(row.survival, result.surv[i], 0, 1e-10);
      expectClose(row.standardError, result.greenwood_se[i], 1e-9);
      expectClose(row.lower, result.loglog_lower95[i], 0, 1e-8);
      expectClose(row.upper, result.loglog_upper95[i], 0, 1e-8);
    });
  });
});

describe('nelsonAalen against R survival 3.5-3', () => {
  it.each(hazard)('$id', ({ data, result }) => {
    const rows = nelsonAalen(livesOf(data));
    expect(rows.map(({ time }) => time)).toEqual(result.time);
    expect(rows.map(({ atRisk }) => atRisk)).toEqual(result.n_risk);
    rows.forEach((row, i) => {
      expectClose(row.cumulativeHazard, result.cumhaz[i], 1e-10);
      expectClose(row.standardError, result.se[i], 1e-9);
    });
  });
});

describe('survival curves at the edges', () => {
  it('have no rows without failures', () => {
    expect(kaplanMeier([])).toEqual([]);
    expect(kaplanMeier([{ time: 5, failed: false }])).toEqual([]);
    expect(nelsonAalen([])).toEqual([]);
  });

  it('end at 0 with nulls where the last one at risk fails, even with fractional weights', () => {
    const tenths = Array.from({ length: 7 }, (_, i) => ({
      time: 10 + i,
      failed: true,
      weight: 0.1,
      entry: i + 0.5,
    }));
    const last = kaplanMeier(tenths).at(-1);
    expect(last).toMatchObject({ survival: 0, standardError: null, lower: null, upper: null });
  });

  it('take very short and very long ages', () => {
    const rows = kaplanMeier([1e-9, 1, 1e9, 2e9].map((time, i) => ({ time, failed: i < 3 })));
    expect(rows.map((row) => row.survival)).toEqual([0.75, 0.5, 0.25]);
  });

  it.each([NaN, 0, -3, Infinity])('throw on a time of %s', (time) => {
    expect(() => kaplanMeier([{ time, failed: true }])).toThrow(/^kaplanMeier requires /);
    expect(() => nelsonAalen([{ time, failed: true }])).toThrow(RequirementError);
  });

  it('throw on a confidence of 95', () => {
    expect(() => kaplanMeier([], { confidence: 95 })).toThrow(
      'kaplanMeier requires a confidence between 0 and 1',
    );
  });
});

it('log-log limits cover the true survival as promised', () => {
  const random = seededRandom(11);
  const runs = 2000;
  let missed = 0;
  for (let run = 0; run < runs; run++) {
    const lives = Array.from({ length: 60 }, () => {
      const [life, end] = [-Math.log(random()), 2 * random()];
      return { time: Math.min(life, end), failed: life <= end };
    });
    const row = kaplanMeier(lives).findLast(({ time }) => time <= 0.5);
    const truth = Math.exp(-0.5);
    if (row === undefined || (row.lower ?? 0) > truth || (row.upper ?? 1) < truth) missed++;
  }
  expect(missed / runs).toBeGreaterThan(0.02);
  expect(missed / runs).toBeLessThan(0.08 + 0.02);
});
