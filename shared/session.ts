import { z } from 'zod';
import { id, instant, listOf } from './basics';
import { ROLES } from './roles';

export const email = z.string().trim().toLowerCase().max(254).pipe(z.email('This is not an e-mail address.'));
export const newPassword = z
  .string()
  .min(12, 'Use at least 12 characters.')
  .refine((value) => new TextEncoder().encode(value).length <= 72, 'Use at most 72 bytes.');

export const signIn = z.strictObject({
  email: z.string().trim().toLowerCase().min(1).max(254),
  password: z.string().min(1).max(1000),
});
export const changeShop = z.strictObject({ shopId: id });
export const askReset = z.strictObject({ email });
export const setPassword = z.strictObject({ token: z.string().min(20).max(200), password: newPassword });

export const shopOfSession = z.strictObject({
  id,
  name: z.string(),
  role: z.enum(ROLES),
  timeZone: z.string(),
  locale: z.string(),
  currency: z.string(),
  windowDays: z.number().int(),
  /** Today in the shop's zone. */
  today: z.iso.date(),
});

export const session = z.strictObject({
  user: z.strictObject({ id, email: z.string(), displayName: z.string() }),
  shop: shopOfSession,
  shops: z.array(z.strictObject({ id, name: z.string(), role: z.enum(ROLES) })),
});
export type Session = z.infer<typeof session>;

export const sessionListed = z.strictObject({
  id,
  isCurrent: z.boolean(),
  userAgent: z.string(),
  createdAt: instant,
  lastSeenAt: instant,
});
export const sessionList = listOf(sessionListed);
