import { spawn, spawnSync, type ChildProcess } from 'node:child_process';
import { readFileSync, readdirSync, rmSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import type { Measure } from './measure';
import { unseenShop, type UnseenShop } from './unseen-shop';
import { scratchFolder } from '../scratch-folder';

const ROOT = path.resolve(import.meta.dirname, '../..');
const PORT = 4655;
const ADDRESS = `http://127.0.0.1:${PORT}`;

/**
 * The whole way, over HTTP against a server of its own: a file of about 55,000 rows from a shop that the product was
 * not built on, until its rows are in, until its figures are there, the same file again, and what was found of what
 * was planted.
 */
export async function benchWholeWay(): Promise<Measure[]> {
  const dataDir = scratchFolder('bench');
  const env = { ...process.env, PORT: String(PORT), DATA_DIR: dataDir, DEMO: '0', LOG_LEVEL: 'error' };
  const server = spawn(process.execPath, ['--import', 'tsx', 'server/start.ts'], {
    cwd: ROOT,
    env,
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  try {
    await said(server, 'Ctrl-C stops it.');
    command(env, 'server/cli/shop.ts', '--name', 'Bench', '--owner', 'owner@bench.example');
    const key = command(env, 'server/cli/keys.ts', '--shop', 'Bench', '--scope', 'import,read');
    const shop = unseenShop({ seed: 20_261_201, models: 8, unitsPerModel: 400, years: 4.5 });
    const first = await bringIn(shop.csv, key, server);
    const again = await bringIn(shop.csv, key, server);
    return [
      { name: 'file: rows', value: shop.rows, unit: 'rows' },
      { name: 'file: until done', value: first.doneSeconds, unit: 's' },
      { name: 'file: rate until done', value: shop.rows / first.doneSeconds, unit: 'rows/s' },
      { name: 'file: figures ready after done', value: first.readySeconds, unit: 's' },
      {
        name: 'file: largest resident set of server and worker until done',
        value: first.residentMb,
        unit: 'MB',
      },
      { name: 'file: repairs created', value: first.created, unit: `of ${shop.repairs}` },
      { name: 'file again: until done', value: again.doneSeconds, unit: 's' },
      { name: 'file again: unchanged', value: again.unchanged, unit: `of ${shop.repairs}` },
      ...(await scoreCascades(shop, key)),
    ];
  } finally {
    server.kill('SIGINT');
    await new Promise((resolve) => server.once('exit', resolve));
    rmSync(dataDir, { recursive: true, force: true });
  }
}

function said(server: ChildProcess, words: string): Promise<void> {
  return new Promise((resolve, reject) => {
    let output = '';
    server.stdout?.on('data', (piece: Buffer) => {
      output += piece.toString();
      if (output.includes(words)) resolve();
    });
    server.once('exit', (code) => reject(new Error(`the server ended (${code}): ${output}`)));
  });
}

/** The last line that a command prints. */
function command(env: NodeJS.ProcessEnv, script: string, ...args: string[]): string {
  const { stdout, status } = spawnSync(process.execPath, ['--import', 'tsx', script, ...args], {
    cwd: ROOT,
    env,
    encoding: 'utf8',
  });
  if (status !== 0) throw new Error(`${script} ended with ${status}`);
  return stdout.trim().split('\n').at(-1) ?? '';
}

type State = {
  id: string;
  status: string;
  analysis: string;
  created: number;
  unchanged: number;
  rejected: number;
  error: string | null;
};

async function bringIn(csv: string, key: string, server: ChildProcess) {
  const headers = { Authorization: `Bearer ${key}` };
  const form = new FormData();
  form.set('kind', 'repairs');
  form.set('file', new Blob([csv], { type: 'text/csv' }), 'unseen.csv');
  const started = performance.now();
  const sent = await fetch(`${ADDRESS}/api/v1/imports`, { method: 'POST', headers, body: form });
  if (sent.status !== 202) throw new Error(`the file was answered with ${sent.status}: ${await sent.text()}`);
  let state = (await sent.json()) as State;
  let residentMb = 0;
  const until = async (isReached: () => boolean) => {
    while (!isReached()) {
      if (state.status === 'failed' || state.analysis === 'failed') throw new Error(`failed: ${state.error}`);
      await wait(100);
      if (state.status !== 'done') residentMb = Math.max(residentMb, residentOf(server.pid ?? 0));
      state = (await (await fetch(`${ADDRESS}/api/v1/imports/${state.id}`, { headers })).json()) as State;
    }
  };
  await until(() => state.status === 'done');
  const done = performance.now();
  await until(() => state.analysis === 'ready');
  return {
    ...state,
    residentMb,
    doneSeconds: (done - started) / 1000,
    readySeconds: (performance.now() - done) / 1000,
  };
}

/** Resident set of a process and those it started, the database's apart. */
function residentOf(pid: number): number {
  const parents = new Map<number, number>();
  for (const name of readdirSync('/proc')) {
    if (!/^\d+$/.test(name)) continue;
    const stat = readOr(`/proc/${name}/stat`);
    const parent = stat?.slice(stat.lastIndexOf(')') + 2).split(' ')[1];
    if (parent) parents.set(Number(name), Number(parent));
  }
  const family = [pid];
  for (const member of family)
    for (const [child, parent] of parents) if (parent === member) family.push(child);
  const kilobytes = family.map((member) =>
    Number(/VmRSS:\s+(\d+)/.exec(readOr(`/proc/${member}/status`) ?? '')?.[1] ?? 0),
  );
  return kilobytes.reduce((sum, each) => sum + each, 0) / 1024;
}

function readOr(file: string): string | undefined {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    return undefined;
  }
}

type Found = { model: string; causal: string; resultant: string; kind: string };

async function scoreCascades(shop: UnseenShop, key: string): Promise<Measure[]> {
  const answer = await fetch(`${ADDRESS}/api/v1/cascades`, { headers: { Authorization: `Bearer ${key}` } });
  const { data } = (await answer.json()) as { data: Found[] };
  const name = ({ model, causal, resultant }: Omit<Found, 'kind'>) => `${model} ${causal} ${resultant}`;
  const planted = new Set(shop.planted.map(name));
  const found = data.filter(({ kind }) => kind === 'cascade');
  const right = found.filter((finding) => planted.has(name(finding))).length;
  const reversed = found.filter(({ model, causal, resultant }) =>
    planted.has(name({ model, causal: resultant, resultant: causal })),
  ).length;
  return [
    { name: 'cascades: planted', value: planted.size, unit: 'pairs' },
    { name: 'cascades: precision', value: right / Math.max(1, found.length), unit: '' },
    { name: 'cascades: recall', value: right / planted.size, unit: '' },
    { name: 'cascades: reversed', value: reversed, unit: 'pairs' },
  ];
}
