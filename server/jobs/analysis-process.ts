import { pino } from 'pino';
import { z } from 'zod';
import { openServiceDatabase, requireBoundRole } from '../db/client';
import { runAnalysis } from './analysis/run-analysis';

/** One analysis in a process of its own: its memory goes when it ends. The parent says which. */
const order = z.object({ databaseUrl: z.string(), logLevel: z.string(), shopId: z.uuid(), runId: z.uuid() });

process.on('SIGINT', () => undefined);
process.once('message', (message) => {
  const { databaseUrl, logLevel, ...run } = order.parse(message);
  const database = openServiceDatabase(databaseUrl, 2);
  const logger = pino({ level: logLevel, name: 'analysis' });
  requireBoundRole(database)
    .then(() => runAnalysis({ database, logger, now: () => new Date() }, run))
    .then(
      () => process.exit(0),
      (error: unknown) => {
        logger.error({ err: error }, 'analysis');
        process.exit(1);
      },
    );
});
