import { sql } from 'drizzle-orm';
import type PgBoss from 'pg-boss';
import type { Transaction } from '../db/client';
import type { JobName, JobPayloads } from './queue';

/** Puts background work into the use case's own transaction; `wake` tells the worker not to wait for its next look. */
export type JobSender = {
  send: <Name extends JobName>(tx: Transaction, name: Name, payload: JobPayloads[Name]) => Promise<void>;
  wake: (name: JobName) => void;
};

export function createJobSender(boss: PgBoss, wake: (name: JobName) => void): JobSender {
  return {
    async send(tx, name, payload) {
      await boss.send(name, payload, {
        db: { executeSql: async (text, values) => ({ rows: await executeOn(tx, text, values) }) },
      });
    },
    wake,
  };
}

/** pg-boss speaks numbered parameters; Drizzle wants the values in place. */
async function executeOn(tx: Transaction, text: string, values: readonly unknown[] = []): Promise<unknown[]> {
  const chunks = text
    .split(/\$(\d+)/)
    .map((piece, at) => (at % 2 === 0 ? sql.raw(piece) : sql`${values[Number(piece) - 1] ?? null}`));
  const result = await tx.execute(sql.join(chunks));
  return result.rows;
}
