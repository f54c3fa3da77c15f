import { mkdtempSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import type { TestProject } from 'vitest/node';
import { startCluster } from '../../server/db/cluster';
import { migrateDatabase } from '../../server/db/migrate';

declare module 'vitest' {
  export interface ProvidedContext {
    /** Connects as the migrator to the migrated database that tests clone. */
    templateUrl: string;
  }
}

/** One cluster of its own for a run of tests, on a free port, gone afterwards. */
export default async function setup(project: TestProject) {
  const dataDir = mkdtempSync(path.join(os.tmpdir(), 'witness-mark-test-'));
  const cluster = await startCluster({ dataDir, say: () => undefined, isThrowaway: true });
  await migrateDatabase(cluster.databaseUrl);
  project.provide('templateUrl', cluster.databaseUrl);
  return () => {
    cluster.stop();
    rmSync(dataDir, { recursive: true, force: true });
  };
}
