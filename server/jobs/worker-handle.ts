import { fork, type ChildProcess } from 'node:child_process';
import path from 'node:path';
import type { Logger } from 'pino';
import type { JobName } from './queue';

export type WorkerHandle = { wake: (name: JobName) => void; stop: () => Promise<void> };

const SCRIPT = path.join(import.meta.dirname, 'worker-process.ts');
const RESTART_AFTER_MS = 2000;

/**
 * Forks the worker, starts it again should it end by itself, and passes wake-ups on. Before each start, what a worker that
 * ended without order left at work is settled: nobody else would, and it would look at work for ever.
 */
export async function startWorker(
  opening: { databaseUrl: string; sessionSecret: string; smtpUrl: string | undefined },
  logger: Logger,
  recover: () => Promise<unknown>,
): Promise<WorkerHandle> {
  let child: ChildProcess;
  let isStopping = false;
  const start = (): Promise<void> =>
    new Promise((resolve, reject) => {
      child = fork(SCRIPT, [], {
        execArgv: process.execArgv,
        stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
      });
      child.send(opening);
      child.once('message', () => resolve());
      child.once('exit', (code) => {
        reject(new Error(`the worker ended (${code})`));
        if (isStopping) return;
        logger.error({ code }, 'the worker ended; it is started again');
        setTimeout(() => void restart(), RESTART_AFTER_MS);
      });
    });
  const say = (error: unknown) => logger.error({ err: error }, 'worker');
  const restart = async (): Promise<void> => {
    await recover().catch(say);
    if (!isStopping) await start().catch(say);
  };
  await recover();
  await start();
  return {
    wake: (name) => {
      if (child.connected) child.send({ wake: name });
    },
    stop: () =>
      new Promise((resolve) => {
        isStopping = true;
        if (child.exitCode !== null || child.signalCode !== null) return resolve();
        child.once('exit', () => resolve());
        child.kill('SIGTERM');
      }),
  };
}
