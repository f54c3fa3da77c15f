import { fork } from 'node:child_process';
import path from 'node:path';
import { DEMO_SHOP, withMigrator } from './sign-ins';

const SCRIPT = path.join(import.meta.dirname, 'load-process.ts');

/**
 * Brings the demo shop into a database that has no shop. Simulating and importing it happens in a process of its own,
 * so that the server does not keep the memory. What a stop left half there is taken away and brought again.
 */
export async function bringDemoIfEmpty(
  opening: { databaseUrl: string; sessionSecret: string },
  say: (line: string) => void,
): Promise<void> {
  if (!(await isWanted(opening.databaseUrl))) return;
  say(`Loading the demo shop, ${DEMO_SHOP}: about half a minute`);
  const code = await new Promise<number | null>((resolve) => {
    const child = fork(SCRIPT, [], {
      execArgv: process.execArgv,
      stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
    });
    child.send(opening);
    child.once('exit', resolve);
  });
  if (code !== 0) throw new Error('The demo shop could not be loaded: see above. DEMO=0 starts without it.');
}

async function isWanted(databaseUrl: string): Promise<boolean> {
  return withMigrator(databaseUrl, async (client) => {
    await client.query(
      `DELETE FROM shops s WHERE name = $1 AND NOT EXISTS (SELECT FROM shops WHERE id <> s.id)
         AND NOT EXISTS (SELECT FROM analysis_runs r WHERE r.shop_id = s.id AND r.state = 'ready' AND r.summary->>'repairs' <> '0')`,
      [DEMO_SHOP],
    );
    const { rows } = await client.query('SELECT FROM shops LIMIT 1');
    return rows.length === 0;
  });
}
