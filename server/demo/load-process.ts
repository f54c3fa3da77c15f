import { pino } from 'pino';
import { z } from 'zod';
import { readConfig } from '../config';
import { openServiceDatabase } from '../db/client';
import { openQueues } from '../jobs/queue';
import { createJobSender } from '../jobs/sender';
import { loadDemo } from './load';

/** Loads the demo shop and ends; the parent says where, its worker computes the figures. */
const opening = z.object({ databaseUrl: z.string(), sessionSecret: z.string() });

async function load({ databaseUrl, sessionSecret }: z.infer<typeof opening>): Promise<void> {
  const config = readConfig();
  const database = openServiceDatabase(databaseUrl, 4);
  const boss = openQueues(database.$client);
  await boss.start();
  const jobs = createJobSender(boss, () => undefined);
  const logger = pino({ level: config.logLevel, name: 'demo' });
  await loadDemo({ config, database, jobs, logger, sessionSecret, now: () => new Date() }, databaseUrl);
}

process.on('SIGINT', () => undefined);
process.once('disconnect', () => process.exit(1));
process.once('message', (message) => {
  load(opening.parse(message)).then(
    () => process.exit(0),
    (error: unknown) => {
      process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
      process.exit(1);
    },
  );
});
