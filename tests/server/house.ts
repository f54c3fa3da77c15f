import { randomBytes, randomUUID } from 'node:crypto';
import { rmSync } from 'node:fs';
import bcrypt from 'bcrypt';
import pg from 'pg';
import { pino } from 'pino';
import supertest from 'supertest';
import { inject } from 'vitest';
import { createApp } from '../../server/app';
import { readConfig } from '../../server/config';
import { openServiceDatabase } from '../../server/db/client';
import type { Deps } from '../../server/deps';
import { hashSecret } from '../../server/http/authenticate';
import { openQueues } from '../../server/jobs/queue';
import { createJobSender } from '../../server/jobs/sender';
import { startWorkers } from '../../server/jobs/workers';
import { startOutboxServer } from '../../server/mail/outbox-server';
import type { KeyScope, Role } from '../../shared/roles';
import { ROLES } from '../../shared/roles';
import { scratchFolder } from '../scratch-folder';

const PASSWORD = 'a long enough password';

/** A whole application on a database of its own, cloned from the migrated template. Close it in `afterAll`. */
export async function openHouse() {
  const templateUrl = inject('templateUrl');
  const name = `test_${randomBytes(6).toString('hex')}`;
  await onMaintenance(
    templateUrl,
    `CREATE DATABASE ${name} TEMPLATE ${new URL(templateUrl).pathname.slice(1)}`,
  );
  const migratorUrl = withDatabase(templateUrl, name);
  const dataDir = scratchFolder('house');
  const migrator = new pg.Pool({ connectionString: migratorUrl, max: 2 });
  const database = openServiceDatabase(migratorUrl);
  const outbox = await startOutboxServer(dataDir);
  const config = readConfig({
    NODE_ENV: 'test',
    DATA_DIR: dataDir,
    LOG_LEVEL: 'silent',
    SMTP_URL: outbox.smtpUrl,
  });
  const logger = pino({ level: process.env['TEST_LOG'] ?? 'silent' });
  const boss = openQueues(database.$client);
  let wake: Parameters<typeof createJobSender>[1] = () => undefined;
  const deps: Deps = {
    config,
    database,
    logger,
    jobs: createJobSender(boss, (job) => wake(job)),
    now: () => new Date(),
    sessionSecret: 'a secret for tests that is long enough',
  };
  wake = await startWorkers({ ...deps, boss, analysis: 'inline' });
  const app = createApp(deps);

  return {
    app,
    deps,
    database,
    /** As the migrator: sees every shop. For arranging and checking only. */
    migrator,
    migratorUrl,
    /** The mail server that this application sends to. */
    outbox,
    anonymous: () => supertest(app),
    makeShop: (options?: { roles?: readonly Role[] }) => makeShop(migrator, app, options?.roles ?? ROLES),
    close: async () => {
      await boss.stop({ graceful: true, wait: true, timeout: 20_000 });
      await Promise.all([database.$client.end(), migrator.end(), outbox.stop()]);
      await onMaintenance(templateUrl, `DROP DATABASE ${name} WITH (FORCE)`);
      rmSync(dataDir, { recursive: true, force: true });
    },
  };
}

export type House = Awaited<ReturnType<typeof openHouse>>;
export type TestShop = Awaited<ReturnType<House['makeShop']>>;

async function makeShop(migrator: pg.Pool, app: ReturnType<typeof createApp>, roles: readonly Role[]) {
  const id = randomUUID();
  await migrator.query('INSERT INTO shops (id, name) VALUES ($1, $2)', [id, `Shop ${id}`]);
  const hash = await bcrypt.hash(PASSWORD, 4);
  const people = new Map<Role, { userId: string; email: string }>();
  for (const role of roles) {
    const email = `${role}.${id}@shop.example`;
    const { rows } = await migrator.query<{ id: string }>(
      'INSERT INTO users (email, display_name, password_hash) VALUES ($1, $2, $3) RETURNING id',
      [email, `The ${role}`, hash],
    );
    const userId = rows[0]?.id ?? '';
    await migrator.query('INSERT INTO memberships (shop_id, user_id, role) VALUES ($1, $2, $3)', [
      id,
      userId,
      role,
    ]);
    people.set(role, { userId, email });
  }
  const person = (role: Role) => {
    const found = people.get(role);
    if (!found) throw new Error(`this shop has no ${role}`);
    return found;
  };
  return {
    id,
    password: PASSWORD,
    person,
    /** A signed-in browser of a role. */
    async as(role: Role) {
      const agent = supertest.agent(app);
      const answer = await agent
        .post('/api/v1/session')
        .send({ email: person(role).email, password: PASSWORD });
      if (answer.status !== 200) throw new Error(`sign-in of ${role} answered ${answer.status}`);
      return agent;
    },
    /** A program's key; send it as `Authorization: Bearer`. */
    async key(...scopes: KeyScope[]) {
      const key = randomBytes(24).toString('base64url');
      await migrator.query(
        'INSERT INTO api_keys (shop_id, name, key_hash, key_hint, may_import, may_read) VALUES ($1, $2, $3, $4, $5, $6)',
        [id, 'test', hashSecret(key), key.slice(-4), scopes.includes('import'), scopes.includes('read')],
      );
      return `Bearer ${key}`;
    },
  };
}

async function onMaintenance(url: string, statement: string): Promise<void> {
  const client = new pg.Client({ connectionString: withDatabase(url, 'postgres') });
  await client.connect();
  try {
    // Another test file may be cloning the template at this moment; one waits for the other.
    await client.query('SELECT pg_advisory_lock(746)');
    await client.query(statement);
  } finally {
    await client.end();
  }
}

function withDatabase(url: string, name: string): string {
  const changed = new URL(url);
  changed.pathname = `/${name}`;
  return changed.href;
}
