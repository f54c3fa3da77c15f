import pg from 'pg';

/** At the start, as the migrator: an analysis that a stop interrupted is asked for again by the next import or at once. */
export async function recoverAnalyses(databaseUrl: string): Promise<void> {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    await client.query(`
      WITH interrupted AS (
        UPDATE analysis_runs SET state = 'pending', started_at = NULL WHERE state = 'running' RETURNING shop_id, id
      )
      UPDATE jobs.job j SET state = 'created', started_on = NULL
      FROM interrupted i
      WHERE j.name = 'analysis' AND j.state = 'active' AND j.data->>'runId' = i.id::text`);
  } finally {
    await client.end();
  }
}
