import { describe, expect, it } from 'vitest';

import { cumulativeIncidence, kaplanMeier } from '../../../analytics';
import { expectClose, referenceEntries } from './reference';

const entries = referenceEntries<{
  data: { time: number[]; cause: number[]; labels: string[] };
  result: {
    time: number[];
    n_risk: number[];
    event_free: number[];
    causes: { cause: string; n_event: number[]; cif: number[]; se_infinitesimal_jackknife: number[] }[];
  };
}>('competing-risks');

const livesOf = ({ time, cause, labels }: (typeof entries)[number]['data']) =>
  time.map((t, i) => ({ time: t, cause: cause[i] ? (labels[cause[i] ?? 0] ?? null) : null }));

describe('cumulativeIncidence against R survival 3.5-3 (infinitesimal jackknife)', () => {
  it.each(entries)('$id', ({ data, result }) => {
    for (const expected of result.causes) {
      const rows = cumulativeIncidence(livesOf(data), expected.cause);
      expect(rows.map(({ time }) => time)).toEqual(result.time);
      expect(rows.map(({ atRisk }) => atRisk)).toEqual(result.n_risk);
      expect(rows.map(({ events }) => events)).toEqual(expected.n_event);
      rows.forEach((row, i) => {
        expectClose(row.incidence, expected.cif[i], 0, 1e-10);
        expectClose(row.standardError, expected.se_infinitesimal_jackknife[i], 0, 1e-7);
        expectClose(row.eventFree, result.event_free[i], 0, 1e-10);
      });
    }
  });

  it('adds up over the causes to 1 − the share free of any', () => {
    const [entry] = entries;
    const lives = entry ? livesOf(entry.data) : [];
    const last = (cause: string) => cumulativeIncidence(lives, cause).at(-1);
    expectClose(
      (last('S')?.incidence ?? 0) + (last('W')?.incidence ?? 0),
      1 - (last('S')?.eventFree ?? 0),
      1e-12,
    );
  });

  it('with one cause and late entries is 1 − Kaplan–Meier with its error', () => {
    const lives = [
      { time: 5, cause: 'failed', entry: 0 },
      { time: 7, cause: 'failed', entry: 5, weight: 2 },
      { time: 8, cause: null, entry: 2 },
      { time: 9, cause: 'failed', entry: 1 },
      { time: 12, cause: null },
    ];
    const survival = kaplanMeier(lives.map((life) => ({ ...life, failed: life.cause !== null })));
    cumulativeIncidence(lives, 'failed').forEach((row, i) => {
      expectClose(1 - row.incidence, survival[i]?.survival, 1e-12);
      expectClose(row.standardError, survival[i]?.standardError, 1e-12);
    });
  });

  it('takes nothing, unknown causes and wrong use', () => {
    expect(cumulativeIncidence([], 'failed')).toEqual([]);
    expect(cumulativeIncidence([{ time: 3, cause: 'damage' }], 'failed')).toMatchObject([
      { incidence: 0, events: 0 },
    ]);
    expect(() => cumulativeIncidence([{ time: NaN, cause: null }], 'failed')).toThrow(
      /^cumulativeIncidence requires /,
    );
  });
});
