import fc from 'fast-check';
import { expect, test } from 'vitest';
import { dayNumber } from '../../../analytics/records/day-number';
import { windowClock } from '../../../analytics/records/window-clock';

test('calendar days where nothing is paused', () => {
  expect(windowClock()(100, 190)).toBe(90);
  expect(windowClock()(100, 90)).toBe(-10);
});

test('the days of paused months do not run', () => {
  const winter = windowClock([11, 12, 1, 2, 3]);
  expect(winter(dayNumber('2024-10-21'), dayNumber('2025-04-11'))).toBe(21);
  expect(winter(dayNumber('2024-12-01'), dayNumber('2025-02-01'))).toBe(0);
  expect(winter(dayNumber('2025-04-11'), dayNumber('2024-10-21'))).toBe(-21);
});

test('it adds up, in whatever order it is asked', () => {
  const day = fc.integer({ min: 19_000, max: 20_500 });
  fc.assert(
    fc.property(day, day, day, (a, b, c) => {
      const clock = windowClock([1, 2, 12]);
      return clock(a, b) + clock(b, c) === clock(a, c) && clock(a, b) === -clock(b, a);
    }),
    { seed: 2 },
  );
});

test('a year without a running month throws', () => {
  expect(() => windowClock([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12])).toThrow('windowClock requires');
  expect(() => windowClock([13])).toThrow('windowClock requires');
});
