import { sql } from 'drizzle-orm';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { pino } from 'pino';
import { z } from 'zod';
import { IMPORT_KINDS, mapping as mappingSchema } from '../../shared/imports';
import { readConfig } from '../config';
import { openServiceDatabase } from '../db/client';
import { AppError } from '../http/errors';
import { importFile } from '../imports/import-file';
import { openQueues } from '../jobs/queue';
import { createJobSender } from '../jobs/sender';
import { openForCommand, sayToPerson } from './open-database';

const USAGE = `npm run import -- FILE --shop NAME [--kind ${IMPORT_KINDS.join('|')}] [--mapping FILE] [--dry-run]`;
const SOME_REJECTED = 1;
const FAILED = 2;

/** Imports a file from a shell: 0 where all went in, 1 where some records were rejected, 2 where it failed. */
async function main(args: readonly string[]): Promise<number> {
  const { values, positionals } = parseArgs({
    args: [...args],
    allowPositionals: true,
    options: {
      shop: { type: 'string' },
      kind: { type: 'string', default: 'repairs' },
      mapping: { type: 'string' },
      'dry-run': { type: 'boolean', default: false },
    },
  });
  const [file] = positionals;
  const kind = z.enum(IMPORT_KINDS).safeParse(values.kind);
  if (file === undefined || positionals.length > 1 || values.shop === undefined || !kind.success)
    throw new Error(USAGE);
  const from = (name: string) => path.resolve(readConfig().calledFrom, name);
  const mapping =
    values.mapping === undefined
      ? undefined
      : mappingSchema.parse(JSON.parse(await readFile(from(values.mapping), 'utf8')));

  const { config, migratorUrl, close } = await openForCommand(sayToPerson);
  const database = openServiceDatabase(migratorUrl, 4);
  const boss = openQueues(database.$client);
  try {
    await boss.start();
    const { rows } = await database.execute<{ id: string | null }>(
      sql`SELECT shop_id_by_name(${values.shop}) AS id`,
    );
    const shopId = rows[0]?.id;
    if (!shopId) throw new Error(`There is no shop named ${values.shop}.`);
    const logger = pino({ level: config.logLevel }, pino.destination(2));
    const jobs = createJobSender(boss, () => undefined);
    const deps = { config, database, logger, jobs, now: () => new Date(), sessionSecret: '' };
    const filePath = from(file);
    const done = await importFile(deps, {
      shopId,
      kind: kind.data,
      filePath,
      source: 'shell',
      dryRun: values['dry-run'],
      ...(mapping ? { mapping } : {}),
    });
    if (done.status !== 'done') throw new Error(done.error ?? 'The import failed.');
    const { rowsRead, created, updated, unchanged, rejected } = done;
    console.log(
      `${rowsRead} rows read: ${created} created, ${updated} updated, ${unchanged} unchanged, ${rejected} rejected`,
    );
    for (const { text, count } of done.remarks) console.log(`  ${count} ${text}`);
    if (rejected > 0) sayToPerson(`The rejected rows: GET /api/v1/imports/${done.id}/rejected.csv`);
    return rejected > 0 ? SOME_REJECTED : 0;
  } finally {
    await boss.stop({ graceful: false, wait: true });
    await database.$client.end();
    close();
  }
}

main(process.argv.slice(2)).then(
  (code) => {
    process.exitCode = code;
  },
  (error: unknown) => {
    sayToPerson(error instanceof Error ? error.message : String(error));
    if (error instanceof AppError) for (const { message } of error.errors) sayToPerson(`  ${message}`);
    process.exitCode = FAILED;
  },
);
