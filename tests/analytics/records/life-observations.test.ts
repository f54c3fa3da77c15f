import { describe, expect, test } from 'vitest';
import {
  chooseClock,
  toCauseObservations,
  toObservations,
} from '../../../analytics/records/life-observations';
import type { PartLife } from '../../../analytics/records/part-life';

function life(row: Partial<PartLife> = {}): PartLife {
  return {
    id: 'l',
    unitId: 'u',
    modelId: 'm',
    componentId: 'clutch',
    engine: 0,
    partId: null,
    partMaker: null,
    origin: 'fitted',
    startRepairId: 'a',
    startDay: 0,
    endRepairId: 'b',
    endDay: 30,
    outcome: 'failed',
    endReason: 'failed',
    hours: { entry: 0, exit: 12.5, isCut: false },
    hoursMissing: null,
    days: { entry: 0, exit: 30, isCut: false },
    daysMissing: null,
    isDeadOnArrival: false,
    isUnitInRegister: true,
    ...row,
  };
}

const LIVES = [
  life(),
  life({ outcome: 'damage', partId: 'p' }),
  life({ outcome: 'censored', isUnitInRegister: false }),
  life({ outcome: 'unknown' }),
  life({ origin: 'assumed_original', hours: { entry: 5, exit: 12.5, isCut: false } }),
  life({ hours: null, hoursMissing: 'no_reading_at_end' }),
  life({ outcome: 'censored', hours: { entry: 0, exit: 0, isCut: false } }),
  life({ hours: { entry: 0, exit: 8, isCut: true } }),
];

describe('lives as observations', () => {
  test('failures, censored lives and what was left out, each counted once', () => {
    const { observations, coverage } = toObservations(LIVES, { clock: 'hours' });
    expect(observations).toEqual([
      { time: 12.5, failed: true },
      { time: 12.5, failed: false },
      { time: 12.5, failed: false },
      { time: 8, failed: false },
    ]);
    expect(coverage).toEqual({
      lives: 8,
      used: 4,
      failures: 1,
      leftOut: { assumedOriginal: 1, unknownReason: 1, noClock: 1, noTime: 1 },
      deadOnArrival: 0,
      cutAtMeterRestart: 1,
      between: 0,
      competingDamage: 1,
      inRegister: 3,
    });
  });

  test('unknown reasons give bounds', () => {
    const failuresOf = (reasonBounds: 'allFailed' | 'noneFailed') =>
      toObservations(LIVES, { clock: 'hours', reasonBounds }).coverage;
    expect(failuresOf('allFailed')).toMatchObject({ used: 5, failures: 2 });
    expect(failuresOf('noneFailed')).toMatchObject({ used: 5, failures: 1 });
  });

  test('assumed original lives enter late, where they are asked for', () => {
    const { observations } = toObservations(LIVES.slice(4, 5), { clock: 'hours', assumedOriginal: true });
    expect(observations).toEqual([{ time: 12.5, failed: true, entry: 5 }]);
  });

  test('the calendar clock knows no meter restart', () => {
    const { observations } = toObservations(LIVES.slice(7), { clock: 'days' });
    expect(observations).toEqual([{ time: 30, failed: true }]);
  });

  test('part numbers are not pooled by themselves', () => {
    expect(toObservations(LIVES, { clock: 'days', partIds: ['p'] }).coverage.lives).toBe(1);
    expect(toObservations(LIVES, { clock: 'days', partIds: ['p', null] }).coverage.lives).toBe(8);
  });

  test('damage is a cause of its own for the incidence', () => {
    const { rows } = toCauseObservations(LIVES.slice(0, 3), { clock: 'days' });
    expect(rows.map(({ cause }) => cause)).toEqual(['failed', 'damage', null]);
  });

  test('nothing gives nothing; a clock that is none throws', () => {
    expect(toObservations([], { clock: 'days' }).observations).toEqual([]);
    // @ts-expect-error wrong use from plain JavaScript
    expect(() => toObservations([], { clock: 'weeks' })).toThrow('toObservations requires');
  });
});

test('hours are the clock where four lives in five have them', () => {
  const with4of5 = [life(), life(), life(), life(), life({ hours: null })];
  expect(chooseClock(with4of5)).toBe('hours');
  expect(chooseClock([...with4of5, life({ hours: null })])).toBe('days');
  expect(chooseClock([...with4of5, life({ hours: null, origin: 'assumed_original' })])).toBe('hours');
  expect(chooseClock([])).toBe('days');
});
