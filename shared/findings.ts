import { z } from 'zod';
import { cents, day, id, interval, listOf, named } from './basics';

export const cascadeQuery = z.strictObject({
  maker: z.string().max(200).optional(),
  model: z.string().max(200).optional(),
  modelId: id.optional(),
});

const countsOfReturn = z.strictObject({ returns: z.number().int(), of: z.number().int(), interval });

export const finding = z.strictObject({
  id,
  maker: z.string(),
  model: z.string(),
  modelId: id.nullable(),
  family: named.nullable(),
  /** For `together` the two stand alphabetically. */
  causal: z.string(),
  resultant: z.string(),
  causalComponent: named,
  resultantComponent: named,
  kind: z.enum(['cascade', 'together']),
  qValue: z.number(),
  isDeclared: z.boolean(),
  evidence: z.enum(['seen_together', 'replaced_before', 'tested_as_cause']),
  episodes: z.number().int(),
  episodesWithBoth: z.number().int(),
  resultantFailures: z.number().int(),
  resultantNearCausal: z.number().int(),
  resultantAlone: z.number().int(),
  /** Resultant replaced and the causal one left in: how often trouble was back; and with it replaced. */
  leftIn: countsOfReturn,
  replaced: countsOfReturn,
  returnRatio: z.number().nullable(),
  returnRatioInterval: interval,
  expectedNear: z.number().nullable(),
  excessRatio: z.number().nullable(),
  excessRatioInterval: interval,
  endedByCausal: z.number().int(),
  endedByResultant: z.number().int(),
  causalFirst: z.number().int(),
  resultantFirst: z.number().int(),
  shareExplained: z.number().nullable(),
  medianHours: z.number().nullable(),
  medianDays: z.number().nullable(),
  borrowedFrom: z.array(named),
  spentCents: cents,
});
export type Finding = z.infer<typeof finding>;

export const caseFile = z.strictObject({
  model: named,
  first: named,
  second: named,
  times: z.number().int(),
  repairs: z.array(named),
});

/** All findings as of the last finished analysis; never paged. */
export const findingList = listOf(finding);

export const findingSummary = z.strictObject({
  asOf: day.nullable(),
  pairsExamined: z.number().int(),
  models: z.number().int(),
  caseFiles: z.array(caseFile),
  warnings: z.array(z.string()),
});
export type FindingSummary = z.infer<typeof findingSummary>;

export const findingEpisode = z.strictObject({
  unit: named,
  /** Does it speak for the finding or against it? Neutral: both at one visit, or too early to tell. */
  speaks: z.enum(['for', 'against', 'neutral']),
  why: z.string(),
  visits: z.array(
    z.strictObject({
      repair: named,
      on: day,
      hours: z.number().nullable(),
      daysIn: z.number().int(),
      hoursIn: z.number().nullable(),
      causal: z.boolean(),
      resultant: z.boolean(),
      spentCents: cents,
    }),
  ),
});
export const findingWhole = finding.extend({ cases: z.array(findingEpisode) });
export type FindingWhole = z.infer<typeof findingWhole>;
