import { rmSync } from 'node:fs';
import type { TestProject } from 'vitest/node';
import { startCluster } from '../../server/db/cluster';
import { migrateDatabase } from '../../server/db/migrate';
import { scratchFolder } from '../scratch-folder';

declare module 'vitest' {
  export interface ProvidedContext {
    /** Connects as the migrator to the migrated database that tests clone. */
    templateUrl: string;
  }
}

/** One cluster of its own for a run of tests, on a free port, gone afterwards. */
export default async function setup(project: TestProject) {
  const dataDir = scratchFolder('test');
  const cluster = await startCluster({ dataDir, say: () => undefined, isThrowaway: true });
  await migrateDatabase(cluster.databaseUrl);
  project.provide('templateUrl', cluster.databaseUrl);
  return () => {
    cluster.stop();
    rmSync(dataDir, { recursive: true, force: true });
  };
}
