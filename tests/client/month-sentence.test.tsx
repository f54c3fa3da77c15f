import { render } from '@testing-library/react';
import { MemoryRouter } from 'react-router';
import { describe, expect, it } from 'vitest';
import type { MonthReview } from '../../shared/reports';
import { MonthSentence } from '../../src/features/month/month-sentence';
import { formatsFor } from '../../src/lib/format';
import { monthReview, rateRow } from './month-review';

const formats = formatsFor({ locale: 'en-US', currency: 'USD', timeZone: 'America/Chicago' });

function sentence(review: MonthReview, mayImport = true): string {
  const { container } = render(
    <MemoryRouter>
      <MonthSentence review={review} formats={formats} mayImport={mayImport} />
    </MemoryRouter>,
  );
  return (container.textContent ?? '').replaceAll('\u202f', ' ');
}

/** A review that is about one month alone. */
const about = (row: MonthReview['rows'][number], given: Partial<MonthReview> = {}) =>
  monthReview({ month: row.month, rows: [row], signalSystem: null, isSignal: false, ...given });

describe('the month in one sentence', () => {
  it('names what is over its limit, and where to look', () => {
    const row = rateRow('2026-04', 31, 212, {
      interval: { lower: 0.105, upper: 0.2 },
      limits: { lower: 0, upper: 0.137 },
    });
    expect(sentence(about(row, { isSignal: true, signalSystem: { system: 'PTO drive', count: 11 } }))).toBe(
      '14.6 % of the 212 repairs done in April came back (10.5–20.0 %). ' +
        'A month of this size stays under 13.7 % by chance: look at PTO drive, 11 of the 31.',
    );
  });

  it('says so where no one system stands out', () => {
    const row = rateRow('2026-04', 31, 212, { limits: { lower: 0, upper: 0.137 } });
    expect(sentence(about(row))).toContain('no one system stands out');
  });

  it('leaves a month within chance at that', () => {
    const row = rateRow('2026-04', 20, 212, {
      interval: { lower: 0.062, upper: 0.141 },
      limits: { lower: 0.02, upper: 0.137 },
    });
    expect(sentence(about(row))).toBe(
      '9.4 % of the 212 repairs done in April came back (6.2–14.1 %); a month of this size stays under 13.7 % by chance.',
    );
  });

  it('says when fewer came back than chance explains', () => {
    const row = rateRow('2026-04', 2, 212, { limits: { lower: 0.02, upper: 0.137 } });
    expect(sentence(about(row))).toContain(
      'stays above 2.0 % by chance: fewer came back than chance explains',
    );
  });

  it('gives no verdict before there are limits', () => {
    const row = rateRow('2026-04', 20, 212, { limits: null });
    expect(sentence(about(row))).toContain('too few earlier months to say whether that is unusual');
  });

  it('gives counts instead of a rate for a handful of repairs', () => {
    const row = rateRow('2026-01', 2, 7, { interval: { lower: 0.04, upper: 0.71 } });
    const text = sentence(about(row));
    expect(text).toContain('2 of the 7 repairs done in January came back: too few repairs for a rate');
    expect(text).not.toContain('28.6 %');
  });

  it.each([
    [0.083, 'About 8.3 % are expected in the end.'],
    [null, 'too early to judge'],
  ])('never calls a month whose days are not over an improvement (projected %s)', (projected, words) => {
    const row = rateRow('2026-06', 1, 188, {
      maturing: true,
      projected,
      limits: { lower: 0.02, upper: 0.14 },
    });
    const text = sentence(about(row));
    expect(text).toContain('1 of the 188 repairs done in June have come back so far');
    expect(text).toContain(words);
    expect(text).toContain('too early to judge');
    expect(text).not.toMatch(/improve|better|fewer|down|0\.5 %/i);
  });

  it('names the year of a month long past', () => {
    expect(sentence(about(rateRow('2025-04', 20, 212)))).toContain('done in April 2025 came back');
  });

  it('speaks of a month without repairs that could come back', () => {
    expect(sentence(about(rateRow('2026-01', 0, 0)))).toContain(
      'No repair done in January could have come back',
    );
  });

  it('sends an empty shop to the imports, whoever may bring files in', () => {
    const empty = monthReview({ repairsInAll: 0, month: null, rows: [], analysis: 'none' });
    expect(sentence(empty)).toContain('Bring in a file');
    expect(sentence(empty, false)).not.toContain('Bring in a file');
  });

  it.each([
    ['running', 'being read together now'],
    ['failed', 'reading them together failed'],
  ] as const)('says that the records are %s', (analysis, words) => {
    const text = sentence(monthReview({ repairsInAll: 120, month: null, rows: [], analysis }));
    expect(text).toContain('120 repairs');
    expect(text).toContain(words);
  });

  it('says that nobody can tell what came back where no machine is named', () => {
    const review = monthReview({ repairsInAll: 120, unidentified: 120, month: null, rows: [] });
    expect(sentence(review)).toContain('None of the 120 repairs says which machine it was');
  });

  it('asks for another month where nothing was done in the one in question', () => {
    expect(sentence(monthReview({ month: null }))).toBe(
      'No repair that could have come back was done in that month. Choose another one.',
    );
  });

  it('says from when the first month can be judged', () => {
    const rows = [
      rateRow('2026-06', 3, 40, { maturing: true }),
      rateRow('2026-07', 1, 20, { maturing: true }),
    ];
    expect(sentence(monthReview({ month: null, rows }))).toBe(
      'No month can be judged yet: a repair counts once its 90 days are over. So far 4 of 60 have come back. ' +
        'The first month, June 2026, can be judged after Sep 28, 2026.',
    );
  });
});
