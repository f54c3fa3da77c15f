import { z } from 'zod';
import { day, id, instant, listOf } from './basics';
import { KEY_SCOPES, ROLES } from './roles';
import { email } from './session';

export const shopSettings = z.strictObject({
  id,
  name: z.string(),
  timeZone: z.string(),
  locale: z.string(),
  currency: z.string(),
  lengthUnit: z.enum(['in', 'mm']),
  temperatureUnit: z.enum(['degF', 'Cel']),
  windowDays: z.number().int(),
  windowHours: z.number().nullable(),
  doorRateCents: z.number().int(),
});
export type ShopSettings = z.infer<typeof shopSettings>;

export const changeShopSettings = z
  .strictObject({
    name: z.string().trim().min(1).max(120),
    timeZone: z.string().min(1).max(80),
    locale: z.string().min(2).max(20),
    currency: z.string().regex(/^[A-Z]{3}$/, 'Three capital letters, such as USD.'),
    lengthUnit: z.enum(['in', 'mm']),
    temperatureUnit: z.enum(['degF', 'Cel']),
    windowDays: z.number().int().min(1).max(730),
    windowHours: z.number().positive().max(10_000).nullable(),
    doorRateCents: z.number().int().min(0).max(1_000_000),
  })
  .partial();

export const member = z.strictObject({
  id,
  userId: id,
  email: z.string(),
  displayName: z.string(),
  role: z.enum(ROLES),
  isDisabled: z.boolean(),
  hasPassword: z.boolean(),
  technicianId: id.nullable(),
});
export type Member = z.infer<typeof member>;
export const memberList = listOf(member);
export const inviteMember = z.strictObject({
  email,
  displayName: z.string().trim().min(1).max(120),
  role: z.enum(ROLES),
});
export const changeMember = z
  .strictObject({
    displayName: z.string().trim().min(1).max(120),
    role: z.enum(ROLES),
    isDisabled: z.boolean(),
    technicianId: id.nullable(),
  })
  .partial();

export const apiKey = z.strictObject({
  id,
  name: z.string(),
  hint: z.string(),
  scopes: z.array(z.enum(KEY_SCOPES)),
  createdAt: instant,
  lastUsedAt: instant.nullable(),
  isRevoked: z.boolean(),
});
export const apiKeyList = listOf(apiKey);
export const createApiKey = z.strictObject({
  name: z.string().trim().min(1).max(120),
  scopes: z.array(z.enum(KEY_SCOPES)).min(1),
});
/** The only time that the key itself is shown. */
export const createdApiKey = apiKey.extend({ key: z.string() });

export const technician = z.strictObject({
  id,
  displayName: z.string(),
  spellings: z.array(
    z.strictObject({ id, spelling: z.string(), isConfirmed: z.boolean(), repairs: z.number().int() }),
  ),
  userId: id.nullable(),
  leftOn: day.nullable(),
});
export type Technician = z.infer<typeof technician>;
export const technicianList = listOf(technician);
export const changeTechnician = z
  .strictObject({
    displayName: z.string().trim().min(1).max(120),
    leftOn: day.nullable(),
    userId: id.nullable(),
  })
  .partial();
/** "This spelling means that person." */
export const assignSpelling = z.strictObject({ technicianId: id });

export const outboxMail = z.strictObject({
  id,
  purpose: z.string(),
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  state: z.enum(['queued', 'sending', 'sent', 'failed', 'unknown']),
  createdAt: instant,
  sentAt: instant.nullable(),
});
export const outboxList = listOf(outboxMail);

export const auditEntry = z.strictObject({
  id,
  at: instant,
  who: z.string(),
  action: z.string(),
  subject: z.string(),
  subjectId: z.string().nullable(),
  detail: z.unknown(),
});
export const auditList = listOf(auditEntry);

export const family = z.strictObject({
  id,
  name: z.string(),
  models: z.array(z.strictObject({ id, name: z.string() })),
});
export const familyList = listOf(family);
export const saveFamily = z.strictObject({
  name: z.string().trim().min(1).max(120),
  modelIds: z.array(id).max(500),
});
