import { fork } from 'node:child_process';
import path from 'node:path';
import type { JobPayloads } from '../queue';
import type { WorkerDeps } from '../workers';
import { failAnalysis, runAnalysis } from './run-analysis';

const SCRIPT = path.join(import.meta.dirname, '../analysis-process.ts');

/** Works off one analysis, here or in a child process. */
export async function handleAnalysis(deps: WorkerDeps, payload: JobPayloads['analysis']): Promise<void> {
  const { databaseUrl, logLevel } = deps.config;
  if (deps.analysis === 'inline' || databaseUrl === undefined) return runAnalysis(deps, payload);
  const code = await new Promise<number | null>((resolve) => {
    const child = fork(SCRIPT, [], {
      execArgv: process.execArgv,
      stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
    });
    child.send({ databaseUrl, logLevel, ...payload });
    child.once('exit', resolve);
  });
  if (code === 0) return;
  deps.logger.error({ code, ...payload }, 'the analysis process ended early');
  await failAnalysis(deps, payload);
}
