import { z } from 'zod';
import {
  id,
  instant,
  listOf,
  LINE_KINDS,
  LINE_REASONS,
  PAY_TYPES,
  PRODUCT_TYPES,
  TICKET_TYPES,
  USE_CLASSES,
  WORK_DONE,
  day,
} from './basics';

export const IMPORT_KINDS = ['repairs', 'units', 'parts'] as const;
export type ImportKind = (typeof IMPORT_KINDS)[number];

export const DATE_FORMATS = [
  'yyyy-MM-dd',
  'M/d/yyyy',
  'd/M/yyyy',
  'd.M.yyyy',
  'M-d-yyyy',
  'd-M-yyyy',
  'yyyy/M/d',
  'yyyyMMdd',
  'd-MMM-yyyy',
  'MMM d, yyyy',
] as const;

/** What a person says a file's columns mean: our column → its header. */
export const mapping = z.strictObject({
  columns: z.record(z.string().max(60), z.string().max(300)).default({}),
  dateFormat: z.enum(DATE_FORMATS).optional(),
  decimal: z.enum(['.', ',']).optional(),
  delimiter: z.enum([',', ';', '\t', '|']).optional(),
  encoding: z.enum(['utf-8', 'utf-16le', 'utf-16be', 'windows-1252']).optional(),
});
export type Mapping = z.infer<typeof mapping>;

export const importState = z.strictObject({
  id,
  kind: z.enum(IMPORT_KINDS),
  source: z.enum(['file', 'batch', 'shell']),
  fileName: z.string().nullable(),
  isDryRun: z.boolean(),
  status: z.enum(['queued', 'running', 'done', 'failed', 'undone']),
  analysis: z.enum(['pending', 'running', 'ready', 'failed']),
  rowsRead: z.number().int(),
  rowsTotal: z.number().int().nullable(),
  created: z.number().int(),
  updated: z.number().int(),
  unchanged: z.number().int(),
  rejected: z.number().int(),
  error: z.string().nullable(),
  remarks: z.array(z.strictObject({ kind: z.string(), text: z.string(), count: z.number().int() })),
  startedBy: z.string().nullable(),
  createdAt: instant,
  finishedAt: instant.nullable(),
});
export type ImportState = z.infer<typeof importState>;
export const importList = listOf(importState);

export const rejection = z.strictObject({
  line: z.number().int(),
  repairNumber: z.string().nullable(),
  errors: z.array(
    z.strictObject({
      column: z.string().nullable(),
      value: z.string().nullable(),
      message: z.string(),
      mend: z.string(),
    }),
  ),
});
export const rejectionList = listOf(rejection);

/** The first look at a file: what was found, what each column seems to mean and why; nothing is imported. */
export const filePreview = z.strictObject({
  spoolId: z.string(),
  fileName: z.string(),
  bytes: z.number().int(),
  format: z.enum(['csv', 'xlsx']),
  encoding: z.string(),
  delimiter: z.string().nullable(),
  decimal: z.enum(['.', ',']),
  dateFormat: z.enum(DATE_FORMATS).nullable(),
  dateFormatReason: z.string(),
  /** True where a mapping confirmed earlier for such a file was found. */
  isRemembered: z.boolean(),
  headers: z.array(z.string()),
  rows: z.array(z.array(z.string())),
  proposals: z.array(
    z.strictObject({
      header: z.string(),
      column: z.string().nullable(),
      reason: z.string(),
      certainty: z.enum(['native', 'remembered', 'likely', 'guess', 'none']),
      samples: z.array(z.string()),
    }),
  ),
  columns: z.array(
    z.strictObject({ name: z.string(), label: z.string(), about: z.string(), isRequired: z.boolean() }),
  ),
  problems: z.array(z.string()),
});
export type FilePreview = z.infer<typeof filePreview>;

/** The fields of the form beside its file, in any order; the mapping is JSON. */
export const previewForm = z.strictObject({ kind: z.string().max(40).default('repairs') });
export const createImportForm = z.strictObject({
  kind: z.string().max(40),
  spoolId: z.uuid().optional(),
  mapping: z.string().max(200_000).optional(),
  dryRun: z.enum(['true', 'false']).default('false'),
});

const text = (max: number) => z.string().max(max);
const amount = z.number().int().min(-2_000_000_000).max(2_000_000_000);

/** One line of a repair in a batch. */
export const batchLine = z.strictObject({
  kind: z.enum(LINE_KINDS).optional(),
  partNumber: text(200).optional(),
  partMaker: text(200).optional(),
  partDescription: text(2000).optional(),
  supplier: text(200).optional(),
  component: text(200).optional(),
  reason: z.enum(LINE_REASONS).nullable().optional(),
  workDone: z.enum(WORK_DONE).nullable().optional(),
  quantity: z.number().min(-1e6).max(1e6).optional(),
  amountCents: amount.optional(),
  costCents: amount.optional(),
  laborOp: text(200).optional(),
  laborHours: z.number().min(-1000).max(1000).optional(),
  laborAmountCents: amount.optional(),
  technician: text(200).optional(),
  payType: z.enum(PAY_TYPES).nullable().optional(),
});

/** The machine of a repair in a batch. */
export const batchUnit = z.strictObject({
  serial: text(200).nullable().optional(),
  ref: text(200).nullable().optional(),
  maker: text(200).nullable().optional(),
  model: text(200).nullable().optional(),
  productType: z.enum(PRODUCT_TYPES).nullable().optional(),
  engineMaker: text(200).nullable().optional(),
  engineModel: text(200).nullable().optional(),
  engineSerial: text(200).nullable().optional(),
  inServiceOn: day.nullable().optional(),
  useClass: z.enum(USE_CLASSES).nullable().optional(),
});

/** One repair of a batch: the CSV's columns in camelCase. An absent field leaves what is there, null clears it. */
export const batchRepair = z.strictObject({
  location: text(200).nullable().optional(),
  repairNumber: text(200).min(1),
  ticketType: z.enum(TICKET_TYPES).nullable().optional(),
  openedOn: day.nullable().optional(),
  readyOn: day.nullable().optional(),
  closedOn: day,
  pickedUpOn: day.nullable().optional(),
  unit: batchUnit.optional(),
  customerRef: text(200).nullable().optional(),
  customerName: text(300).nullable().optional(),
  customerPhone: text(60).nullable().optional(),
  meterHours: z.number().min(0).max(1_000_000).nullable().optional(),
  complaint: text(20_000).nullable().optional(),
  cause: text(20_000).nullable().optional(),
  correction: text(20_000).nullable().optional(),
  notes: text(20_000).nullable().optional(),
  technician: text(200).nullable().optional(),
  payType: z.enum(PAY_TYPES).nullable().optional(),
  laborOp: text(200).nullable().optional(),
  laborHours: z.number().min(-10_000).max(10_000).nullable().optional(),
  laborAmountCents: amount.nullable().optional(),
  lines: z.array(batchLine).max(2000).optional(),
});
export type BatchRepair = z.infer<typeof batchRepair>;

/** Each repair is judged on its own, so the envelope leaves them open. */
export const batch = z.strictObject({ repairs: z.array(z.unknown()) });
export const batchAnswer = z.strictObject({
  importId: id,
  created: z.number().int(),
  updated: z.number().int(),
  unchanged: z.number().int(),
  analysis: z.enum(['pending', 'running', 'ready', 'failed']),
  rejected: z.array(
    z.strictObject({
      index: z.number().int(),
      repairNumber: z.string().nullable(),
      errors: z.array(z.strictObject({ path: z.string(), message: z.string() })),
    }),
  ),
});
export type BatchAnswer = z.infer<typeof batchAnswer>;
