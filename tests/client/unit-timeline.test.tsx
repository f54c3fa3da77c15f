import { describe, expect, it } from 'vitest';
import type { UnitEvent } from '../../shared/machines';
import { placeLabels } from '../../src/components/charts/timeline-layout';
import { byDays, byHours } from '../../src/features/units/timeline-points';

function eventOf(on: string, cumulativeHours: number | null, more: Partial<UnitEvent> = {}): UnitEvent {
  return {
    kind: 'repair',
    on,
    repair: { id: on, number: on, ticketType: 'repair' },
    meterHours: cumulativeHours,
    cumulativeHours,
    meterFault: null,
    complaint: null,
    correction: null,
    replaced: [],
    workDone: [],
    totalCents: 0,
    isComebackOf: null,
    ...more,
  };
}

describe('a machine along its hours', () => {
  it('has no axis of hours with fewer than two usable readings', () => {
    expect(byHours([eventOf('2025-01-01', 10), eventOf('2025-02-01', null)])).toBeNull();
  });

  it('puts a visit without a reading between its neighbors, by its day', () => {
    const line = byHours([
      eventOf('2025-01-01', 100),
      eventOf('2025-01-11', null),
      eventOf('2025-01-21', 200),
    ]);
    expect(line?.points.map(({ at, isPlaced }) => [at, isPlaced])).toEqual([
      [100, true],
      [150, false],
      [200, true],
    ]);
  });

  it('goes on where the meter began anew, and says so', () => {
    const line = byHours([eventOf('2025-01-01', 400), eventOf('2025-02-01', 20), eventOf('2025-03-01', 50)]);
    expect(line?.points.map(({ at, isRestart }) => [at, isRestart])).toEqual([
      [400, false],
      [420, true],
      [450, false],
    ]);
    expect(line?.end).toBe(450);
  });
});

it('the calendar begins on the day it was put to work', () => {
  const line = byDays([eventOf('2025-01-11', null)], '2025-01-01');
  expect((line.points[0]?.at ?? 0) - line.start).toBe(10);
});

describe('labels over the marks', () => {
  it('rise a level rather than lie on each other', () => {
    const labels = placeLabels(
      [
        { x: 10, text: 'PTO clutch' },
        { x: 30, text: 'Main fuse' },
      ],
      640,
      2,
    );
    expect(labels.map((label) => label?.level)).toEqual([0, 1]);
  });

  it('are left out where no level has room', () => {
    const crowd = [0, 4, 8].map((x) => ({ x, text: 'PTO clutch' }));
    expect(placeLabels(crowd, 640, 2).map((label) => label === null)).toEqual([false, false, true]);
  });

  it('turn back at the right edge', () => {
    expect(placeLabels([{ x: 630, text: 'PTO clutch' }], 640, 1)[0]?.anchor).toBe('end');
  });
});
