import { numeric, timestamp, uuid } from 'drizzle-orm/pg-core';

/** Every tenant table has these two first; together they are its primary key. */
export const tenantKey = () => ({
  shopId: uuid('shop_id').notNull(),
  id: uuid('id').notNull().defaultRandom(),
});

export const instant = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' });

export const createdAt = () => instant('created_at').notNull().defaultNow();

/** Readings of an hour meter, in hours. */
export const meterHours = (name: string) => numeric(name, { precision: 10, scale: 2, mode: 'number' });
