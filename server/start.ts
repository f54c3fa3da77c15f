import type { Server } from 'node:http';
import { pino } from 'pino';
import { createApp } from './app';
import { buildClientIfStale } from './client-build';
import { readConfig, type Config } from './config';
import { startCluster, type Cluster } from './db/cluster';
import { openServiceDatabase, requireBoundRole } from './db/client';
import { migrateDatabase } from './db/migrate';
import { bringDemoIfEmpty } from './demo/bring-demo';
import { DEMO_PASSWORD, demoSignIns } from './demo/sign-ins';
import type { Deps } from './deps';
import { recoverImports } from './imports/recover-imports';
import { recoverAnalyses } from './jobs/analysis/recover';
import { openQueues } from './jobs/queue';
import { createJobSender } from './jobs/sender';
import { startWorker } from './jobs/worker-handle';
import { recoverMails } from './mail/recover';
import { startOutboxServer } from './mail/outbox-server';
import { sessionSecretOf } from './secret';

const say = (line: string) => void process.stdout.write(`${line}\n`);

/** Everything that `npm start` brings up, in order; what it started ends in reverse. */
async function start(config: Config): Promise<{ end: () => Promise<void>; databaseUrl: string }> {
  const endings: (() => Promise<void> | void)[] = [];
  const end = async () => {
    for (const ending of endings.reverse()) await ending();
    endings.length = 0;
  };
  try {
    const logger = pino({ level: config.logLevel });
    const cluster: Cluster | undefined = config.databaseUrl
      ? undefined
      : await startCluster({ dataDir: config.dataDir, say });
    if (cluster) endings.push(cluster.stop);
    const databaseUrl = config.databaseUrl ?? cluster?.databaseUrl ?? '';
    await migrateDatabase(databaseUrl);
    buildClientIfStale(say);

    const database = openServiceDatabase(databaseUrl);
    endings.push(() => database.$client.end());
    await requireBoundRole(database);
    const smtpUrl = config.smtpUrl ?? (await keepOutbox(config, endings));
    const sessionSecret = sessionSecretOf(config);
    const recover = () =>
      Promise.all([recoverImports(databaseUrl), recoverAnalyses(databaseUrl), recoverMails(databaseUrl)]);
    const worker = await startWorker({ databaseUrl, sessionSecret, smtpUrl }, logger, recover);
    endings.push(worker.stop);
    const boss = openQueues(database.$client);
    boss.on('error', (error) => logger.error({ err: error }, 'queue'));
    await boss.start();
    endings.push(() => boss.stop({ graceful: true, wait: true, timeout: 5000 }));
    const deps: Deps = {
      config,
      database,
      logger,
      sessionSecret,
      jobs: createJobSender(boss, worker.wake),
      now: () => new Date(),
    };
    if (config.demo && config.environment !== 'production') {
      await bringDemoIfEmpty({ databaseUrl, sessionSecret }, say);
    }

    const server = createApp(deps).listen(config.port, config.host);
    await new Promise<void>((resolve, reject) => server.once('listening', resolve).once('error', reject));
    endings.push(() => drain(server));
    return { end, databaseUrl };
  } catch (error) {
    await end();
    throw error;
  }
}

/** Where no mail server is set, mail goes to a local one that keeps it for the owner to read. */
async function keepOutbox(config: Config, endings: (() => Promise<void> | void)[]): Promise<string> {
  const outbox = await startOutboxServer(config.dataDir);
  endings.push(outbox.stop);
  return outbox.smtpUrl;
}

function drain(server: Server): Promise<void> {
  return new Promise((resolve) => {
    server.close(() => resolve());
    server.closeIdleConnections();
    setTimeout(() => server.closeAllConnections(), 3000).unref();
  });
}

async function main() {
  const config = readConfig();
  const starting = start(config);
  let isEnding = false;
  const stop = () => {
    if (isEnding) return;
    isEnding = true;
    say('\nStopping');
    // What is still being started is let come up first, so that it can be ended in order.
    void starting.then(({ end }) => end()).then(() => process.exit(0));
  };
  process.on('SIGINT', stop);
  process.on('SIGTERM', stop);
  const { databaseUrl } = await starting;
  if (isEnding) return;
  say(`\nWitness Mark is at ${config.publicUrl}`);
  const signIns = config.demo && config.environment !== 'production' ? await demoSignIns(databaseUrl) : [];
  if (signIns.length > 0) {
    say(`Demo sign-ins (password ${DEMO_PASSWORD}):`);
    for (const { email, role } of signIns) say(`  ${email}  ${role}`);
  }
  say('Ctrl-C stops it.');
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
