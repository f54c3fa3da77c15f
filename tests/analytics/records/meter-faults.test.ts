import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { findMeterFaults } from '../../../analytics/records/meter-faults';
import type { MeterReading } from '../../../analytics/records/meter-faults';

const readings = (...pairs: [day: number, hours: number | null][]): MeterReading[] =>
  pairs.map(([day, hours], index) => ({ source: `r${String(index)}`, day, hours }));
const faults = (...pairs: [day: number, hours: number | null][]) =>
  findMeterFaults(readings(...pairs)).readings.map(({ fault }) => fault);
const trusted = (...pairs: [day: number, hours: number | null][]) =>
  findMeterFaults(readings(...pairs)).readings.map(({ trustedHours }) => trustedHours);

describe('one meter that runs on', () => {
  test('is trusted throughout, and a missing reading stays missing', () => {
    expect(trusted([0, 10], [100, 55.5], [200, null], [300, 140])).toEqual([10, 55.5, null, 140]);
    expect(faults([0, 10], [100, 55.5], [200, null], [300, 140])).toEqual([null, null, 'missing', null]);
  });

  test('a reading rounded to tens may stand a little above the next one', () => {
    expect(trusted([0, 460], [10, 457.5], [90, 480])).toEqual([460, 460, 480]);
  });

  test('stands still where nothing was run', () => {
    expect(faults([0, 120], [100, 120])).toEqual([null, null]);
  });
});

describe('typing errors', () => {
  test('a factor of ten too many', () => {
    expect(faults([0, 100], [200, 1500], [400, 180])).toEqual([null, 'typing', null]);
  });

  test('a dropped digit', () => {
    expect(faults([0, 450], [100, 46], [200, 470])).toEqual([null, 'typing', null]);
  });

  test('the very first reading', () => {
    expect(faults([0, 4500], [100, 460], [200, 480], [300, 500])).toEqual(['typing', null, null, null]);
    expect(faults([0, 900], [100, 110], [200, 130], [300, 150])).toEqual(['typing', null, null, null]);
  });

  test('the very last reading, where it is not possible', () => {
    expect(faults([0, 450], [30, 4600])).toEqual([null, 'typing']);
    expect(faults([0, 400], [100, 450], [300, 5400])).toEqual([null, null, 'typing']);
  });

  test('out of line with both neighbors', () => {
    expect(faults([0, 100], [100, 777], [200, 180])).toEqual([null, 'typing', null]);
  });
});

test('more than 24 hours a day is impossible', () => {
  expect(faults([0, 100], [10, 900])).toEqual([null, 'impossible_rate']);
});

test('more hours than days since in-service is impossible', () => {
  const { readings: judged } = findMeterFaults(readings([10, 700]), { inServiceDay: 0 });
  expect(judged[0]?.fault).toBe('impossible_rate');
});

test('a reading that went back is not used while nothing confirms a new meter', () => {
  expect(faults([0, 400], [300, 60])).toEqual([null, 'back']);
  expect(faults([0, 400], [100, 390], [200, 480])).toEqual([null, 'back', null]);
});

describe('a replaced meter', () => {
  test('drops to near zero and goes on: a new track, not comparable with the old one', () => {
    const history = findMeterFaults(readings([0, 350], [100, 410], [200, 12], [300, 60], [400, 110]));
    expect(history.readings.map(({ track }) => track)).toEqual([0, 0, 1, 1, 1]);
    expect(history.readings.map(({ trustedHours }) => trustedHours)).toEqual([350, 410, 12, 60, 110]);
    expect(history.restarts).toBe(1);
    expect(history.tracks).toEqual([
      { track: 0, fromDay: 0, firstHours: 350, lastHours: 410 },
      { track: 1, fromDay: 200, firstHours: 12, lastHours: 110 },
    ]);
  });

  test('whose old reading was written down goes on counting on the same track', () => {
    const rows = readings([0, 350], [100, 2], [200, 60]);
    const history = findMeterFaults(rows.map((row, at) => (at === 1 ? { ...row, oldMeterHours: 400 } : row)));
    expect(history.readings.map(({ trustedHours }) => trustedHours)).toEqual([350, 402, 460]);
    expect(history.tracks).toHaveLength(1);
  });

  test('twice', () => {
    const history = findMeterFaults(readings([0, 350], [90, 400], [200, 12], [300, 90], [400, 9], [500, 40]));
    expect(history.readings.map(({ track }) => track)).toEqual([0, 0, 1, 1, 2, 2]);
  });
});

describe('0, 1 and 9999 are missing unless the history bears them out', () => {
  test('in the middle of a history', () => {
    expect(faults([0, 300], [100, 0], [200, 340], [250, 1], [300, 9999])).toEqual([
      null,
      'placeholder',
      null,
      'placeholder',
      'placeholder',
    ]);
  });

  test('0 on a new machine is a reading', () => {
    const { readings: judged } = findMeterFaults(readings([5, 0], [200, 44]), { inServiceDay: 0 });
    expect(judged.map(({ trustedHours }) => trustedHours)).toEqual([0, 44]);
  });

  test('1 as the first reading of a machine that goes on at that rate', () => {
    expect(faults([0, 1], [100, 40], [200, 80])).toEqual([null, null, null]);
    expect(faults([0, 1], [100, 400], [200, 440])).toEqual(['placeholder', null, null]);
    expect(faults([0, 0])).toEqual(['placeholder']);
  });

  test('9999 after 9950', () => {
    expect(faults([0, 9950], [30, 9999])).toEqual([null, null]);
    expect(faults([0, 950], [900, 9999])).toEqual([null, 'placeholder']);
  });
});

describe('hostile input', () => {
  test('NaN, infinite and negative hours are missing', () => {
    expect(faults([0, NaN], [1, Infinity], [2, -5], [3, 1e9])).toEqual([
      'missing',
      'missing',
      'missing',
      null,
    ]);
    expect(findMeterFaults([])).toEqual({ readings: [], tracks: [], restarts: 0 });
  });

  test('a day that is none throws', () => {
    expect(() => findMeterFaults(readings([NaN, 5]))).toThrow('findMeterFaults requires');
  });

  test('trusted hours never go back on a track, whatever comes', () => {
    const row = fc.record({
      day: fc.integer({ min: 0, max: 900 }),
      hours: fc.constantFrom(0, 1, 5, 40, 46, 460, 500, 4600, 9999, 20, 100),
    });
    fc.assert(
      fc.property(fc.array(row, { maxLength: 14 }), (rows) => {
        const { readings: judged } = findMeterFaults(rows.map((r) => ({ ...r, source: 's' })));
        const last = new Map<number, number>();
        let track = 0;
        for (const reading of judged) {
          expect(reading.fault === null).toBe(reading.trustedHours !== null);
          expect(reading.track).toBeGreaterThanOrEqual(track);
          track = reading.track;
          if (reading.trustedHours === null) continue;
          expect(reading.trustedHours).toBeGreaterThanOrEqual(last.get(track) ?? 0);
          last.set(track, reading.trustedHours);
        }
      }),
      { seed: 7 },
    );
  });

  test('simulated meters: a wrong reading among good ones is found and the good ones are kept', () => {
    const uniform = seeded(11);
    let wrong = 0;
    let found = 0;
    let lost = 0;
    for (let unit = 0; unit < 300; unit++) {
      let day = 0;
      const rows: MeterReading[] = [];
      const perDay = 0.1 + uniform();
      for (let visit = 0; visit < 6; visit++) {
        day += 30 + Math.floor(200 * uniform());
        const hours = Math.round((50 + perDay * day + unit) * 10) / 10;
        rows.push({ source: String(visit), day, hours });
      }
      const at = Math.floor(6 * uniform());
      const row = rows[at];
      if (!row || row.hours === null) continue;
      row.hours = uniform() < 0.5 ? row.hours * 10 : Math.floor(row.hours / 10);
      wrong++;
      for (const [index, { fault }] of findMeterFaults(rows).readings.entries()) {
        if (index === at && fault !== null) found++;
        if (index !== at && fault !== null) lost++;
      }
    }
    expect(found / wrong).toBeGreaterThan(0.8);
    expect(lost / (5 * wrong)).toBeLessThan(0.01);
  });
});

function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}
