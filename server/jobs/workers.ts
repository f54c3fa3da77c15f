import type PgBoss from 'pg-boss';
import type { Deps } from '../deps';
import { runImport } from '../imports/run-import';
import { deliverMail } from '../mail/deliver';
import { handleAnalysis } from './analysis/handle';
import type { JobName, JobPayloads } from './queue';

export type WorkerDeps = Deps & {
  boss: PgBoss;
  /** Where an analysis runs: in a child process, so that it neither blocks nor counts here, or in this one. */
  analysis: 'child' | 'inline';
};

type Handlers = { [Name in JobName]: (deps: WorkerDeps, payload: JobPayloads[Name]) => Promise<void> };

const handlers: Partial<Handlers> = { import: runImport, analysis: handleAnalysis, mail: deliverMail };

/** Starts working off the queues; the answer wakes the worker of a queue at once. */
export async function startWorkers(deps: WorkerDeps): Promise<(name: JobName) => void> {
  const { boss, logger } = deps;
  boss.on('error', (error) => logger.error({ err: error }, 'queue'));
  await boss.start();
  const workers = new Map<JobName, string>();
  const work = async <Name extends JobName>(name: Name) => {
    const handler = handlers[name];
    if (!handler) return;
    const id = await boss.work<JobPayloads[Name]>(name, { pollingIntervalSeconds: 2 }, async (jobs) => {
      for (const job of jobs) await handler(deps, job.data);
    });
    workers.set(name, id);
  };
  await work('import');
  await work('analysis');
  await work('mail');
  return (name) => {
    const id = workers.get(name);
    if (id) boss.notifyWorker(id);
  };
}
