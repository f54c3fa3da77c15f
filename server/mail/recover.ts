import pg from 'pg';

/**
 * What a service that ended without order left behind, as the migrator, before any worker runs: a mail it was sending may
 * have gone out or not, and stays so for a person to judge; one that it had only picked up is picked up again.
 */
export async function recoverMails(databaseUrl: string): Promise<void> {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    await client.query(
      `UPDATE mails SET state = 'unknown', error = 'The service stopped while it was sending this.' WHERE state = 'sending'`,
    );
    await client.query(
      `UPDATE jobs.job SET state = 'created', started_on = NULL
       WHERE name = 'mail' AND state = 'active'
         AND EXISTS (SELECT FROM mails m WHERE m.state = 'queued'
           AND m.shop_id = (data->>'shopId')::uuid AND m.id = (data->>'mailId')::uuid)`,
    );
  } finally {
    await client.end();
  }
}
