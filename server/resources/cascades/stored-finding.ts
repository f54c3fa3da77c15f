import { z } from 'zod';

const interval = z.object({ lower: z.number().nullable(), upper: z.number().nullable() });
const count = z.number().int();

/** An episode behind a finding, as the analysis left it. Components by name, visits by the ids of their repairs. */
export const storedCase = z.object({
  unitId: z.string(),
  stance: z.enum(['for', 'against', 'neutral']),
  course: z.enum(['resultantFirst', 'sameVisit', 'causalFirst', 'returnedAfterCure']),
  visits: z.array(
    z.object({
      day: z.number(),
      hours: z.number().nullable(),
      visitIds: z.array(z.string()),
      components: z.array(z.string()),
    }),
  ),
});
export type StoredCase = z.output<typeof storedCase>;

/** What the analysis keeps of a finding, besides what stands in columns. */
export const storedFinding = z.object({
  causal: z.string(),
  resultant: z.string(),
  declared: z.boolean(),
  evidence: z.enum(['seen together', 'replaced before', 'tested as cause']),
  resultantTotal: count,
  resultantNearCausal: count,
  resultantAlone: count,
  episodes: count,
  withBoth: count,
  causalFirst: count,
  resultantFirst: count,
  endedByCausal: count,
  endedByResultant: count,
  soloReplacements: count,
  soloReturns: count,
  withCausalReplacements: count,
  withCausalReturns: count,
  returnRatio: z.number().nullable(),
  returnRatioLimits: interval,
  expectedNear: z.number(),
  excessRatio: z.number().nullable(),
  excessRatioLimits: interval,
  shareExplained: z.number(),
  medianDays: z.number().nullable(),
  medianHoursBetween: z.number().nullable(),
  borrowedFrom: z.array(z.string()),
  cases: z.array(storedCase),
});

/** What the analysis says of its search: how much was examined, and pairs of which nothing is claimed. */
export const storedSummary = z.object({
  examined: z.object({ models: count, pairs: count }),
  warnings: z.array(z.string()),
  caseFiles: z.array(
    z.object({
      model: z.string(),
      components: z.tuple([z.string(), z.string()]),
      episodes: count,
      cases: z.array(storedCase),
    }),
  ),
});
