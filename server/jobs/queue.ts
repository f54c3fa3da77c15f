import PgBoss from 'pg-boss';
import type pg from 'pg';

/** The background work there is; each payload holds ids and nothing else. */
export type JobPayloads = {
  import: { shopId: string; importId: string };
  analysis: { shopId: string; runId: string };
  mail: { shopId: string; mailId: string };
};
export type JobName = keyof JobPayloads;

export const JOB_NAMES = ['import', 'analysis', 'mail'] as const satisfies readonly JobName[];
const SCHEMA = 'jobs';

const options = { schema: SCHEMA, application_name: 'witness-mark-jobs' } as const;

/** Makes the queues' tables, as the migrator, and lets the service use them. */
export async function createQueues(databaseUrl: string, client: pg.Client): Promise<void> {
  const boss = new PgBoss({
    ...options,
    connectionString: databaseUrl,
    supervise: false,
    schedule: false,
    max: 1,
  });
  boss.on('error', () => undefined);
  await boss.start();
  for (const name of JOB_NAMES) {
    if (!(await boss.getQueue(name)))
      await boss.createQueue(name, { name, retryLimit: 0, expireInSeconds: 6 * 3600 });
  }
  await boss.stop({ graceful: false, wait: true });
  await client.query(`
    GRANT USAGE ON SCHEMA ${SCHEMA} TO witness_service;
    GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA ${SCHEMA} TO witness_service;
    GRANT EXECUTE ON ALL FUNCTIONS IN SCHEMA ${SCHEMA} TO witness_service;`);
}

/** A handle on the queues for the service: made by `createQueues`, used as the service role. */
export function openQueues(pool: pg.Pool): PgBoss {
  return new PgBoss({
    ...options,
    db: { executeSql: (text, values) => pool.query(text, values) },
    migrate: false,
    maintenanceIntervalSeconds: 300,
  });
}
