import fc from 'fast-check';
import { expect, test } from 'vitest';
import {
  dayNumber,
  dayText,
  monthAfter,
  monthBefore,
  monthBounds,
  monthOf,
} from '../../../analytics/records/day-number';

test('days count from 1970-01-01 and know leap years', () => {
  expect(dayNumber('1970-01-01')).toBe(0);
  expect(dayNumber('2024-03-01')).toBe(19783);
  expect(dayNumber('2024-03-01') - dayNumber('2024-02-28')).toBe(2);
});

test('days and texts are inverse', () => {
  fc.assert(fc.property(fc.integer({ min: -20_000, max: 40_000 }), (day) => dayNumber(dayText(day)) === day));
});

test('months know their neighbors over the year and their last day', () => {
  expect(monthAfter('2025-12')).toBe('2026-01');
  expect(monthBefore('2026-01')).toBe('2025-12');
  expect(monthOf(dayNumber('2025-05-31'))).toBe('2025-05');
  const { firstDay, lastDay } = monthBounds('2024-02');
  expect([dayText(firstDay), dayText(lastDay)]).toEqual(['2024-02-01', '2024-02-29']);
});

test.each(['2025-02-30', '2025-13-01', '25-01-01', '2025-1-1', '', '2025-01-01T00:00'])(
  '%j is no day',
  (text) => {
    expect(() => dayNumber(text)).toThrow('dayNumber requires');
  },
);
