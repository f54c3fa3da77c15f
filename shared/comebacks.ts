import { z } from 'zod';
import { day, id, instant, listOf, named, pageQuery } from './basics';

export const COMEBACK_REASONS = [
  'part_failed_again',
  'cause_missed',
  'workmanship',
  'wrong_part',
  'defective_part',
  'work_not_completed',
  'not_duplicated',
  'operator_or_fuel',
  'declined_work',
  'unrelated',
  'undetermined',
] as const;
export type ComebackReason = (typeof COMEBACK_REASONS)[number];

/** The shop's own doing; `part_failed_again` counts too where a person says so. */
export const OURS: readonly ComebackReason[] = [
  'cause_missed',
  'workmanship',
  'wrong_part',
  'defective_part',
  'work_not_completed',
];
/** Not counted as coming back with the same trouble. */
export const NOT_COUNTED: readonly ComebackReason[] = ['unrelated', 'declined_work'];

export const COMEBACK_STATUSES = ['suggested', 'confirmed', 'dismissed'] as const;

export const comebackQuery = pageQuery.extend({
  from: day.optional(),
  to: day.optional(),
  status: z.enum(COMEBACK_STATUSES).optional(),
  modelId: id.optional(),
  componentId: id.optional(),
  technicianId: id.optional(),
});

export const comeback = z.strictObject({
  id,
  /** The return, the repair it attaches to, and the head of the episode. */
  repairNumber: z.string(),
  firstRepairNumber: z.string(),
  episodeRepairNumber: z.string(),
  repairId: id,
  firstRepairId: id,
  episodeRepairId: id,
  unit: named,
  model: named.nullable(),
  component: named.nullable(),
  technicians: z.array(named),
  firstWorkOn: day,
  returnedOn: day,
  days: z.number().int(),
  hours: z.number().nullable(),
  complaint: z.string().nullable(),
  link: z.string(),
  suggestedReason: z.enum(COMEBACK_REASONS),
  evidence: z.string(),
  reason: z.enum(COMEBACK_REASONS).nullable(),
  isOurs: z.boolean(),
  status: z.enum(COMEBACK_STATUSES),
  note: z.string(),
  decidedBy: z.string().nullable(),
  decidedAt: instant.nullable(),
  costCents: z.number().int(),
});
export type Comeback = z.infer<typeof comeback>;
export const comebackList = listOf(comeback);

export const decideComeback = z
  .strictObject({
    status: z.enum(COMEBACK_STATUSES),
    reason: z.enum(COMEBACK_REASONS).nullable(),
    isOurs: z.boolean().nullable(),
    attachedToRepairId: id.nullable(),
    note: z.string().max(2000),
  })
  .partial();
