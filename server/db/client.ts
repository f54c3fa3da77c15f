import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import pg from 'pg';
import * as schema from './schema/index';

export type Database = NodePgDatabase<typeof schema> & { $client: pg.Pool };
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0];

const SERVICE_ROLE = 'witness_service';
/** Enough to count over some 100,000 repairs without files on disk. */
const WORK_MEMORY = '32MB';
/** Tables that an import works in stay in memory up to this. */
const TEMPORARY_MEMORY = '64MB';

/** A pool whose every connection works as the service role, which row-level security binds. */
export function openServiceDatabase(databaseUrl: string, maxConnections = 10): Database {
  const pool = new pg.Pool({
    connectionString: databaseUrl,
    max: maxConnections,
    options: `-c role=${SERVICE_ROLE} -c work_mem=${WORK_MEMORY} -c temp_buffers=${TEMPORARY_MEMORY}`,
    application_name: 'witness-mark',
  });
  // A broken idle connection is replaced at the next use; without a listener it would end the process.
  pool.on('error', () => undefined);
  return drizzle(pool, { schema });
}

/** Refuses to work as a role that could see more than one shop. */
export async function requireBoundRole(database: Database): Promise<void> {
  const { rows } = await database.$client.query<{ name: string; free: boolean }>(
    'SELECT rolname AS name, rolbypassrls OR rolsuper AS free FROM pg_roles WHERE rolname = current_user',
  );
  const role = rows[0];
  if (!role || role.free || role.name !== SERVICE_ROLE) {
    throw new Error(
      `The service must work as ${SERVICE_ROLE}, bound by row-level security, not as ${role?.name}.`,
    );
  }
}
