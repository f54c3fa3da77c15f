import { pino } from 'pino';
import { z } from 'zod';
import { readConfig } from '../config';
import { openServiceDatabase, requireBoundRole } from '../db/client';
import { openQueues, JOB_NAMES } from './queue';
import { createJobSender } from './sender';
import { startWorkers } from './workers';

/**
 * The process that works off the queues, forked by the server: imports and mail here, each analysis in a child of
 * its own. The parent sends what to connect to first, then wakes queues by name; it ends when the parent does.
 */
const opening = z.object({
  databaseUrl: z.string(),
  sessionSecret: z.string(),
  smtpUrl: z.string().optional(),
});
const waking = z.object({ wake: z.enum(JOB_NAMES) });

async function work({ databaseUrl, sessionSecret, smtpUrl }: z.infer<typeof opening>) {
  const config = { ...readConfig(), databaseUrl, ...(smtpUrl ? { smtpUrl } : {}) };
  const logger = pino({ level: config.logLevel, name: 'worker' });
  const database = openServiceDatabase(databaseUrl, 6);
  await requireBoundRole(database);
  const boss = openQueues(database.$client);
  let wake: (name: (typeof JOB_NAMES)[number]) => void = () => undefined;
  const jobs = createJobSender(boss, (name) => wake(name));
  wake = await startWorkers({
    config,
    database,
    jobs,
    logger,
    sessionSecret,
    now: () => new Date(),
    boss,
    analysis: 'child',
  });

  let isEnding = false;
  const end = async () => {
    if (isEnding) return;
    isEnding = true;
    await boss.stop({ graceful: true, wait: true, timeout: 20_000 });
    await database.$client.end();
    process.exit(0);
  };
  process.on('message', (message) => {
    const asked = waking.safeParse(message);
    if (asked.success) wake(asked.data.wake);
  });
  process.on('disconnect', () => void end());
  process.on('SIGTERM', () => void end());
  process.send?.({ ready: true });
}

// Ctrl-C reaches the whole group; the parent decides when this one ends.
process.on('SIGINT', () => undefined);
process.once('message', (message) => {
  work(opening.parse(message)).catch((error: unknown) => {
    process.stderr.write(
      `The worker could not start: ${error instanceof Error ? error.message : String(error)}\n`,
    );
    process.exit(1);
  });
});
