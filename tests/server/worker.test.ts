import { execFileSync } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { setTimeout as wait } from 'node:timers/promises';
import { afterAll, beforeAll, expect, it, vi } from 'vitest';
import { recoverImports } from '../../server/imports/recover-imports';
import { startWorker, type WorkerHandle } from '../../server/jobs/worker-handle';
import { openHouse, type House } from './house';

let house: House;
let worker: WorkerHandle;

beforeAll(async () => {
  house = await openHouse();
  // The worker is forked without the test runner, which reads TypeScript by itself.
  vi.stubEnv('NODE_OPTIONS', '--import tsx');
  vi.stubEnv('LOG_LEVEL', 'silent');
  worker = await startWorker(
    { databaseUrl: house.migratorUrl, sessionSecret: house.deps.sessionSecret, smtpUrl: undefined },
    house.deps.logger,
    () => recoverImports(house.migratorUrl),
  );
});
afterAll(async () => {
  await worker.stop();
  vi.unstubAllEnvs();
  await house.close();
});

const pidOfWorker = () => {
  try {
    return Number(execFileSync('pgrep', ['-P', String(process.pid), '-f', 'worker-process.ts']).toString());
  } catch {
    return undefined;
  }
};

it('comes back where it ended without order, and says of its import that nothing went in', async () => {
  const shop = await house.makeShop({ roles: ['owner'] });
  const owner = await shop.as('owner');
  const id = randomUUID();
  await house.migrator.query(
    `INSERT INTO imports (shop_id, id, kind, source, status) VALUES ($1, $2, 'repairs', 'file', 'running')`,
    [shop.id, id],
  );
  const first = pidOfWorker();
  expect(first).toBeDefined();
  process.kill(first ?? 0, 'SIGKILL');
  let second: number | undefined;
  while (second === undefined || second === first) {
    await wait(100);
    second = pidOfWorker();
  }
  const { body } = await owner.get(`/api/v1/imports/${id}`).expect(200);
  expect(body).toMatchObject({
    status: 'failed',
    error: expect.stringContaining('Nothing of it was taken in'),
  });
});
