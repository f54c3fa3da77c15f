import { z } from 'zod';
import { cents, day, id, interval, listOf, named, pageQuery, PRODUCT_TYPES, USE_CLASSES } from './basics';

export const unitQuery = pageQuery.extend({
  q: z.string().max(200).optional(),
  serial: z.string().max(200).optional(),
  maker: z.string().max(200).optional(),
  model: z.string().max(200).optional(),
  modelId: id.optional(),
});

export const unitListed = z.strictObject({
  id,
  name: z.string(),
  identity: z.enum(['serial', 'tag', 'customer_model']),
  serial: z.string().nullable(),
  unitRef: z.string().nullable(),
  model: named.nullable(),
  inServiceOn: day.nullable(),
  useClass: z.enum(USE_CLASSES).nullable(),
  repairs: z.number().int(),
  lastRepairOn: day.nullable(),
  lastMeterHours: z.number().nullable(),
});
export const unitList = listOf(unitListed);

/** One stop on a machine's timeline: a repair or a register reading. */
export const unitEvent = z.strictObject({
  kind: z.enum(['repair', 'register']),
  on: day,
  repair: z.strictObject({ id, number: z.string(), ticketType: z.string() }).nullable(),
  /** As read. */
  meterHours: z.number().nullable(),
  /** Running total over meter restarts; null where the reading is not used. */
  cumulativeHours: z.number().nullable(),
  meterFault: z.string().nullable(),
  complaint: z.string().nullable(),
  correction: z.string().nullable(),
  replaced: z.array(z.strictObject({ component: named, reason: z.string() })),
  workDone: z.array(z.strictObject({ component: named.nullable(), workDone: z.string() })),
  totalCents: cents,
  isComebackOf: named.nullable(),
});
export type UnitEvent = z.infer<typeof unitEvent>;

export const unitWhole = unitListed.extend({
  customer: z
    .strictObject({ ref: z.string(), name: z.string().nullable(), phone: z.string().nullable() })
    .nullable(),
  knownFromOn: day.nullable(),
  isRegistered: z.boolean(),
  engines: z.array(z.strictObject({ name: z.string(), seenFromOn: day.nullable() })),
  events: z.array(unitEvent),
  /** What is in it now, from what this shop fitted: component, part, since when, at how many hours. */
  fitted: z.array(
    z.strictObject({ component: named, part: named.nullable(), on: day, hoursSince: z.number().nullable() }),
  ),
});
export type UnitWhole = z.infer<typeof unitWhole>;

export const modelQuery = pageQuery.extend({
  q: z.string().max(200).optional(),
  maker: z.string().max(200).optional(),
  model: z.string().max(200).optional(),
});

export const modelListed = z.strictObject({
  id,
  maker: z.string(),
  model: z.string(),
  productType: z.enum(PRODUCT_TYPES).nullable(),
  families: z.array(named),
  units: z.number().int(),
  repairs: z.number().int(),
  failures: z.number().int(),
  topComponent: named.nullable(),
  comebackCount: z.number().int(),
  comebackSize: z.number().int(),
  comebackRate: z.number().nullable(),
  comebackInterval: interval,
  findings: z.number().int(),
});
export type ModelListed = z.infer<typeof modelListed>;
export const modelList = listOf(modelListed);

export const modelComponent = z.strictObject({
  component: named,
  system: z.string(),
  failures: z.number().int(),
  damage: z.number().int(),
  unknown: z.number().int(),
  maintenance: z.number().int(),
  machines: z.number().int(),
  medianHours: z.number().nullable(),
  /** Age by which half have failed, where a Weibull life can be fitted; in `clock`. */
  clock: z.enum(['hours', 'days']),
  halfBy: z.number().nullable(),
  halfByInterval: interval,
  pattern: z.enum(['young', 'wears_out', 'cannot_tell', 'no_pattern', 'too_few']),
});

export const recurrence = z.strictObject({
  kind: z.enum(['estimate', 'notEstimable']),
  reason: z.string().nullable(),
  /** True where only repairs end the observation: "among machines that came in", and no mean time is given. */
  amongThoseThatCameIn: z.boolean(),
  machines: z.number().int(),
  repairs: z.number().int(),
  rows: z.array(
    z.strictObject({
      days: z.number(),
      atRisk: z.number(),
      mean: z.number(),
      lower: z.number().nullable(),
      upper: z.number().nullable(),
    }),
  ),
  trend: z.enum(['rising', 'falling', 'no_trend', 'too_few']),
  meanDaysBetween: z.number().nullable(),
  meanDaysBetweenInterval: interval,
});

export type Recurrence = z.infer<typeof recurrence>;

export const modelWhole = modelListed.extend({
  components: z.array(modelComponent),
  recurrence,
  findingsHere: z.array(
    z.strictObject({
      id,
      kind: z.enum(['cascade', 'together']),
      causal: named,
      resultant: named,
      episodes: z.number().int(),
    }),
  ),
});
export type ModelWhole = z.infer<typeof modelWhole>;
