import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import path from 'node:path';
import pg from 'pg';
import { createQueues } from '../jobs/queue';

const MIGRATIONS = path.resolve(import.meta.dirname, '../../drizzle');
const ADVISORY_LOCK = 7_460_001;

/** Brings a database up to date, as its migrator; two processes that start at once wait for each other. */
export async function migrateDatabase(databaseUrl: string): Promise<void> {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    await client.query('SELECT pg_advisory_lock($1)', [ADVISORY_LOCK]);
    const { rows } = await client.query<{ may: boolean }>(
      'SELECT rolbypassrls OR rolsuper AS may FROM pg_roles WHERE rolname = current_user',
    );
    if (!rows[0]?.may) throw new Error('DATABASE_URL must name a role with BYPASSRLS: it is the migrator’s.');
    await migrate(drizzle(client), { migrationsFolder: MIGRATIONS });
    await createQueues(databaseUrl, client);
  } finally {
    await client.end();
  }
}
