import { rmSync } from 'node:fs';
import { writeFile } from 'node:fs/promises';
import path from 'node:path';
import pg from 'pg';
import { pino } from 'pino';
import { readConfig } from '../../server/config';
import { openServiceDatabase } from '../../server/db/client';
import { startCluster } from '../../server/db/cluster';
import { migrateDatabase } from '../../server/db/migrate';
import { importFile } from '../../server/imports/import-file';
import { takeBatch } from '../../server/resources/repairs-batch/service';
import { scratchFolder } from '../scratch-folder';

const REPAIRS = Number(process.argv[2] ?? 25_000);
const HEADER =
  'repair_number,ticket_type,opened_on,ready_on,closed_on,picked_up_on,unit_serial,customer_ref,customer_name,customer_phone,maker,model,product_type,engine_maker,engine_model,engine_serial,in_service_on,use_class,meter_hours,complaint,cause,correction,technician,line_kind,part_number,part_description,component,line_reason,quantity,part_amount,part_cost,labor_op,labor_hours,labor_amount,pay_type';

/** Rows as a shop's export has them: 2.2 lines a repair, a machine seen about four times. */
function* rowsOf(count: number): Generator<string[]> {
  for (let at = 0; at < count; at += 1) {
    const unit = (at * 7919) % Math.max(1, Math.floor(count / 4));
    const day = new Date(Date.UTC(2018, 0, 1 + (at % 2500))).toISOString().slice(0, 10);
    const head = `R-${at},repair,${day},${day},${day},${day},SN${unit},C${unit % 3000},Customer ${unit % 3000},555-01${unit % 100},Maker ${unit % 12},M-${unit % 60},zero_turn,Engines,E-${unit % 9},ES${unit},2017-05-01,homeowner,${100 + (at % 900)}.5,"Deck will not engage, belt squeals",Worn part found on inspection,"Replaced the part, tested under load",Tech ${at % 6}`;
    const lines = 1 + (at % 5 === 0 ? 2 : 1) + (at % 10 === 0 ? 1 : 0);
    yield Array.from({ length: Math.min(lines, 3) }, (_, line) => {
      const part = (at + line * 31) % 400;
      return `${head},part,P-${part},Part number ${part},Component ${part % 40},${line === 0 ? 'failed' : ''},1,${20 + (part % 80)}.50,${10 + (part % 40)}.25,OP-${part % 20},${line === 0 ? '1.2' : ''},${line === 0 ? '114.00' : ''},customer`;
    });
  }
}

const batchRepair = (lineCount: number, at: number) => ({
  repairNumber: `B-${at}`,
  openedOn: '2024-03-01',
  closedOn: '2024-03-04',
  unit: { serial: `SN${at % 4000}`, maker: `Maker ${at % 12}`, model: `M-${at % 60}` },
  customerRef: `C${at % 3000}`,
  meterHours: 100 + (at % 900),
  complaint: 'Deck will not engage, belt squeals',
  technician: `Tech ${at % 6}`,
  lines: Array.from({ length: lineCount }, (_, line) => ({
    partNumber: `P-${(at + line) % 400}`,
    component: `Component ${at % 40}`,
    reason: 'failed',
    amountCents: 4250,
    laborHours: 0.5,
  })),
});

async function measure<Result>(what: string, rows: number, work: () => Promise<Result>): Promise<Result> {
  const started = performance.now();
  const result = await work();
  const seconds = (performance.now() - started) / 1000;
  console.log(
    JSON.stringify({
      what,
      rows,
      seconds: Number(seconds.toFixed(2)),
      rowsPerSecond: Math.round(rows / seconds),
      residentMb: Math.round(process.memoryUsage().rss / 1e6),
    }),
  );
  return result;
}

const dataDir = scratchFolder('bench');
const cluster = await startCluster({ dataDir, say: () => undefined });
try {
  await migrateDatabase(cluster.databaseUrl);
  const migrator = new pg.Client({ connectionString: cluster.databaseUrl });
  await migrator.connect();
  const { rows: shops } = await migrator.query<{ id: string }>(
    `INSERT INTO shops (name) VALUES ('Bench') RETURNING id`,
  );
  const shopId = shops[0]?.id ?? '';
  const { rows: keys } = await migrator.query<{ id: string }>(
    `INSERT INTO api_keys (shop_id, name, key_hash, key_hint, may_import, may_read) VALUES ($1, 'bench', 'x', 'x', true, false) RETURNING id`,
    [shopId],
  );
  await migrator.end();
  const database = openServiceDatabase(cluster.databaseUrl);
  const deps = {
    config: readConfig({ DATA_DIR: dataDir, NODE_ENV: 'test' }),
    database,
    logger: pino({ level: 'error' }),
    jobs: { send: () => Promise.resolve(), wake: () => undefined },
    now: () => new Date(),
    sessionSecret: '',
  };
  const filePath = path.join(dataDir, 'repairs.csv');
  const rows = [...rowsOf(REPAIRS)];
  const lines = rows.flat();
  await writeFile(filePath, [HEADER, ...lines].join('\r\n'));
  const run = (what: string) =>
    measure(what, lines.length, () =>
      importFile(deps, { shopId, kind: 'repairs', filePath, source: 'shell' }),
    );
  const first = await run('new file');
  const second = await run('same file again');
  if (first.created !== REPAIRS || second.unchanged !== REPAIRS)
    throw new Error(`${first.error ?? second.error}`);
  const actor = { kind: 'key', keyId: keys[0]?.id ?? '', shopId, scopes: ['import'] } as const;
  const batch = rows.slice(0, 5000).map((own, at) => batchRepair(own.length, at));
  const lineCount = batch.reduce((sum, { lines }) => sum + lines.length, 0);
  const answer = await measure('batch of 5,000 repairs', lineCount, () =>
    takeBatch(deps, actor, batch, undefined),
  );
  if (answer.created !== 5000) throw new Error(JSON.stringify(answer.rejected[0]));
  await database.$client.end();
} finally {
  cluster.stop();
  rmSync(dataDir, { recursive: true, force: true });
}
