import { z } from 'zod';
import { cents, day, id, interval, listOf, named } from './basics';
import { recurrence } from './machines';

export const month = z.string().regex(/^\d{4}-(0[1-9]|1[0-2])$/, 'Write a month as 2026-04.');

export const rateQuery = z.strictObject({
  from: day.optional(),
  to: day.optional(),
  by: z.enum(['month', 'model', 'component', 'technician']).default('month'),
});

export const rateRow = z.strictObject({
  month: month.nullable(),
  /** What the row is of: a month, or the id of a model, component or technician. */
  key: z.string(),
  label: z.string(),
  count: z.number().int(),
  size: z.number().int(),
  rate: z.number().nullable(),
  interval,
  oursCount: z.number().int(),
  oursRate: z.number().nullable(),
  maturing: z.boolean(),
  projected: z.number().nullable(),
  limits: interval.nullable(),
  shrunken: z.number().nullable(),
  shrunkenInterval: interval.nullable(),
});
export type RateRow = z.infer<typeof rateRow>;
export const rateList = listOf(rateRow);

/** One line of "what drives it": a component on a model, each comeback counted once. */
export const driver = z.strictObject({
  component: named,
  model: named.nullable(),
  size: z.number().int(),
  count: z.number().int(),
  rate: z.number(),
  shrunken: z.number(),
  shrunkenInterval: interval,
  beyondAverage: z.number(),
  costCents: cents,
  oftenWhy: z.string().nullable(),
});

export const todo = z.strictObject({
  kind: z.string(),
  text: z.string(),
  detail: z.string(),
  count: z.number().int(),
  path: z.string(),
});

/** Everything that "This month" shows, from one request. */
export const monthReview = z.strictObject({
  windowDays: z.number().int(),
  asOf: day,
  analysis: z.enum(['none', 'pending', 'running', 'ready', 'failed']),
  /** The latest month that can be judged; null where there is none yet. */
  month: month.nullable(),
  repairsInAll: z.number().int(),
  unidentified: z.number().int(),
  rows: z.array(rateRow),
  center: z.number().nullable(),
  isSignal: z.boolean(),
  signalSystem: z.strictObject({ system: z.string(), count: z.number().int() }).nullable(),
  firstVisitCure: z.strictObject({ cured: z.number().int(), of: z.number().int(), interval }),
  byTheDoor: z.strictObject({
    count: z.number().int(),
    fromMonth: month.nullable(),
    toMonth: month.nullable(),
  }),
  costCents: cents,
  costOfComebacks: z.number().int(),
  drivers: z.array(driver),
  todos: z.array(todo),
});
export type MonthReview = z.infer<typeof monthReview>;
export const monthQuery = z.strictObject({ month: month.optional() });

export const meanQuery = z.strictObject({
  modelId: id.optional(),
  maker: z.string().max(200).optional(),
  model: z.string().max(200).optional(),
});

/** How the machines of each model come in again: the mean number of repairs by age. */
export const meanCumulativeList = listOf(recurrence.extend({ model: named }));
/** Mean days between repairs, where it can be said; else `reason` says why not. */
export const meanTimeList = listOf(
  recurrence.omit({ rows: true, kind: true, reason: true }).extend({
    model: named,
    reason: z.enum(['came_in', 'trend', 'no_machines']).nullable(),
  }),
);
export type MeanTimeRow = z.infer<typeof meanTimeList>['data'][number];
