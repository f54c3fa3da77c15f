import { describe, expect, it } from 'vitest';
import { declaredChains, findCascades } from '../../../analytics/cascades';
import type { Story } from './made-shop';
import { repeat, tell } from './made-shop';

/** Switch alone, soon back, switch again, then clutch and switch; beside machines with one part alone. */
const chain = (at: number): Story => [
  [100 + at, 'PTO switch'],
  [112 + at, 'PTO switch'],
  [125 + at, 'PTO clutch', 'PTO switch'],
];
const alone =
  (component: string) =>
  (at: number): Story => [[50 + 37 * (at % 20), component]];

const burnt = tell([
  ...repeat(12, chain),
  ...repeat(4, alone('PTO clutch')),
  ...repeat(30, alone('PTO switch')),
  ...repeat(30, alone('deck belt')),
  ...repeat(30, alone('carburetor')),
]);

describe('findCascades', () => {
  it('names the part that was replaced last as the cause, with counts that reconcile by hand', () => {
    const { findings, examined, warnings } = findCascades(burnt.visits, { units: burnt.units });
    expect(findings).toHaveLength(1);
    expect(findings[0]).toMatchObject({
      model: 'M',
      causal: 'PTO clutch',
      resultant: 'PTO switch',
      kind: 'cascade',
      declared: true,
      evidence: 'replaced before',
      causalTotal: 16,
      resultantTotal: 66,
      resultantNearCausal: 36,
      resultantAlone: 30,
      episodes: 46,
      withBoth: 12,
      causalOnly: 4,
      resultantOnly: 30,
      resultantFirst: 12,
      causalFirst: 0,
      endedByBoth: 12,
      repeatedBeforeCure: 12,
      extraVisits: 24,
      soloReplacements: 54,
      soloReturns: 24,
      withCausalReplacements: 12,
      withCausalReturns: 0,
      unjudgedReplacements: 0,
      medianDays: 25,
      medianHoursBetween: null,
    });
    expect(findings[0]?.qValue).toBeLessThan(0.05);
    expect(findings[0]?.excessRatioLimits.lower).toBeGreaterThan(1);
    expect(findings[0]?.cases).toHaveLength(12);
    expect(examined).toMatchObject({ models: 1, units: 106, pairs: 6, declaredPairs: 1, clock: 'days' });
    expect(warnings).toEqual(['noHours']);
  });

  it('follows the records, not the list: the same chain the other way round is found that way round', () => {
    const swapped = burnt.visits.map((visit) => ({
      ...visit,
      lines: visit.lines.map(({ component, reason }) => ({
        component:
          component === 'PTO clutch' ? 'PTO switch' : component === 'PTO switch' ? 'PTO clutch' : component,
        reason,
      })),
    }));
    const { findings } = findCascades(swapped, { units: burnt.units });
    expect(findings[0]).toMatchObject({ causal: 'PTO switch', resultant: 'PTO clutch', kind: 'cascade' });
  });

  it('calls parts that are always changed at one visit together, alphabetically, and nothing more', () => {
    const { visits, units } = tell([
      ...repeat(20, (at): Story => [[60 + 40 * at, 'spark plug', 'air filter']]),
      ...repeat(30, alone('deck belt')),
      ...repeat(30, alone('carburetor')),
      ...repeat(10, alone('air filter')),
    ]);
    const { findings } = findCascades(visits, { units });
    expect(findings).toHaveLength(1);
    expect(findings[0]).toMatchObject({ causal: 'air filter', resultant: 'spark plug', kind: 'together' });
    expect(findings[0]?.evidence).toBe('seen together');
  });

  it('takes no maintenance for a failure, and unknown reasons only where told to', () => {
    const story = repeat(12, chain);
    const service = tell(story, { reason: 'maintenance' });
    expect(findCascades(service.visits, { units: service.units })).toMatchObject({
      findings: [],
      warnings: ['noFailures', 'noHours'],
    });
    const unknown = burnt.visits.map((visit) => ({
      ...visit,
      lines: visit.lines.map(({ component }) => ({ component, reason: null })),
    }));
    const excluded = findCascades(unknown, { units: burnt.units });
    expect(excluded.findings).toEqual([]);
    expect(excluded.warnings).toContain('unknownReasons');
    const counted = findCascades(unknown, { units: burnt.units, unknownReasons: 'failed' });
    expect(counted.findings[0]).toMatchObject({ causal: 'PTO clutch', kind: 'cascade' });
  });

  it('claims nothing below the floor but keeps a case file', () => {
    const { visits, units } = tell([
      ...repeat(2, (at): Story => [
        [100 + at, 'starter'],
        [150 + at, 'battery'],
      ]),
      ...repeat(10, alone('starter')),
      ...repeat(10, alone('battery')),
    ]);
    const { findings, caseFiles } = findCascades(visits, { units });
    expect(findings).toEqual([]);
    expect(caseFiles).toHaveLength(1);
    expect(caseFiles[0]).toMatchObject({ components: ['battery', 'starter'], episodes: 2 });
    expect(caseFiles[0]?.cases.map(({ unitId }) => unitId)).toEqual(['unit 1', 'unit 2']);
  });

  it('hands back the visits behind a case, and judges returns only where the window is complete', () => {
    const visits = burnt.visits.map((visit, at) => ({ ...visit, visitId: `R-${String(at)}` }));
    const { findings } = findCascades(visits, { units: burnt.units, asOfDay: 140 });
    const first = findings[0]?.cases[0];
    expect(first).toMatchObject({ unitId: 'unit 1', stance: 'for', course: 'resultantFirst' });
    expect(first?.visits.map(({ day, visitIds }) => [day, ...visitIds])).toEqual([
      [100, 'R-0'],
      [112, 'R-1'],
      [125, 'R-2'],
    ]);
    expect(findings[0]?.unjudgedReplacements).toBeGreaterThan(0);
  });

  it('borrows between models of a family and names the lenders', () => {
    const models = ['A', 'B', 'C', 'D'].map((model) =>
      tell([...repeat(4, chain), ...repeat(8, alone('PTO switch')), ...repeat(8, alone('deck belt'))], {
        model,
        prefix: model,
      }),
    );
    const { findings } = findCascades(
      models.flatMap(({ visits }) => visits),
      {
        units: models.flatMap(({ units }) => units),
        families: [{ name: 'one deck', models: ['A', 'B', 'C', 'D'] }],
        declared: [],
      },
    );
    expect(findings.map(({ model }) => model)).toEqual(['A', 'B', 'C', 'D']);
    expect(findings[0]).toMatchObject({ family: 'one deck', declared: false, borrowedFrom: ['B', 'C', 'D'] });
  });

  it('declares chains of two different parts, none of them twice', () => {
    const names = declaredChains.map(({ causal, resultant }) => `${causal}>${resultant}`);
    expect(new Set(names).size).toBe(names.length);
    expect(declaredChains.every(({ causal, resultant }) => causal !== resultant)).toBe(true);
  });
});
