import { sql } from 'drizzle-orm';
import { check, foreignKey, index, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { createdAt, instant, tenantKey } from './columns';
import { apiKeys, users } from './people';
import { shops } from './shops';

/** Who did what, when; only ever added to. */
export const auditLog = pgTable(
  'audit_log',
  {
    ...tenantKey(),
    at: createdAt(),
    userId: uuid('user_id'),
    apiKeyId: uuid('api_key_id'),
    action: text('action').notNull(),
    subject: text('subject').notNull(),
    subjectId: text('subject_id'),
    detail: jsonb('detail'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    index('audit_log_at').on(t.shopId, t.at, t.id),
    index('audit_log_user').on(t.userId),
    index('audit_log_key').on(t.shopId, t.apiKeyId),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    foreignKey({ columns: [t.userId], foreignColumns: [users.id] }).onDelete('no action'),
    foreignKey({
      columns: [t.shopId, t.apiKeyId],
      foreignColumns: [apiKeys.shopId, apiKeys.id],
      name: 'audit_log_key_fk',
    }).onDelete('no action'),
  ],
);

/** A message to send, and what is known of its fate. `unknown`: the process ended between sending and noting it. */
export const mails = pgTable(
  'mails',
  {
    ...tenantKey(),
    purpose: text('purpose').notNull(),
    toAddress: text('to_address').notNull(),
    subject: text('subject').notNull(),
    textBody: text('text_body').notNull(),
    state: text('state').notNull().default('queued'),
    messageId: text('message_id'),
    error: text('error'),
    createdAt: createdAt(),
    sentAt: instant('sent_at'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    index('mails_created').on(t.shopId, t.createdAt, t.id),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    check('mails_state', sql`${t.state} IN ('queued', 'sending', 'sent', 'failed', 'unknown')`),
  ],
);
