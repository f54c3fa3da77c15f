import pg from 'pg';

/**
 * Imports that a crash left running took nothing in, since each is one transaction: they are called failed, and say so.
 * Queued ones wait in the queue still. Runs as the migrator, for all shops, before the workers start.
 */
export async function recoverImports(migratorUrl: string): Promise<number> {
  const client = new pg.Client({ connectionString: migratorUrl });
  await client.connect();
  try {
    const { rowCount } = await client.query(`
      UPDATE imports SET status = 'failed', finished_at = now(),
        error = 'The program was stopped while this import ran. Nothing of it was taken in: send the file again.'
      WHERE status = 'running'`);
    return rowCount ?? 0;
  } finally {
    await client.end();
  }
}
