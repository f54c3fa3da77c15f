import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  date,
  foreignKey,
  index,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { createdAt, instant, tenantKey } from './columns';
import { shops } from './shops';

/** Someone who can sign in; belongs to shops through memberships. Global. */
export const users = pgTable('users', {
  id: uuid('id').primaryKey().defaultRandom(),
  email: text('email').notNull().unique(),
  displayName: text('display_name').notNull(),
  passwordHash: text('password_hash'),
  createdAt: createdAt(),
});

/** A sign-in that can be revoked; the cookie's token names it and nothing else. Global. */
export const sessions = pgTable(
  'sessions',
  {
    id: uuid('id').primaryKey().defaultRandom(),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    shopId: uuid('shop_id').references(() => shops.id, { onDelete: 'cascade' }),
    createdAt: createdAt(),
    lastSeenAt: instant('last_seen_at').notNull().defaultNow(),
    expiresAt: instant('expires_at').notNull(),
    revokedAt: instant('revoked_at'),
    userAgent: text('user_agent').notNull().default(''),
  },
  (t) => [index('sessions_user').on(t.userId), index('sessions_shop').on(t.shopId)],
);

/** A link sent by mail: to set a password after an invitation, or to reset one. Global, single use. */
export const passwordTokens = pgTable(
  'password_tokens',
  {
    id: uuid('id').primaryKey().defaultRandom(),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    purpose: text('purpose').notNull(),
    tokenHash: text('token_hash').notNull().unique(),
    createdAt: createdAt(),
    expiresAt: instant('expires_at').notNull(),
    usedAt: instant('used_at'),
  },
  (t) => [
    index('password_tokens_user').on(t.userId),
    check('password_tokens_purpose', sql`${t.purpose} IN ('invite', 'reset')`),
  ],
);

export const memberships = pgTable(
  'memberships',
  {
    ...tenantKey(),
    userId: uuid('user_id').notNull(),
    role: text('role').notNull(),
    createdAt: createdAt(),
    disabledAt: instant('disabled_at'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('memberships_user').on(t.shopId, t.userId),
    index('memberships_by_user').on(t.userId),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    foreignKey({ columns: [t.userId], foreignColumns: [users.id] }).onDelete('cascade'),
    check(
      'memberships_role',
      sql`${t.role} IN ('owner', 'service_manager', 'technician', 'counter', 'accountant')`,
    ),
  ],
);

/** A technician as the records name them, who may or may not sign in. */
export const technicians = pgTable(
  'technicians',
  {
    ...tenantKey(),
    displayName: text('display_name').notNull(),
    userId: uuid('user_id'),
    leftOn: date('left_on', { mode: 'string' }),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('technicians_user').on(t.shopId, t.userId),
    index('technicians_by_user').on(t.userId),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    foreignKey({ columns: [t.userId], foreignColumns: [users.id] }).onDelete('no action'),
  ],
);

/** A spelling found in the records, and whom it means. Each new spelling first means a technician of its own. */
export const technicianNames = pgTable(
  'technician_names',
  {
    ...tenantKey(),
    spelling: text('spelling').notNull(),
    spellingKey: text('spelling_key').notNull(),
    technicianId: uuid('technician_id').notNull(),
    confirmedByUserId: uuid('confirmed_by_user_id'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('technician_names_spelling').on(t.shopId, t.spellingKey),
    index('technician_names_technician').on(t.shopId, t.technicianId),
    index('technician_names_confirmed_by').on(t.confirmedByUserId),
    foreignKey({
      columns: [t.shopId, t.technicianId],
      foreignColumns: [technicians.shopId, technicians.id],
      name: 'technician_names_technician_fk',
    }).onDelete('cascade'),
    foreignKey({ columns: [t.confirmedByUserId], foreignColumns: [users.id] }).onDelete('no action'),
  ],
);

export const apiKeys = pgTable(
  'api_keys',
  {
    ...tenantKey(),
    name: text('name').notNull(),
    keyHash: text('key_hash').notNull().unique(),
    keyHint: text('key_hint').notNull(),
    mayImport: boolean('may_import').notNull(),
    mayRead: boolean('may_read').notNull(),
    createdAt: createdAt(),
    lastUsedAt: instant('last_used_at'),
    revokedAt: instant('revoked_at'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    check('api_keys_scope', sql`${t.mayImport} OR ${t.mayRead}`),
  ],
);
