import bcrypt from 'bcrypt';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import type pg from 'pg';
import { withShop } from '../db/tenancy';
import type { Deps } from '../deps';
import { importFile } from '../imports/import-file';
import { requestAnalysis } from '../jobs/request-analysis';
import { BCRYPT_COST, todayIn } from '../resources/session/service';
import { arrangeShop, decideOldComebacks, sayHowReplaced } from './arrange';
import { toCsv } from './csv';
import { PART_COLUMNS, REPAIR_COLUMNS, UNIT_COLUMNS } from './native-rows';
import { DEMO_PASSWORD, DEMO_PEOPLE, DEMO_SHOP, withMigrator } from './sign-ins';
import { simulateMillrace, type Millrace } from './simulate-millrace';

const TIME_ZONE = 'America/New_York';

/**
 * Brings the demo shop in through the same import as anybody's records, and waits until its figures are there. The
 * records end on the demo day of the settings, else today.
 */
export async function loadDemo(deps: Deps, databaseUrl: string): Promise<void> {
  const { shopId, managerId } = await withMigrator(databaseUrl, createShop);
  const asOf = deps.config.demoDay ?? todayIn(TIME_ZONE, deps.now());
  const shop = simulateMillrace({ asOf });
  await importRecords(deps, shopId, managerId, shop);
  await withShop(deps.database, shopId, (tx) => arrangeShop(tx, shopId, shop));
  await withShop(deps.database, shopId, (tx) => requestAnalysis(tx, deps, shopId));
  await analysisReady(deps, shopId);
  await withShop(deps.database, shopId, (tx) => decideOldComebacks(tx, { managerId, asOf }));
}

async function createShop(client: pg.Client): Promise<{ shopId: string; managerId: string }> {
  const { rows } = await client.query<{ id: string }>(
    `INSERT INTO shops (name, time_zone) VALUES ($1, $2) RETURNING id`,
    [DEMO_SHOP, TIME_ZONE],
  );
  const shopId = rows[0]?.id ?? '';
  const hash = await bcrypt.hash(DEMO_PASSWORD, BCRYPT_COST);
  let managerId = '';
  for (const { email, name, role } of DEMO_PEOPLE) {
    const person = await client.query<{ id: string }>(
      `INSERT INTO users (email, display_name, password_hash) VALUES ($1, $2, $3)
       ON CONFLICT (email) DO UPDATE SET password_hash = EXCLUDED.password_hash RETURNING id`,
      [email, name, hash],
    );
    const userId = person.rows[0]?.id ?? '';
    if (role === 'service_manager') managerId = userId;
    await client.query('INSERT INTO memberships (shop_id, user_id, role) VALUES ($1, $2, $3)', [
      shopId,
      userId,
      role,
    ]);
  }
  return { shopId, managerId };
}

async function importRecords(deps: Deps, shopId: string, userId: string, shop: Millrace): Promise<void> {
  const folder = await mkdtemp(path.join(os.tmpdir(), 'witness-mark-demo-'));
  const files = [
    { kind: 'units', text: toCsv(shop.units, UNIT_COLUMNS) },
    { kind: 'parts', text: toCsv(shop.parts, PART_COLUMNS) },
    { kind: 'repairs', text: toCsv(shop.repairs, REPAIR_COLUMNS) },
  ] as const;
  try {
    for (const { kind, text } of files) {
      const fileName = `millrace-${kind}.csv`;
      const filePath = path.join(folder, fileName);
      await writeFile(filePath, text);
      const done = await importFile(deps, { shopId, kind, filePath, fileName, source: 'shell', userId });
      if (done.status !== 'done' || done.rejected > 0) {
        throw new Error(`The demo's ${kind} did not go in: ${done.error ?? `${done.rejected} rejected`}`);
      }
      if (kind === 'parts') await withShop(deps.database, shopId, sayHowReplaced);
    }
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

async function analysisReady(deps: Deps, shopId: string): Promise<void> {
  for (;;) {
    const { rows } = await withShop(deps.database, shopId, (tx) =>
      tx.execute<{ state: string; error: string | null }>(
        'SELECT state, error FROM analysis_runs ORDER BY requested_at DESC, id LIMIT 1',
      ),
    );
    if (rows[0]?.state === 'ready') return;
    if (rows[0]?.state === 'failed') throw new Error(`The demo's analysis failed: ${rows[0].error}`);
    await wait(250);
  }
}
