import { readConfig, type Config } from '../config';
import { startCluster } from '../db/cluster';
import { migrateDatabase } from '../db/migrate';

export type CommandDatabase = {
  config: Config;
  /** Connects as the migrator, to a database that is up to date. */
  migratorUrl: string;
  /** Stops what was started for this command, and nothing else. */
  close: () => void;
};

/** The database as a command finds it: the one of the settings, else the local cluster, started where it is stopped. */
export async function openForCommand(say: (line: string) => void): Promise<CommandDatabase> {
  const config = readConfig();
  const cluster = config.databaseUrl ? undefined : await startCluster({ dataDir: config.dataDir, say });
  const migratorUrl = config.databaseUrl ?? cluster?.databaseUrl ?? '';
  const close = () => cluster?.stop();
  try {
    await migrateDatabase(migratorUrl);
  } catch (error) {
    close();
    throw error;
  }
  return { config, migratorUrl, close };
}

/** Says something to the person at the shell, apart from what the command answers. */
export const sayToPerson = (line: string) => void process.stderr.write(`${line}\n`);

/** Runs a command to its end; what goes wrong is said in one line, and the exit code is 2. */
export function runCommand(work: () => Promise<void>): void {
  work().catch((error: unknown) => {
    sayToPerson(error instanceof Error ? error.message : String(error));
    process.exitCode = 2;
  });
}
