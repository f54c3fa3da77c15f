import { z } from 'zod';
import {
  cents,
  day,
  id,
  instant,
  LINE_KINDS,
  LINE_REASONS,
  listOf,
  named,
  pageQuery,
  PAY_TYPES,
  TICKET_TYPES,
  WORK_DONE,
} from './basics';

export const repairQuery = pageQuery.extend({
  q: z.string().max(200).optional(),
  serial: z.string().max(200).optional(),
  number: z.string().max(200).optional(),
  maker: z.string().max(200).optional(),
  model: z.string().max(200).optional(),
  modelId: id.optional(),
  unitId: id.optional(),
  componentId: id.optional(),
  technicianId: id.optional(),
  from: day.optional(),
  to: day.optional(),
  cameBack: z.enum(['yes', 'no']).optional(),
});

export const repairListed = z.strictObject({
  id,
  number: z.string(),
  location: z.string().nullable(),
  ticketType: z.enum(TICKET_TYPES),
  workOn: day,
  closedOn: day,
  unit: named.nullable(),
  model: named.nullable(),
  meterHours: z.number().nullable(),
  complaint: z.string().nullable(),
  components: z.array(named),
  technicians: z.array(named),
  totalCents: cents,
  /** Days until it came back for the same trouble; null where it did not (so far). */
  cameBackAfterDays: z.number().int().nullable(),
  isComebackOf: named.nullable(),
});
export type RepairListed = z.infer<typeof repairListed>;
export const repairList = listOf(repairListed);

export const repairLine = z.strictObject({
  id,
  position: z.number().int(),
  kind: z.enum(LINE_KINDS),
  part: named.nullable(),
  partNumber: z.string().nullable(),
  description: z.string().nullable(),
  supplier: z.string().nullable(),
  component: named.nullable(),
  componentOrigin: z.string(),
  reason: z.enum([...LINE_REASONS, 'unknown']),
  reasonOrigin: z.string(),
  workDone: z.enum(WORK_DONE).nullable(),
  quantity: z.number().nullable(),
  amountCents: cents.nullable(),
  costCents: cents.nullable(),
  laborOp: z.string().nullable(),
  laborHours: z.number().nullable(),
  laborAmountCents: cents.nullable(),
  technician: z.string().nullable(),
  payType: z.enum(PAY_TYPES).nullable(),
});
export type RepairLine = z.infer<typeof repairLine>;

export const linkedRepair = z.strictObject({
  id,
  number: z.string(),
  workOn: day,
  days: z.number().int(),
  evidence: z.string(),
});

export const repairWhole = z.strictObject({
  id,
  number: z.string(),
  location: z.string().nullable(),
  ticketType: z.enum(TICKET_TYPES),
  openedOn: day.nullable(),
  readyOn: day.nullable(),
  closedOn: day,
  pickedUpOn: day.nullable(),
  workOn: day,
  unit: named.nullable(),
  /** What the record says of the machine where it is not identified. */
  machineText: z.string().nullable(),
  model: named.nullable(),
  customer: z
    .strictObject({ ref: z.string(), name: z.string().nullable(), phone: z.string().nullable() })
    .nullable(),
  engine: z.string().nullable(),
  meterHours: z.number().nullable(),
  meterFault: z.string().nullable(),
  complaint: z.string().nullable(),
  cause: z.string().nullable(),
  correction: z.string().nullable(),
  notes: z.string().nullable(),
  technicianText: z.string().nullable(),
  technicians: z.array(named),
  payType: z.enum(PAY_TYPES).nullable(),
  laborOp: z.string().nullable(),
  laborHours: z.number().nullable(),
  laborAmountCents: cents.nullable(),
  partsAmountCents: cents,
  totalCents: cents,
  lines: z.array(repairLine),
  cameBackAs: z.array(linkedRepair),
  isComebackOf: linkedRepair.nullable(),
  versions: z.array(z.strictObject({ version: z.number().int(), replacedAt: instant })),
  /** Until which day it is known what came back; null before the records were first read together. */
  asOf: day.nullable(),
});
export type RepairWhole = z.infer<typeof repairWhole>;
