import { randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import bcrypt from 'bcrypt';
import pg from 'pg';
import { pino } from 'pino';
import supertest from 'supertest';
import { createApp } from '../../server/app';
import { readConfig } from '../../server/config';
import { startCluster } from '../../server/db/cluster';
import { openServiceDatabase } from '../../server/db/client';
import { migrateDatabase } from '../../server/db/migrate';
import { makeLargeShop } from './large-shop';

const TIMES = 5;
const PASSWORD = 'a long enough password';
const ADDRESSES = [
  '/repairs',
  '/repairs?q=R-77777',
  '/repairs?q=squeals',
  '/repairs?cameBack=yes',
  '/units',
  '/models',
  '/components',
  '/parts',
  '/comebacks',
  '/part-life?component=Component%203',
  '/reports/month',
  '/reports/comeback-rate?by=month',
  '/reports/comeback-rate?by=model',
  '/reports/comeback-rate?by=component',
  '/reports/comeback-rate?by=technician',
  '/reports/mtbf',
];

/** How long the API takes to answer at 100,000 repairs of one shop: the middle of five answers, in milliseconds. */
export async function benchReadApi(): Promise<{ name: string; value: number; unit: string }[]> {
  const dataDir = mkdtempSync(path.join(os.tmpdir(), 'witness-mark-bench-'));
  const cluster = await startCluster({ dataDir, say: () => undefined, isThrowaway: true });
  try {
    await migrateDatabase(cluster.databaseUrl);
    const email = await arrange(cluster.databaseUrl);
    return await measure(cluster.databaseUrl, dataDir, email);
  } finally {
    cluster.stop();
    rmSync(dataDir, { recursive: true, force: true });
  }
}

/** Makes the shop and an owner, whose address it gives. */
async function arrange(databaseUrl: string): Promise<string> {
  const migrator = new pg.Client({ connectionString: databaseUrl });
  await migrator.connect();
  try {
    const shopId = randomUUID();
    const email = 'owner@bench.example';
    await migrator.query(`INSERT INTO shops (id, name) VALUES ($1, 'Bench')`, [shopId]);
    await makeLargeShop(migrator, shopId);
    await migrator.query(
      `WITH owner AS (
        INSERT INTO users (email, display_name, password_hash) VALUES ($2, 'The owner', $3) RETURNING id
      ) INSERT INTO memberships (shop_id, user_id, role) SELECT $1, id, 'owner' FROM owner`,
      [shopId, email, await bcrypt.hash(PASSWORD, 4)],
    );
    return email;
  } finally {
    await migrator.end();
  }
}

async function measure(databaseUrl: string, dataDir: string, email: string) {
  const database = openServiceDatabase(databaseUrl);
  try {
    const app = createApp({
      config: readConfig({ DATA_DIR: dataDir, NODE_ENV: 'test' }),
      database,
      logger: pino({ level: 'silent' }),
      jobs: { send: () => Promise.resolve(), wake: () => undefined },
      now: () => new Date(),
      sessionSecret: 'a secret for the bench that is long enough',
    });
    const agent = supertest.agent(app);
    await agent.post('/api/v1/session').send({ email, password: PASSWORD }).expect(200);
    const results: { name: string; value: number; unit: string }[] = [];
    for (const address of ADDRESSES) {
      const answers: number[] = [];
      for (let time = 0; time < TIMES; time++) {
        const started = performance.now();
        await agent.get(`/api/v1${address}`).expect(200);
        answers.push(performance.now() - started);
      }
      const middle = answers.sort((a, b) => a - b)[Math.floor(TIMES / 2)] ?? Number.NaN;
      results.push({ name: `GET ${address}`, value: Math.round(middle), unit: 'ms' });
    }
    return results;
  } finally {
    await database.$client.end();
  }
}
