import { z } from 'zod';
import { cents, CLOCKS, COMPONENT_KINDS, day, id, interval, listOf, named, pageQuery } from './basics';

export const componentQuery = pageQuery.extend({ q: z.string().max(200).optional(), modelId: id.optional() });

export const componentListed = z.strictObject({
  id,
  name: z.string(),
  system: z.string(),
  kind: z.enum(COMPONENT_KINDS),
  fitted: z.number().int(),
  failures: z.number().int(),
  unknown: z.number().int(),
  machines: z.number().int(),
  models: z.number().int(),
  comebackCount: z.number().int(),
  comebackSize: z.number().int(),
  comebackRate: z.number().nullable(),
  comebackInterval: interval,
  spentCents: cents,
});
export type ComponentListed = z.infer<typeof componentListed>;
export const componentList = listOf(componentListed);
export const changeComponent = z
  .strictObject({
    name: z.string().trim().min(1).max(120),
    system: z.string().trim().min(1).max(80),
    kind: z.enum(COMPONENT_KINDS),
  })
  .partial();

export const partQuery = pageQuery.extend({
  q: z.string().max(200).optional(),
  number: z.string().max(200).optional(),
  maker: z.string().max(200).optional(),
  componentId: id.optional(),
});
export const partListed = z.strictObject({
  id,
  maker: z.string(),
  number: z.string(),
  description: z.string().nullable(),
  supplier: z.string().nullable(),
  component: named.nullable(),
  supersededBy: named.nullable(),
  fitmentNote: z.string().nullable(),
  listPriceCents: cents.nullable(),
  warrantyDays: z.number().int().nullable(),
  fitted: z.number().int(),
  lastFittedOn: day.nullable(),
});
export const partList = listOf(partListed);

/** Filters of a part's life; `component` by name or id, `model` with its maker, or a family. */
export const partLifeQuery = z.strictObject({
  component: z.string().min(1).max(200),
  maker: z.string().max(200).optional(),
  model: z.string().max(200).optional(),
  modelId: id.optional(),
  familyId: id.optional(),
  clock: z.enum(CLOCKS).optional(),
  /** Comma-separated part numbers; absent: all, pooled. */
  partNumbers: z.string().max(2000).optional(),
  assumedOriginal: z.enum(['true', 'false']).default('false'),
  reasons: z.enum(['known', 'allFailed', 'noneFailed']).default('known'),
});

export const lifeRow = z.strictObject({
  time: z.number(),
  atRisk: z.number(),
  failures: z.number(),
  survival: z.number(),
  standardError: z.number().nullable(),
  lower: z.number().nullable(),
  upper: z.number().nullable(),
});

export const weibullFit = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('estimate'),
    shape: z.number(),
    scale: z.number(),
    shapeInterval: interval,
    scaleInterval: interval,
    limits: z.enum(['wald', 'profile']),
    bLives: z.array(
      z.strictObject({
        percent: z.number(),
        estimate: z.number().nullable(),
        lower: z.number().nullable(),
        upper: z.number().nullable(),
      }),
    ),
    warnings: z.array(z.string()),
  }),
  z.strictObject({ kind: z.literal('notEstimable'), reason: z.string() }),
]);

export const lifeOfNumber = z.strictObject({
  part: named,
  maker: z.string(),
  supersededBy: named.nullable(),
  fitmentNote: z.string().nullable(),
  firstFittedOn: day.nullable(),
  lives: z.number().int(),
  failures: z.number().int(),
  weibull: weibullFit,
});

export const partLife = z.strictObject({
  component: named,
  system: z.string(),
  scope: z.strictObject({ model: named.nullable(), family: named.nullable() }),
  clock: z.enum(CLOCKS),
  /** Why this clock: chosen by the reader, or by the share of lives that have hours. */
  clockReason: z.enum(['asked', 'hours_known', 'few_hours']),
  lives: z.number().int(),
  failures: z.number().int(),
  /** Lives that ended with a reason that nobody recorded; they are in neither count above. */
  unknown: z.number().int(),
  damaged: z.number().int(),
  withHours: z.number().int(),
  /** Of the lives, those with an end whose hours lie between the machine's readings before and after it. */
  betweenReadings: z.number().int(),
  setAside: z.number().int(),
  assumedOriginal: z.number().int(),
  amongThoseThatCameIn: z.boolean(),
  pattern: z.enum(['young', 'wears_out', 'cannot_tell', 'no_pattern', 'too_few']),
  kaplanMeier: z.array(lifeRow),
  weibull: weibullFit,
  atRiskAt: z.array(z.strictObject({ time: z.number(), atRisk: z.number() })),
  numbers: z.array(lifeOfNumber),
  /** Newest against older number, where both have failures: how often it fails at the same age. */
  comparison: z
    .strictObject({
      older: named,
      newer: named,
      ratio: z.number(),
      interval,
      pValue: z.number().nullable(),
      method: z.string(),
    })
    .nullable(),
  takesWithIt: z.array(
    z.strictObject({
      findingId: id,
      component: named,
      model: named.nullable(),
      both: z.number().int(),
      episodes: z.number().int(),
    }),
  ),
  asOf: day.nullable(),
});
export type PartLife = z.infer<typeof partLife>;
export type WeibullFit = z.infer<typeof weibullFit>;
