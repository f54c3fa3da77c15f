import { sql } from 'drizzle-orm';
import type { PgTransactionConfig } from 'drizzle-orm/pg-core';
import type { Database, Transaction } from './client';

/** Runs one use case of one shop in one transaction; row-level security shows it that shop alone. */
export function withShop<Result>(
  database: Database,
  shopId: string,
  work: (tx: Transaction) => Promise<Result>,
  config?: PgTransactionConfig,
): Promise<Result> {
  return database.transaction(async (tx) => {
    await tx.execute(sql`SELECT set_config('app.shop_id', ${shopId}, true)`);
    return work(tx);
  }, config);
}
