import { bLife, fitWeibull, kaplanMeier, type LifeObservation } from '../../analytics';
import type { ModelListed, ModelWhole } from '../../shared/machines';
import type { ComponentListed, PartLife } from '../../shared/parts';

export const CLUTCH = { id: '00000000-0000-4000-8000-0000000000c1', name: 'PTO clutch' };
export const SWITCH = { id: '00000000-0000-4000-8000-0000000000c2', name: 'PTO switch' };
export const R42 = { id: '00000000-0000-4000-8000-0000000000a1', name: 'Tarnlow R42' };
export const FINDING_ID = '00000000-0000-4000-8000-0000000000f1';

/** Lives at the quantiles of a Weibull distribution, every third cut short. */
export function observations(count: number, shape = 2.6, scale = 700): LifeObservation[] {
  return Array.from({ length: count }, (_, index) => {
    const age = scale * (-Math.log(1 - (index + 0.5) / count)) ** (1 / shape);
    return index % 3 === 0 ? { time: age * 0.7, failed: false } : { time: age, failed: true };
  });
}

/** What the API answers to these observations. */
export function partLife(
  rows: readonly LifeObservation[] = observations(60),
  given: Partial<PartLife> = {},
): PartLife {
  const failures = rows.filter(({ failed }) => failed).length;
  const fit = fitWeibull(rows);
  const longest = Math.max(0, ...rows.map(({ time }) => time));
  return {
    component: CLUTCH,
    system: 'PTO drive',
    scope: { model: null, family: null },
    clock: 'hours',
    clockReason: 'hours_known',
    lives: rows.length,
    failures,
    unknown: 0,
    damaged: 0,
    withHours: rows.length,
    betweenReadings: 0,
    setAside: 0,
    assumedOriginal: 0,
    amongThoseThatCameIn: false,
    pattern: fit.kind === 'estimate' ? 'wears_out' : 'too_few',
    kaplanMeier: kaplanMeier(rows),
    weibull:
      fit.kind === 'estimate'
        ? {
            kind: 'estimate',
            shape: fit.shape,
            scale: fit.scale,
            shapeInterval: fit.shapeInterval,
            scaleInterval: fit.scaleInterval,
            limits: 'wald',
            bLives: [10, 50].map((percent) => ({ percent, ...bLife(fit, percent) })),
            warnings: fit.warnings,
          }
        : { kind: 'notEstimable', reason: fit.reason },
    atRiskAt: Array.from({ length: Math.floor(longest / 200) + 1 }, (_, index) => ({
      time: index * 200,
      atRisk: rows.filter(({ time }) => time >= index * 200).length,
    })),
    numbers: [],
    comparison: null,
    takesWithIt: [],
    asOf: '2026-06-30',
    ...given,
  };
}

export function componentListed(name: string, given: Partial<ComponentListed> = {}): ComponentListed {
  return {
    id: name.toLowerCase().replaceAll(' ', '-'),
    name,
    system: 'PTO drive',
    kind: 'unset',
    fitted: 100,
    failures: 60,
    unknown: 10,
    machines: 80,
    models: 4,
    comebackCount: 12,
    comebackSize: 60,
    comebackRate: 0.2,
    comebackInterval: { lower: 0.118, upper: 0.318 },
    spentCents: 812_000,
    ...given,
  };
}

export function modelListed(given: Partial<ModelListed> = {}): ModelListed {
  return {
    id: R42.id,
    maker: 'Tarnlow',
    model: 'R42',
    productType: 'lawn_tractor',
    families: [],
    units: 61,
    repairs: 240,
    failures: 143,
    topComponent: CLUTCH,
    comebackCount: 14,
    comebackSize: 200,
    comebackRate: 0.07,
    comebackInterval: { lower: 0.042, upper: 0.114 },
    findings: 1,
    ...given,
  };
}

export function modelWhole(given: Partial<ModelWhole> = {}): ModelWhole {
  return {
    ...modelListed(),
    components: [
      {
        component: CLUTCH,
        system: 'PTO drive',
        failures: 60,
        damage: 2,
        unknown: 8,
        maintenance: 0,
        machines: 48,
        medianHours: 540,
        clock: 'hours',
        halfBy: 612,
        halfByInterval: { lower: 569, upper: 658 },
        pattern: 'wears_out',
      },
    ],
    recurrence: {
      kind: 'estimate',
      reason: null,
      amongThoseThatCameIn: false,
      machines: 61,
      repairs: 240,
      rows: [
        { days: 200, atRisk: 61, mean: 0.4, lower: 0.3, upper: 0.52 },
        { days: 800, atRisk: 50, mean: 1.7, lower: 1.4, upper: 2.1 },
        { days: 1600, atRisk: 22, mean: 4.2, lower: 3.5, upper: 5 },
      ],
      trend: 'rising',
      meanDaysBetween: null,
      meanDaysBetweenInterval: { lower: null, upper: null },
    },
    findingsHere: [{ id: FINDING_ID, kind: 'cascade', causal: CLUTCH, resultant: SWITCH, episodes: 61 }],
    ...given,
  };
}
