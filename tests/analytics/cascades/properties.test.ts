import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { CascadeCounts, CascadeVisit } from '../../../analytics/cascades';
import { findCascades } from '../../../analytics/cascades';
import { cascadesOf, shops } from './made-shop';

const [shop] = shops(1, { unitsPerModel: 25, models: 6, changedApartReason: 'failed' }, 31);
if (!shop) throw new Error('a shop is needed');
const whole = cascadesOf(shop);

/** A fixed shuffle: rows by a hash of their place. */
const reordered = <T>(rows: readonly T[]) =>
  rows
    .map((row, at) => ({ row, key: (at * 7919) % 10007 }))
    .sort((a, b) => a.key - b.key)
    .map(({ row }) => row);

const sums = (f: CascadeCounts) => [
  [f.resultantNearCausal + f.resultantAlone, f.resultantTotal],
  [f.withBoth + f.causalOnly + f.resultantOnly, f.episodes],
  [f.causalFirst + f.resultantFirst + f.sameVisitFirst, f.withBoth],
  [f.endedByCausal + f.endedByResultant + f.endedByBoth, f.withBoth],
  [f.soloReplacements + f.withCausalReplacements + f.unjudgedReplacements, f.resultantTotal],
];

describe('properties of findCascades', () => {
  it('reconciles every finding', () => {
    expect(whole.findings.length).toBeGreaterThan(5);
    expect(new Set(whole.findings.map(({ kind }) => kind)).size).toBe(2);
    for (const finding of whole.findings) {
      for (const [sum, total] of sums(finding)) expect(sum).toBe(total);
      expect(finding.cases).toHaveLength(finding.withBoth);
      expect(finding.qValue).toBeLessThanOrEqual(0.05);
      if (finding.kind === 'together') expect(finding.causal < finding.resultant).toBe(true);
    }
  });

  it('does not depend on the order of rows, and repeats of a row change nothing', () => {
    const visits = reordered(shop.visits).map((visit) => ({ ...visit, lines: reordered(visit.lines) }));
    expect(findCascades(visits, { units: reordered(shop.units) })).toEqual(whole);
    const twice = findCascades([...shop.visits, ...shop.visits], { units: shop.units });
    expect(twice.findings).toEqual(whole.findings);
  });

  it('follows a shift of the calendar', () => {
    const visits = shop.visits.map((visit) => ({ ...visit, day: visit.day + 20_000 }));
    const units = shop.units.map((unit) => ({
      ...unit,
      fromDay: unit.fromDay + 20_000,
      toDay: unit.toDay + 20_000,
    }));
    const shifted = findCascades(visits, { units });
    const names = ({ findings }: typeof whole) =>
      findings.map((f) => [f.model, f.causal, f.resultant, f.kind]);
    expect(names(shifted)).toEqual(names(whole));
  });

  it('does not depend on the names of units', () => {
    const rename = <T extends { unitId: string }>(row: T): T => ({ ...row, unitId: `x${row.unitId}` });
    const renamed = findCascades(shop.visits.map(rename), { units: shop.units.map(rename) });
    const counts = ({ findings }: typeof whole) =>
      findings.map((f) => [f.model, f.causal, f.resultant, f.kind, f.withBoth, f.resultantTotal]);
    expect(counts(renamed)).toEqual(counts(whole));
  });

  it('keeps a finding at its own q and drops it just below', () => {
    const weakest = whole.findings
      .filter(({ kind }) => kind === 'cascade')
      .reduce((a, b) => (b.qValue > a.qValue ? b : a));
    const has = (limit: number) =>
      findCascades(shop.visits, { units: shop.units, maxFalseDiscovery: limit }).findings.some(
        ({ model, causal, resultant, kind }) =>
          kind === 'cascade' &&
          model === weakest.model &&
          causal === weakest.causal &&
          resultant === weakest.resultant,
      );
    expect(has(weakest.qValue)).toBe(true);
    expect(has(weakest.qValue * 0.999)).toBe(false);
  });

  it('answers any small shop with finite numbers', () => {
    const visit = fc.record({
      unitId: fc.constantFrom('u', 'v', 'w'),
      model: fc.constantFrom('A', 'B'),
      day: fc.integer({ min: -50, max: 400 }),
      hours: fc.option(fc.constantFrom(0, 1e-9, 12, 9999, 1e9), { nil: null }),
      lines: fc.array(
        fc.record({
          component: fc.constantFrom('p', 'q', 'r', ''),
          reason: fc.constantFrom('failed' as const, 'damage' as const, 'maintenance' as const, null),
        }),
        { maxLength: 4 },
      ),
    });
    fc.assert(
      fc.property(fc.array(visit, { maxLength: 25 }), (visits: CascadeVisit[]) => {
        const result = findCascades(visits, { maxFalseDiscovery: 0.9 });
        expect(JSON.stringify(result)).not.toMatch(/NaN|Infinity/);
        for (const finding of result.findings) {
          for (const [sum, total] of sums(finding)) expect(sum).toBe(total);
          for (const value of Object.values(finding))
            if (typeof value === 'number') expect(Number.isFinite(value)).toBe(true);
        }
      }),
      { seed: 20261201, numRuns: 150 },
    );
  });
});

describe('hostile input', () => {
  const visit: CascadeVisit = { unitId: 'u', model: 'M', day: 1, hours: null, lines: [] };

  it('answers nothing, one visit and visits without lines', () => {
    expect(findCascades([])).toEqual({
      findings: [],
      caseFiles: [],
      examined: {
        models: 0,
        units: 0,
        visits: 0,
        pairs: 0,
        declaredPairs: 0,
        searchedPairs: 0,
        linesKnown: 0,
        linesUnknown: 0,
        clock: 'days',
      },
      warnings: ['noFailures', 'noHours', 'noUnits'],
    });
    expect(findCascades([visit]).findings).toEqual([]);
    expect(findCascades([visit, { ...visit, day: 2 }]).examined.visits).toBe(2);
  });

  it.each([
    [{ visits: [{ ...visit, day: NaN }] }, 'every day to be a finite number'],
    [{ visits: [{ ...visit, hours: NaN }] }, 'hours where given'],
    [{ visits: [{ ...visit, hours: -1 }] }, 'hours ≥ 0'],
    [{ options: { windowDays: 0 } }, 'windowDays > 0'],
    [{ options: { maxFalseDiscovery: 1 } }, 'maxFalseDiscovery between 0 and 1'],
    [{ options: { asOfDay: Infinity } }, 'asOfDay'],
    [{ options: { units: [{ unitId: 'u', model: 'M', fromDay: 9, toDay: 1 }] } }, 'toDay ≥ fromDay'],
    [
      {
        options: {
          families: [
            { name: 'a', models: ['M'] },
            { name: 'b', models: ['M'] },
          ],
        },
      },
      'each model in one family at most',
    ],
  ])('throws on wrong use: %j', ({ visits = [visit], options = {} }: Wrong, message) => {
    expect(() => findCascades(visits, options)).toThrow(`findCascades requires ${message}`);
  });
});

type Wrong = { visits?: CascadeVisit[]; options?: Parameters<typeof findCascades>[1] };
