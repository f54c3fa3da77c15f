import { drizzle } from 'drizzle-orm/node-postgres';
import { sql } from 'drizzle-orm';
import type pg from 'pg';
import type { Database, Transaction } from '../db/client';
import * as schema from '../db/schema/index';
import { conflict } from '../http/errors';
import { sqlStateOf } from '../http/problem';

/** The transaction of one import: COPY and set-wise statements go through `client`, the rest through `tx`. */
export type ImportTransaction = { tx: Transaction; client: pg.PoolClient };

/**
 * Like `withShop`, with the connection itself beside the transaction, and the import's id set for the statements
 * that note what they change.
 */
export async function withImport<Result>(
  database: Database,
  { shopId, importId }: { shopId: string; importId: string },
  work: (transaction: ImportTransaction) => Promise<Result>,
): Promise<Result> {
  const client = await database.$client.connect();
  let failure: Error | undefined;
  try {
    return await drizzle(client, { schema }).transaction(async (tx) => {
      await tx.execute(
        sql`SELECT set_config('app.shop_id', ${shopId}, true), set_config('app.import_id', ${importId}, true)`,
      );
      return work({ tx, client });
    });
  } catch (error) {
    if (
      error instanceof Error &&
      'code' in error &&
      typeof error.code === 'string' &&
      error.code.startsWith('08')
    )
      failure = error;
    throw error;
  } finally {
    client.release(failure);
  }
}

/** As the import's statements name them. */
export const SHOP = 'current_shop_id()';
export const IMPORT = "current_setting('app.import_id')::uuid";

const LOCK_CLASS = 7461;
const LOCK_NOT_AVAILABLE = '55P03';

/**
 * Imports of one shop go in one after the other; the turn is held until the transaction ends.
 * @throws conflict where another import takes longer than can be waited for.
 */
export async function waitForTurn(client: pg.PoolClient, longestSeconds: number): Promise<void> {
  await client.query(`SET LOCAL lock_timeout = '${Math.round(longestSeconds)}s'`);
  try {
    await client.query(`SELECT pg_advisory_xact_lock(${LOCK_CLASS}, hashtext(${SHOP}::text))`);
  } catch (error) {
    if (error instanceof Error && sqlStateOf(error) === LOCK_NOT_AVAILABLE) {
      throw conflict('Another import of this shop is still at work. Try again when it is done.');
    }
    throw error;
  }
  await client.query(`SET LOCAL lock_timeout = '0'`);
}

/** Whether the import of this transaction noted any change. */
export async function changedAnything(client: pg.PoolClient): Promise<boolean> {
  const { rowCount } = await client.query(
    `SELECT FROM import_changes WHERE shop_id = ${SHOP} AND import_id = ${IMPORT} LIMIT 1`,
  );
  return rowCount === 1;
}
